"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useRouter } from "next/navigation";
import { useForm } from "react-hook-form";
import { registered } from "@/components/catalog/registered";
import { SaveTrouble } from "@/components/catalog/save-trouble";
import { showFieldErrors, useSave } from "@/components/catalog/use-save";
import { Button } from "@/components/ui/button";
import { TextArea, TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { updateMachineSchema, type MachineView } from "@/lib/schemas/machines-write";

/** Serial number and note of a machine. */
export function MachineFactsForm({ machine }: { readonly machine: MachineView }) {
  const router = useRouter();
  const form = useForm({
    resolver: zodResolver(updateMachineSchema),
    // Follows what stands: a version saved here or loaded anew takes the place of what was typed.
    values: { serial: machine.serial, note: machine.note },
  });
  const save = useSave<MachineView>({ onSaved: () => router.refresh() });
  const submit = form.handleSubmit((body) =>
    save.mutate(
      { method: "PUT", path: `/machines/${machine.id}`, body, ifMatch: machine.version },
      { onError: (error) => showFieldErrors(error, form.setError) },
    ),
  );
  const { errors } = form.formState;
  return (
    <form onSubmit={(event) => void submit(event)} noValidate>
      <div className="field-columns">
        <TextField
          label="Serial number"
          error={errors.serial?.message}
          maxLength={80}
          autoComplete="off"
          {...registered(form, "serial")}
        />
        <TextArea label="Note" optional rows={2} error={errors.note?.message} {...registered(form, "note")} />
      </div>
      <SaveTrouble error={save.error} onLoad={save.reset} />
      {save.isSuccess && (
        <Notice live="status">
          <p>Saved. What stood before is on the record.</p>
        </Notice>
      )}
      <div className="acts mt-4">
        <Button type="submit" variant="primary" busy={save.isPending}>
          Save
        </Button>
      </div>
    </form>
  );
}
