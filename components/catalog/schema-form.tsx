"use client";

import { useWatch, type FieldValues, type Path, type UseFormReturn } from "react-hook-form";
import type { z } from "zod";
import { FieldGroup, SelectField, TextField } from "@/components/ui/field";
import {
  choiceWords,
  formFields,
  valueAt,
  type FormField,
  type TypedValues,
} from "@/lib/schemas/form-fields";
import { groupedFields, isAsked, type FieldSubject } from "./field-groups";
import { registered, type Registered } from "./registered";
import { unlockSentence, unlocksOf } from "./unlock-sentence";

export interface SchemaFormProps<T extends FieldValues> {
  readonly subject: FieldSubject;
  readonly schema: z.ZodObject;
  readonly form: UseFormReturn<T, unknown, unknown>;
  /** Where the entries stand in the form's values: "data", "hardware.axes.0.load". */
  readonly prefix: string;
  /** Whether empty fields say what they would unlock; not where empty means "as the model has it". */
  readonly hints?: boolean;
}

/** The sentence of a form's error at a dotted path; of a list, the first. */
export function errorAt(errors: object, path: string): string | undefined {
  const found = valueAt(errors as Record<string, unknown>, path);
  const one: unknown = Array.isArray(found) ? found.find(Boolean) : found;
  const message = (one as { message?: unknown } | undefined)?.message;
  return typeof message === "string" && message !== "" ? message : undefined;
}

/** The fields of a schema under headings, each with its unit; an empty one says which checks it would unlock. */
export function SchemaForm<T extends FieldValues>({
  subject,
  schema,
  form,
  prefix,
  hints = true,
}: SchemaFormProps<T>) {
  const values = useWatch({ control: form.control, name: prefix as Path<T> }) as TypedValues | undefined;
  const typed = (path: string): string => {
    const value = valueAt(values, path);
    return typeof value === "string" ? value : "";
  };
  return (
    <>
      {groupedFields(subject, formFields(schema)).map(({ legend, help, fields }) => (
        <FieldGroup key={legend} legend={legend} help={help}>
          {fields
            .filter(({ path }) => isAsked(path, typed))
            .map((field) => (
              <SchemaField
                key={field.path}
                field={field}
                unlocks={
                  hints && typed(field.path) === "" ? unlockSentence(unlocksOf(subject, field.path)) : null
                }
                error={errorAt(form.formState.errors, `${prefix}.${field.path}`)}
                control={registered(form, `${prefix}.${field.path}` as Path<T>)}
              />
            ))}
        </FieldGroup>
      ))}
    </>
  );
}

interface SchemaFieldProps {
  readonly field: FormField;
  readonly unlocks: string | null;
  readonly error: string | undefined;
  readonly control: Registered;
}

function SchemaField({ field, unlocks, error, control }: SchemaFieldProps) {
  const help =
    field.help === undefined && unlocks === null ? undefined : (
      <>
        {field.help !== undefined && <span className="block">{field.help}.</span>}
        {unlocks !== null && <span className="block">{unlocks}</span>}
      </>
    );
  const words = { label: field.label, error, ...(help === undefined ? {} : { help }) };
  if (field.entry === "number")
    return (
      <TextField
        {...words}
        {...control}
        unit={field.unit}
        inputMode="decimal"
        autoComplete="off"
        maxLength={40}
      />
    );
  return (
    <SelectField {...words} {...control}>
      <option value="">not stated</option>
      {field.options.map((value) => (
        <option key={value} value={value}>
          {choiceWords(value)}
        </option>
      ))}
    </SelectField>
  );
}
