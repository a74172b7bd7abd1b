"use client";

import { useState, type ReactNode } from "react";
import { apiCall, fieldErrors } from "@/components/api";
import { Refusal } from "@/components/forms/refusal";
import { useSave } from "@/components/forms/use-save";
import { Button } from "@/components/ui/button";
import { TextArea, TextField } from "@/components/ui/field";

export interface ActFormProps {
  /** As on the button that opens it: "decline", "withdraw". */
  readonly label: string;
  /** The whole act on the button that does it: "Decline the change". */
  readonly act: string;
  readonly path: string;
  readonly lockVersion: number;
  /** `needed`: the act wants a reason; `welcome`: it may have one. */
  readonly reason: "needed" | "welcome";
  /** A signed act: takes the password, and says what the signature means. */
  readonly meaning?: string | undefined;
  readonly children?: ReactNode;
  /** Members of the request beside reason and password. */
  readonly more?: Readonly<Record<string, unknown>> | undefined;
  readonly primary?: boolean | undefined;
}

/** One act upon a change, opened where it stands and sent with the version that the reader has seen. */
export function ActForm(props: ActFormProps) {
  const [open, setOpen] = useState(false);
  const { label, primary = false } = props;
  if (!open)
    return (
      <Button variant={primary ? "primary" : "quiet"} aria-expanded={false} onClick={() => setOpen(true)}>
        {label}
      </Button>
    );
  return <OpenForm {...props} onClose={() => setOpen(false)} />;
}

function OpenForm({
  act,
  path,
  lockVersion,
  reason,
  meaning,
  children,
  more,
  onClose,
}: ActFormProps & { onClose: () => void }) {
  const [words, setWords] = useState("");
  const [password, setPassword] = useState("");
  const save = useSave({
    send: () =>
      apiCall("POST", path, {
        body: { ...more, reason: words, ...(meaning === undefined ? {} : { password }) },
        ifMatch: lockVersion,
      }),
    onSaved: onClose,
  });
  const errors = fieldErrors(save.error);
  return (
    <form
      className="act-form"
      onSubmit={(event) => {
        event.preventDefault();
        save.mutate(undefined);
      }}
    >
      {children}
      <TextArea
        label="Reason"
        optional={reason === "welcome"}
        required={reason === "needed"}
        rows={3}
        maxLength={4000}
        value={words}
        error={errors.reason}
        onChange={(event) => setWords(event.target.value)}
      />
      {meaning !== undefined && (
        <>
          <p className="quiet">Signing states: “{meaning}”</p>
          <TextField
            label="Your password"
            type="password"
            autoComplete="current-password"
            required
            value={password}
            error={errors.password}
            onChange={(event) => setPassword(event.target.value)}
          />
        </>
      )}
      <Refusal error={save.error} />
      <div className="acts">
        <Button type="submit" variant="primary" busy={save.isPending}>
          {act}
        </Button>
        <Button variant="quiet" onClick={onClose}>
          leave it
        </Button>
      </div>
    </form>
  );
}
