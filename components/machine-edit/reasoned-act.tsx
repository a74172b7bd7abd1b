"use client";

import { useRouter } from "next/navigation";
import type { FormEvent, ReactNode } from "react";
import { fieldErrors, sentenceOf } from "@/components/api";
import { useSave } from "@/components/catalog/use-save";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";

export interface ReasonedActProps {
  /** Below /api/v1. */
  readonly path: string;
  readonly title: string;
  readonly note: ReactNode;
  readonly label: string;
  /** Members of the request beside the reason. */
  readonly body?: Readonly<Record<string, unknown>>;
  /** Entries of the form beside the reason, named as the request's members; `errors` by name. */
  readonly children?: (errors: Readonly<Record<string, string>>) => ReactNode;
}

/** An act upon a machine that takes a reason, in a form of its own. */
export function ReasonedAct({ path, title, note, label, body, children }: ReasonedActProps) {
  const router = useRouter();
  const act = useSave<unknown>({ onSaved: () => router.refresh() });
  const errors = fieldErrors(act.error);
  const submit = (event: FormEvent<HTMLFormElement>): void => {
    event.preventDefault();
    const form = event.currentTarget;
    const typed = Object.fromEntries(new FormData(form));
    act.mutate({ method: "POST", path, body: { ...body, ...typed } }, { onSuccess: () => form.reset() });
  };
  return (
    <form className="field-group" onSubmit={submit} noValidate>
      <h3>{title}</h3>
      <p className="field-help">{note}</p>
      <div className="field-columns">
        {children?.(errors)}
        <TextField label="Reason" name="reason" maxLength={1000} autoComplete="off" error={errors.reason} />
      </div>
      {act.isError && Object.keys(errors).length === 0 && (
        <Notice live="alert">
          <p>{sentenceOf(act.error)}</p>
        </Notice>
      )}
      <div className="acts mt-4">
        <Button type="submit" busy={act.isPending}>
          {label}
        </Button>
      </div>
    </form>
  );
}
