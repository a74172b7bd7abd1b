"use client";

import { useState, type ReactNode } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { TextField } from "@/components/ui/field";
import { Refusal } from "./refusal";
import { useSave } from "./use-save";

export interface ActButtonProps {
  /** The act in words: "Revoke". */
  readonly label: string;
  readonly title: string;
  /** What follows from it. */
  readonly children: ReactNode;
  /** Asks for a reason, which is kept in the record. */
  readonly reasoned?: boolean;
  readonly send: (reason: string) => Promise<unknown>;
}

/** An act that is asked for once more, because nothing takes it back or because it wants a reason. */
export function ActButton({ label, title, children, reasoned = false, send }: ActButtonProps) {
  const [open, setOpen] = useState(false);
  const [reason, setReason] = useState("");
  const close = (): void => {
    setOpen(false);
    setReason("");
  };
  const act = useSave({ send, onSaved: close });
  const acts = (
    <>
      <Button variant="primary" busy={act.isPending} onClick={() => act.mutate(reason)}>
        {label}
      </Button>
      <Button onClick={close}>Leave it</Button>
    </>
  );
  return (
    <>
      <Button onClick={() => setOpen(true)}>{label}</Button>
      <Dialog open={open} onClose={close} title={title} acts={acts}>
        {children}
        {reasoned && (
          <TextField
            label="Reason"
            help="Kept in the record."
            value={reason}
            maxLength={1000}
            onChange={(event) => setReason(event.target.value)}
          />
        )}
        <Refusal error={act.error} />
      </Dialog>
    </>
  );
}
