"use client";

import { useRouter } from "next/navigation";
import type { FormEvent } from "react";
import { fieldErrors, sentenceOf } from "@/components/api";
import { useSave } from "@/components/catalog/use-save";
import { Button } from "@/components/ui/button";
import { SelectField, TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import type { MachineView } from "@/lib/schemas/machines-write";
import type { NamedChoice } from "./machine-create-form";

export interface MachineCopyFormProps {
  readonly machine: MachineView;
  readonly sites: readonly NamedChoice[];
  /** Standing facts that could come along. */
  readonly facts: number;
}

/** Adds a machine like this one; recorded hardware comes along only where there is evidence for it. */
export function MachineCopyForm({ machine, sites, facts }: MachineCopyFormProps) {
  const router = useRouter();
  const copy = useSave<MachineView>({ onSaved: ({ id }) => router.push(`/machines/${id}`) });
  const errors = fieldErrors(copy.error);
  const submit = (event: FormEvent<HTMLFormElement>): void => {
    event.preventDefault();
    const typed = [...new FormData(event.currentTarget)].filter(([, value]) => value !== "");
    copy.mutate({
      method: "POST",
      path: `/machines/${machine.id}/copy`,
      body: { serial: "", ...Object.fromEntries(typed) },
    });
  };
  return (
    <form onSubmit={submit} noValidate>
      <div className="field-columns">
        <TextField
          label="Serial number"
          name="serial"
          maxLength={80}
          autoComplete="off"
          error={errors.serial}
        />
        <SelectField label="Site" name="siteId" defaultValue={machine.siteId} error={errors.siteId}>
          {sites.map(({ id, label }) => (
            <option key={id} value={id}>
              {label}
            </option>
          ))}
        </SelectField>
        {facts > 0 && (
          <TextField
            label="Evidence for the same recorded hardware"
            optional
            name="hardwareEvidence"
            maxLength={1000}
            error={errors.hardwareEvidence}
            help="Who read which marking on the new machine, when. Left empty, the recorded hardware is not copied: what was read on one machine says nothing about another."
          />
        )}
      </div>
      {copy.isError && Object.keys(errors).length === 0 && (
        <Notice live="alert">
          <p>{sentenceOf(copy.error)}</p>
        </Notice>
      )}
      <div className="acts mt-4">
        <Button type="submit" busy={copy.isPending}>
          Add the copy
        </Button>
      </div>
    </form>
  );
}
