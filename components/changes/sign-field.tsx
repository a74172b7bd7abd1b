"use client";

import { useState } from "react";
import { SIGNATURE_MEANINGS } from "@/lib/domain/changes";
import { plural } from "@/lib/domain/sentences";
import { apiCall, fieldErrors } from "@/components/api";
import { Refusal } from "@/components/forms/refusal";
import { useSave } from "@/components/forms/use-save";
import { Button } from "@/components/ui/button";
import { TextArea, TextField } from "@/components/ui/field";

export interface SignFieldProps {
  readonly changeId: string;
  readonly lockVersion: number;
  readonly proposalVersion: number;
  readonly signedContentHash: string;
  /** Over-limit findings, each of which wants a justification. */
  readonly overKeys: readonly { readonly key: string; readonly sentence: string }[];
}

/** The least that says anything; the service asks for the same. */
const JUSTIFICATION_LENGTH = 10;

/** The field “approved by”: opens in place, shows what the signature states and binds, and signs. */
export function SignField(props: SignFieldProps) {
  const [open, setOpen] = useState(false);
  const { overKeys } = props;
  if (open) return <SignForm {...props} onClose={() => setOpen(false)} />;
  return (
    <>
      <Button variant="primary" aria-expanded={false} onClick={() => setOpen(true)}>
        Sign here
      </Button>
      {overKeys.length > 0 && (
        <span className="quiet"> {plural(overKeys.length, "justification")} needed</span>
      )}
    </>
  );
}

function SignForm({ onClose, ...props }: SignFieldProps & { readonly onClose: () => void }) {
  const { changeId, lockVersion, proposalVersion, signedContentHash, overKeys } = props;
  const [words, setWords] = useState<Readonly<Record<string, string>>>({});
  const [password, setPassword] = useState("");
  const [tried, setTried] = useState(false);
  const save = useSave({
    send: () =>
      apiCall("POST", `/changes/${changeId}/disposition`, {
        body: { decision: "approved", proposalVersion, signedContentHash, password, justifications: words },
        ifMatch: lockVersion,
      }),
    onSaved: onClose,
  });
  const open = overKeys.filter(({ key }) => (words[key] ?? "").trim().length < JUSTIFICATION_LENGTH);
  return (
    <form
      className="act-form"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        setTried(true);
        if (open.length === 0 && password !== "") save.mutate(undefined);
      }}
    >
      <p>“{SIGNATURE_MEANINGS.approved}”</p>
      <p className="caution">
        Checks are estimates from catalog data; the test on the machine and a competent person decide. Expect
        hot surfaces and unexpected motion, and a raised load that can fall. Local rules stand above this.
      </p>
      {overKeys.map(({ key, sentence }) => (
        <TextArea
          key={key}
          label={`Over limit: ${sentence} Why is it acceptable?`}
          rows={2}
          maxLength={4000}
          value={words[key] ?? ""}
          error={tried && open.some((one) => one.key === key) ? "Write at least ten characters." : undefined}
          onChange={(event) => setWords({ ...words, [key]: event.target.value })}
        />
      ))}
      <SignedHash version={proposalVersion} hash={signedContentHash} />
      <TextField
        label="Your password"
        type="password"
        autoComplete="current-password"
        value={password}
        error={
          fieldErrors(save.error).password ??
          (tried && password === "" ? "Your password is part of the signature." : undefined)
        }
        onChange={(event) => setPassword(event.target.value)}
      />
      <Refusal error={save.error} title="Not signed" />
      <div className="acts">
        <Button type="submit" variant="primary" busy={save.isPending}>
          Approve and sign
        </Button>
        <Button variant="quiet" onClick={onClose}>
          leave it
        </Button>
      </div>
    </form>
  );
}

/** What a signature is bound to: short, in full on demand. */
export function SignedHash({ version, hash }: { readonly version: number; readonly hash: string }) {
  return (
    <details className="quiet">
      <summary>
        Binds version {version}, hash {hash.slice(0, 8)} …
      </summary>
      <code className="code break-all">{hash}</code>
    </details>
  );
}
