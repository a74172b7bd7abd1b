import type { ReactNode } from "react";
import type { RevisionLine, RevisionSegment } from "@/lib/diff/types";
import { RevisionMarks } from "@/components/ui/revision-mark";
import { CodeText } from "./code-text";

export type ByLine<T> = Readonly<Record<number, T>>;

/** What stands at lines, by number in the new text, and by number in the old one for lines that went. */
export interface OnLines<T> {
  readonly toBe: ByLine<T>;
  readonly was: ByLine<T>;
}

export interface LineContext {
  /** Revision letters. */
  readonly letters: OnLines<readonly string[]> | undefined;
  /** What stands below a line: its comments, the way to add one. */
  readonly notes: OnLines<ReactNode> | undefined;
  /** Lines that never fold away, since somebody said something about them. */
  readonly keep?: OnLines<boolean> | undefined;
  /** Which of the page's texts this is, from 0. */
  readonly index: number;
}

function Segment({ segment }: { segment: RevisionSegment }) {
  const words = <CodeText text={segment.text} blanks={segment.text.trim() === ""} />;
  if (segment.kind === "same") return <CodeText text={segment.text} />;
  if (segment.kind === "was")
    return (
      <del>
        <span className="visually-hidden">was </span>
        {words}
      </del>
    );
  return (
    <ins>
      <span className="visually-hidden">to be </span>
      {words}
    </ins>
  );
}

/** Said where a firmware reads the same as before, or where the line only stands elsewhere. */
function Aside({ line }: { line: RevisionLine }) {
  if (line.moved !== undefined)
    return (
      <bdi className="line-aside">
        {line.kind === "added" ? `moved, was line ${line.moved}` : `moved to line ${line.moved}`}
      </bdi>
    );
  if (!line.onlySpace || line.kind !== "changed") return null;
  const inLine = line.segments.some(({ kind }) => kind !== "same");
  return (
    <bdi className="line-aside">
      {inLine ? "only spacing or a comment differs" : "only the line end differs"}
    </bdi>
  );
}

/** The value of a keyed record for a line: by its new number, else by its old one. */
export function ofLine<T>(record: OnLines<T> | undefined, line: RevisionLine): T | undefined {
  const found = line.toBeLine === null ? undefined : record?.toBe[line.toBeLine];
  if (found !== undefined || line.kind === "same" || line.wasLine === null) return found;
  return record?.was[line.wasLine];
}

export interface RevisionRowProps {
  readonly line: RevisionLine;
  readonly context: LineContext;
}

/** Whether a reader of meaning may pass it over: only spacing or a comment differs, and nobody said anything about it. */
export function isFoldable(line: RevisionLine, { letters, keep }: LineContext): boolean {
  return line.kind !== "same" && line.onlySpace && !ofLine(letters, line) && ofLine(keep, line) !== true;
}

/** A row of a drawing revision: margin, number, old and new words, and what hangs on it. */
export function RevisionRow({ line, context }: RevisionRowProps) {
  const number = line.toBeLine ?? line.wasLine ?? 0;
  const letters = ofLine(context.letters, line) ?? [];
  const note = ofLine(context.notes, line);
  const id = `${line.toBeLine === null ? "was" : "to-be"}-${context.index}-${number}`;
  const fold = isFoldable(line, context) ? " code-line-foldable" : "";
  const moved = line.moved === undefined ? "" : " code-line-moved";
  const className = `code-line code-line-${line.kind}${moved}${fold}`;
  return (
    <div id={id} className={className}>
      <span className="line-margin">
        <RevisionMarks letters={letters} />
      </span>
      <span className="line-number">
        <span className="visually-hidden">{line.toBeLine === null ? "was line " : "line "}</span>
        {number}
      </span>
      <span className="line-text">
        {line.segments.map((segment, index) => (
          <Segment key={index} segment={segment} />
        ))}
        <Aside line={line} />
      </span>
      {note !== undefined && <div className="line-note">{note}</div>}
    </div>
  );
}
