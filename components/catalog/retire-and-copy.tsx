"use client";

import { useRouter } from "next/navigation";
import { useId, useState, type FormEvent, type ReactNode } from "react";
import { fieldErrors, sentenceOf } from "@/components/api";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { useSave } from "./use-save";

export interface RetireAndCopyProps {
  /** Below /api/v1: "/catalog/motor/…". */
  readonly apiPath: string;
  /** Where a copy is shown, without its id: "/catalog/motor". */
  readonly pagePath: string;
  /** "motor", "machine model". */
  readonly noun: string;
  readonly code: string;
  readonly name: string;
  readonly retired: boolean;
  /** What is said in the copy's dialog. */
  readonly copyNote: ReactNode;
}

/** Copy, and retire or take back into use; either undoes the other, so that nothing needs to be confirmed. */
export function RetireAndCopy({
  apiPath,
  pagePath,
  noun,
  code,
  name,
  retired,
  copyNote,
}: RetireAndCopyProps) {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const retire = useSave<unknown>({ onSaved: () => router.refresh() });
  return (
    <>
      <Button onClick={() => setOpen(true)}>Copy</Button>
      <Button
        busy={retire.isPending}
        onClick={() =>
          retire.mutate({ method: "POST", path: `${apiPath}/retire`, body: { retired: !retired } })
        }
      >
        {retired ? "Take back into use" : "Retire"}
      </Button>
      {retire.isError && (
        <Notice live="alert">
          <p>{sentenceOf(retire.error)}</p>
        </Notice>
      )}
      <CopyDialog
        open={open}
        onClose={() => setOpen(false)}
        {...{ apiPath, pagePath, noun, code, name, copyNote }}
      />
    </>
  );
}

interface CopyDialogProps extends Omit<RetireAndCopyProps, "retired"> {
  readonly open: boolean;
  readonly onClose: () => void;
}

function CopyDialog({ open, onClose, apiPath, pagePath, noun, code, name, copyNote }: CopyDialogProps) {
  const router = useRouter();
  const formId = useId();
  const copy = useSave<{ id: string }>({ onSaved: ({ id }) => router.push(`${pagePath}/${id}`) });
  const errors = fieldErrors(copy.error);
  const submit = (event: FormEvent<HTMLFormElement>): void => {
    event.preventDefault();
    const data = new FormData(event.currentTarget);
    copy.mutate({
      method: "POST",
      path: `${apiPath}/copy`,
      body: { code: data.get("code"), name: data.get("name") },
    });
  };
  return (
    <Dialog
      open={open}
      onClose={onClose}
      title={`Copy ${code}`}
      acts={
        <>
          <Button type="submit" form={formId} variant="primary" busy={copy.isPending}>
            Make the copy
          </Button>
          <Button onClick={onClose}>Leave it</Button>
        </>
      }
    >
      <form id={formId} onSubmit={submit} noValidate>
        <p>{copyNote}</p>
        <TextField label={`Code of the new ${noun}`} name="code" maxLength={40} error={errors.code} />
        <TextField label="Name" name="name" defaultValue={name} maxLength={200} error={errors.name} />
        {copy.isError && Object.keys(errors).length === 0 && (
          <Notice live="alert">
            <p>{sentenceOf(copy.error)}</p>
          </Notice>
        )}
      </form>
    </Dialog>
  );
}
