"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { useForm, useWatch } from "react-hook-form";
import { ItemSelect } from "@/components/catalog/item-select";
import { registered } from "@/components/catalog/registered";
import { SaveTrouble } from "@/components/catalog/save-trouble";
import { SchemaForm } from "@/components/catalog/schema-form";
import { showFieldErrors, useSave } from "@/components/catalog/use-save";
import { Button } from "@/components/ui/button";
import { SelectField, TextArea } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import {
  catalogKindSchema,
  DIFFERING_PARTS,
  differingPartSchema,
  type DifferingPart,
} from "@/lib/domain/catalog";
import type { ItemChoice } from "@/lib/schemas/catalog";
import { emptyFact, factFormSchema, factSchema, isCatalogPart, isMachinePart } from "@/lib/schemas/fact-form";
import { partWords } from "./part-words";

export interface FactFormProps {
  readonly machineId: string;
  readonly axes: readonly string[];
  readonly choices: readonly ItemChoice[];
}

/** Records hardware that differs from the model: the part first, since the rest depends on it. */
export function FactForm({ machineId, axes, choices }: FactFormProps) {
  const [part, setPart] = useState<DifferingPart>("sense_resistor");
  return (
    <>
      <div className="field-columns">
        <SelectField
          label="Part that differs"
          value={part}
          onChange={(event) => setPart(differingPartSchema.parse(event.target.value))}
        >
          {DIFFERING_PARTS.map((option) => (
            <option key={option} value={option}>
              {partWords(option)}
            </option>
          ))}
        </SelectField>
      </div>
      <PartForm key={part} part={part} machineId={machineId} axes={axes} choices={choices} />
    </>
  );
}

function PartForm({ part, machineId, axes, choices }: FactFormProps & { readonly part: DifferingPart }) {
  const router = useRouter();
  const form = useForm({ resolver: zodResolver(factFormSchema(part)), defaultValues: emptyFact(part) });
  const save = useSave<unknown>({
    onSaved: () => {
      form.reset(emptyFact(part));
      router.refresh();
    },
  });
  const submit = form.handleSubmit((body) =>
    save.mutate(
      { method: "POST", path: `/machines/${machineId}/hardware`, body },
      { onError: (error) => showFieldErrors(error, form.setError) },
    ),
  );
  const itemId = useWatch({ control: form.control, name: "itemId" });
  const { errors } = form.formState;
  const kind = catalogKindSchema.safeParse(part).data;
  return (
    <form onSubmit={(event) => void submit(event)} noValidate>
      <div className="field-columns">
        {!isMachinePart(part) && (
          <SelectField label="Axis" error={errors.axis?.message} {...registered(form, "axis")}>
            <option value="">every axis</option>
            {axes.map((axis) => (
              <option key={axis} value={axis}>
                {axis}
              </option>
            ))}
          </SelectField>
        )}
        {kind && (
          <ItemSelect
            kind={kind}
            label={`Fitted ${partWords(part)}`}
            choices={choices}
            chosen={itemId}
            error={errors.itemId?.message}
            {...registered(form, "itemId")}
          />
        )}
        <TextArea
          label="Evidence"
          rows={2}
          help="Who read which marking or measured it, with what, when."
          error={errors.evidence?.message}
          {...registered(form, "evidence")}
        />
      </div>
      {!isCatalogPart(part) && errors.itemId && <p className="field-error">{errors.itemId.message}</p>}
      <details open={!isCatalogPart(part)}>
        <summary>Values of this machine alone</summary>
        <div className="pt-4">
          <SchemaForm subject={part} schema={factSchema(part)} form={form} prefix="data" hints={false} />
        </div>
      </details>
      <SaveTrouble error={save.error} onLoad={save.reset} />
      {save.isSuccess && (
        <Notice live="status">
          <p>Recorded. The machine is being checked again.</p>
        </Notice>
      )}
      <div className="acts mt-4">
        <Button type="submit" variant="primary" busy={save.isPending}>
          Record the {partWords(part)}
        </Button>
      </div>
    </form>
  );
}
