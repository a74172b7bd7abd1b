import type { ReactNode } from "react";
import { reviseText } from "@/lib/diff/revise-text";
import type { RevisionLine } from "@/lib/diff/types";
import { lineLetters } from "@/lib/review/line-letters";
import { DrawingRevision, type DrawingRevisionProps } from "@/components/revision/drawing-revision";
import type { ChangeView } from "./change-view";
import { CommentForm } from "./comment-form";
import { Comments, onLine } from "./comments";
import { LongChangeText } from "./long-change-text";
import { WholeTextsOnDemand } from "./whole-texts-on-demand";

export interface ChangeTextsProps {
  readonly change: ChangeView;
  readonly mayComment: boolean;
}

/** Was / To be of every file, with the letters in the margin and the comments at their lines. */
export function ChangeTexts({ change, mayComment }: ChangeTextsProps) {
  const letters = lineLetters(change.evaluation.changes);
  const paths = [...new Set([...change.base.files, ...change.proposal.files].map(({ path }) => path))];
  return (
    <>
      {paths.map((path, index) => {
        const was = change.base.files.find((file) => file.path === path)?.text ?? "";
        const toBe = change.proposal.files.find((file) => file.path === path)?.text ?? "";
        const shared = {
          path,
          index,
          letters: {
            was: Object.fromEntries(letters.was.get(path) ?? []),
            toBe: Object.fromEntries(letters.toBe.get(path) ?? []),
          },
          keep: commentedLines(change, path),
        };
        return (
          <div key={path} className="mb-4">
            <h3 className="code">{path}</h3>
            {Math.max(was.length, toBe.length) > LONG_TEXT ? (
              <LongChangeText
                {...shared}
                was={was}
                toBe={toBe}
                changeId={change.id}
                proposalVersion={change.proposal.version}
                comments={change.comments}
                mayComment={mayComment}
              />
            ) : (
              <ShortText {...shared} was={was} toBe={toBe} change={change} mayComment={mayComment} />
            )}
            <WholeTextsOnDemand path={path} was={was} toBe={toBe} />
          </div>
        );
      })}
    </>
  );
}

/** Characters from which on a text is long: about 2000 lines. */
const LONG_TEXT = 60_000;

interface ShortTextProps extends Omit<DrawingRevisionProps, "stretches" | "notes">, ChangeTextsProps {
  readonly was: string;
  readonly toBe: string;
}

function ShortText({ was, toBe, change, mayComment, ...shared }: ShortTextProps) {
  const stretches = reviseText(was, toBe);
  const lines = stretches.flatMap((stretch) => stretch.lines);
  const notes = notesOf({ path: shared.path, lines, change, mayComment });
  return <DrawingRevision {...shared} stretches={stretches} notes={notes} />;
}

function commentedLines({ comments }: ChangeView, path: string) {
  const lines = (side: "was" | "to_be") =>
    Object.fromEntries(
      comments.flatMap(({ anchor }) =>
        anchor.kind === "line" && anchor.path === path && anchor.side === side ? [[anchor.line, true]] : [],
      ),
    );
  return { was: lines("was"), toBe: lines("to_be") };
}

interface NotesInput extends ChangeTextsProps {
  readonly path: string;
  readonly lines: readonly RevisionLine[];
}

/** A note below each line that changed or that somebody commented on. */
function notesOf({ path, lines, change, mayComment }: NotesInput) {
  const toBe: Record<number, ReactNode> = {};
  const was: Record<number, ReactNode> = {};
  for (const line of lines) {
    const side = line.toBeLine === null ? ("was" as const) : ("to_be" as const);
    const number = line.toBeLine ?? line.wasLine ?? 0;
    const comments = onLine(change.comments, { path, side, line: number });
    if (comments.length === 0 && (line.kind === "same" || !mayComment)) continue;
    (side === "was" ? was : toBe)[number] = (
      <>
        <Comments comments={comments} />
        {mayComment && (
          <CommentForm
            changeId={change.id}
            proposalVersion={change.proposal.version}
            anchor={{ kind: "line", path, side, line: number }}
            on={`line ${number} of ${path}`}
          />
        )}
      </>
    );
  }
  return { was, toBe };
}
