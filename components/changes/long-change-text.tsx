"use client";

import type { RevisionLine } from "@/lib/diff/types";
import { LongRevision, type LongRevisionProps } from "@/components/revision/long-revision";
import type { ChangeView } from "./change-view";
import { CommentForm } from "./comment-form";
import { Comments, onLine } from "./comments";

export interface LongChangeTextProps extends Omit<LongRevisionProps, "noteOf"> {
  readonly changeId: string;
  readonly proposalVersion: number;
  readonly comments: ChangeView["comments"];
  readonly mayComment: boolean;
}

/** A long text of a change, with the comments at its lines. */
export function LongChangeText({
  changeId,
  proposalVersion,
  comments,
  mayComment,
  ...revision
}: LongChangeTextProps) {
  const noteOf = (line: RevisionLine) => {
    const side = line.toBeLine === null ? ("was" as const) : ("to_be" as const);
    const number = line.toBeLine ?? line.wasLine ?? 0;
    const place = { path: revision.path, side, line: number };
    const own = onLine(comments, place);
    if (own.length === 0 && (line.kind === "same" || !mayComment)) return null;
    return (
      <div className="code-line">
        <div className="line-note">
          <Comments comments={own} />
          {mayComment && (
            <CommentForm
              changeId={changeId}
              proposalVersion={proposalVersion}
              anchor={{ kind: "line", ...place }}
              on={`line ${number} of ${revision.path}`}
            />
          )}
        </div>
      </div>
    );
  };
  return <LongRevision {...revision} noteOf={noteOf} />;
}
