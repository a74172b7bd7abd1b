"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useRouter } from "next/navigation";
import { useForm } from "react-hook-form";
import { registered } from "@/components/catalog/registered";
import { SaveTrouble } from "@/components/catalog/save-trouble";
import { showFieldErrors, useSave } from "@/components/catalog/use-save";
import { Button } from "@/components/ui/button";
import { SelectField, TextArea, TextField } from "@/components/ui/field";
import { createMachineSchema, type MachineView } from "@/lib/schemas/machines-write";

export interface NamedChoice {
  readonly id: string;
  readonly label: string;
}

export interface MachineCreateFormProps {
  readonly models: readonly NamedChoice[];
  readonly sites: readonly NamedChoice[];
  /** Chosen to begin with; empty: none. */
  readonly modelId: string;
}

/** A machine that joins the fleet. */
export function MachineCreateForm({ models, sites, modelId }: MachineCreateFormProps) {
  const router = useRouter();
  const form = useForm({
    resolver: zodResolver(createMachineSchema),
    defaultValues: { serial: "", modelId, siteId: sites.length === 1 ? (sites[0]?.id ?? "") : "", note: "" },
  });
  const save = useSave<MachineView>({ onSaved: ({ id }) => router.push(`/machines/${id}`) });
  const submit = form.handleSubmit((body) =>
    save.mutate(
      { method: "POST", path: "/machines", body },
      { onError: (error) => showFieldErrors(error, form.setError) },
    ),
  );
  const { errors } = form.formState;
  return (
    <form onSubmit={(event) => void submit(event)} noValidate>
      <TextField
        label="Serial number"
        help="As on its plate; readings that name a serial number are held against it."
        error={errors.serial?.message}
        maxLength={80}
        autoComplete="off"
        {...registered(form, "serial")}
      />
      <SelectField label="Machine model" error={errors.modelId?.message} {...registered(form, "modelId")}>
        <option value="">choose</option>
        {models.map(({ id, label }) => (
          <option key={id} value={id}>
            {label}
          </option>
        ))}
      </SelectField>
      <SelectField
        label="Site"
        help="Its ambient temperature is what the machine is checked at."
        error={errors.siteId?.message}
        {...registered(form, "siteId")}
      >
        <option value="">choose</option>
        {sites.map(({ id, label }) => (
          <option key={id} value={id}>
            {label}
          </option>
        ))}
      </SelectField>
      <TextArea label="Note" optional rows={2} error={errors.note?.message} {...registered(form, "note")} />
      <SaveTrouble error={save.error} onLoad={save.reset} />
      <div className="acts mt-4">
        <Button type="submit" variant="primary" busy={save.isPending}>
          Add the machine
        </Button>
      </div>
    </form>
  );
}
