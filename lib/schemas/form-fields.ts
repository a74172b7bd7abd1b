import { z } from "zod";
import { fieldNotes } from "@/lib/domain/field-notes";
import { readTypedNumber } from "./typed-number";

/** What a form shows for one field of stored data. */
export interface FormField {
  /** "inductance_mh", or "set_point.gain" for a field of a nested object. */
  readonly path: string;
  readonly label: string;
  /** Empty for counts, choices and words. */
  readonly unit: string;
  readonly help: string | undefined;
  readonly entry: "number" | "choice" | "yes_no";
  /** The values of a choice. */
  readonly options: readonly string[];
  readonly schema: z.ZodType;
}

/** What stands in the entries of a form: texts, nested as the data are. Nothing typed is an empty text. */
export interface TypedValues {
  readonly [field: string]: string | TypedValues;
}

/** Stored data: numbers, words, yes or no, nested; a missing field is absent. */
export type FieldData = Readonly<Record<string, unknown>>;

function unwrapped(schema: z.core.$ZodType): z.core.$ZodType {
  return schema instanceof z.ZodOptional ? unwrapped(schema.unwrap()) : schema;
}

function entryOf(inner: z.core.$ZodType): Pick<FormField, "entry" | "options"> {
  if (inner instanceof z.ZodEnum) return { entry: "choice", options: inner.options.map(String) };
  if (inner instanceof z.ZodBoolean) return { entry: "yes_no", options: ["yes", "no"] };
  return { entry: "number", options: [] };
}

/** The fields of a schema in its order; those of a nested object follow in its place. */
export function formFields(schema: z.ZodObject, prefix = ""): FormField[] {
  return Object.entries(schema.shape).flatMap(([name, field]) => {
    const path = `${prefix}${name}`;
    const inner = unwrapped(field);
    if (inner instanceof z.ZodObject) return formFields(inner, `${path}.`);
    const note = fieldNotes.get(field as z.ZodType);
    return [
      {
        path,
        label: note?.label ?? name,
        unit: note?.unit ?? "",
        help: note?.help,
        ...entryOf(inner),
        schema: field as z.ZodType,
      },
    ];
  });
}

/** Words of a stored choice: "reference_voltage" is "reference voltage". */
export function choiceWords(value: string): string {
  return value.replaceAll("_", " ");
}

/** The value at a dotted path. */
export function valueAt(data: FieldData | undefined, path: string): unknown {
  return path
    .split(".")
    .reduce<unknown>(
      (inside, name) =>
        typeof inside === "object" && inside !== null && Object.hasOwn(inside, name)
          ? (inside as FieldData)[name]
          : undefined,
      data,
    );
}

function typedText(value: unknown): string {
  if (typeof value === "boolean") return value ? "yes" : "no";
  return value === undefined || value === null ? "" : String(value);
}

/** Stored data as they stand in the entries; every field of the schema is there, so that none is uncontrolled. */
export function typedValues(schema: z.ZodObject, data: FieldData | undefined): TypedValues {
  return Object.fromEntries(
    Object.entries(schema.shape).map(([name, field]) => {
      const inner = unwrapped(field);
      const value = data?.[name];
      return inner instanceof z.ZodObject
        ? [name, typedValues(inner, value as FieldData | undefined)]
        : [name, typedText(value)];
    }),
  );
}

/** What is wrong with a number, in words with its unit. */
function limitSentence(issue: z.core.$ZodIssue | undefined, unit: string): string {
  const behind = unit === "" ? "" : ` ${unit}`;
  if (issue?.code === "too_small")
    return `${issue.inclusive ? "At least" : "More than"} ${String(issue.minimum)}${behind}.`;
  if (issue?.code === "too_big")
    return `${issue.inclusive ? "At most" : "Less than"} ${String(issue.maximum)}${behind}.`;
  return "This does not fit here.";
}

function readEntry({ entry, schema, unit }: FormField, typed: string, context: z.RefinementCtx): unknown {
  const refuse = (message: string) => {
    context.addIssue({ code: "custom", message });
    return z.NEVER;
  };
  if (entry !== "number") return typed === "" ? undefined : entry === "choice" ? typed : typed === "yes";
  const number = readTypedNumber(typed);
  if (!number.ok) return refuse(number.sentence);
  const read = schema.safeParse(number.value);
  return read.success ? read.data : refuse(limitSentence(read.error.issues[0], unit));
}

/** Without the fields that are missing; an object of nothing but missing fields is missing itself. */
function withoutMissing(data: FieldData): FieldData | undefined {
  const present = Object.entries(data).filter(([, value]) => value !== undefined);
  return present.length === 0 ? undefined : Object.fromEntries(present);
}

function typedShape(schema: z.ZodObject, fields: readonly FormField[], prefix: string) {
  return Object.entries(schema.shape).map(([name, field]): [string, z.ZodType] => {
    const inner = unwrapped(field);
    const path = `${prefix}${name}`;
    if (inner instanceof z.ZodObject)
      return [
        name,
        z.object(Object.fromEntries(typedShape(inner, fields, `${path}.`))).transform(withoutMissing),
      ];
    const known = fields.find((one) => one.path === path);
    return [
      name,
      z.string().transform((typed, context) => (known ? readEntry(known, typed, context) : undefined)),
    ];
  });
}

/** Reads the entries of a form into the data of a schema; sentences say what a person can put right. */
export function typedSchema(schema: z.ZodObject): z.ZodType<FieldData, TypedValues> {
  const shape = Object.fromEntries(typedShape(schema, formFields(schema), ""));
  const read = z.object(shape).transform((data) => withoutMissing(data) ?? {});
  return read as unknown as z.ZodType<FieldData, TypedValues>;
}
