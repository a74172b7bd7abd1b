"use client";

import { useState } from "react";
import type { CommentAnchor } from "@/lib/domain/changes";
import { apiCall } from "@/components/api";
import { Refusal } from "@/components/forms/refusal";
import { useSave } from "@/components/forms/use-save";
import { Button } from "@/components/ui/button";
import { TextArea } from "@/components/ui/field";

export interface CommentFormProps {
  readonly changeId: string;
  readonly proposalVersion: number;
  readonly anchor: CommentAnchor;
  /** What the comment is on, for the field's label: "run current", "line 42". */
  readonly on: string;
}

/** A comment where it belongs; the field opens at the place itself. */
export function CommentForm({ changeId, proposalVersion, anchor, on }: CommentFormProps) {
  const [open, setOpen] = useState(false);
  const [body, setBody] = useState("");
  const save = useSave({
    send: () => apiCall("POST", `/changes/${changeId}/comments`, { body: { anchor, body, proposalVersion } }),
    onSaved: () => {
      setBody("");
      setOpen(false);
    },
  });
  if (!open)
    return (
      <Button variant="quiet" onClick={() => setOpen(true)} aria-label={`Comment on ${on}`}>
        comment
      </Button>
    );
  return (
    <form
      className="comment-form"
      onSubmit={(event) => {
        event.preventDefault();
        save.mutate(undefined);
      }}
    >
      <TextArea
        label={`Comment on ${on}`}
        value={body}
        rows={3}
        maxLength={4000}
        required
        onChange={(event) => setBody(event.target.value)}
      />
      <Refusal error={save.error} title="Not kept" />
      <div className="acts">
        <Button type="submit" busy={save.isPending} disabled={body.trim() === ""}>
          Keep the comment
        </Button>
        <Button variant="quiet" onClick={() => setOpen(false)}>
          leave it
        </Button>
      </div>
    </form>
  );
}
