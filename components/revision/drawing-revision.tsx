import type { CSSProperties, ReactNode } from "react";
import { plural } from "@/lib/domain/sentences";
import type { RevisionLine, RevisionSegment, RevisionStretch } from "@/lib/diff/types";
import { RevisionMarks } from "@/components/ui/revision-mark";
import { CodeText } from "./code-text";

type ByLine<T> = Readonly<Record<number, T>>;

export interface DrawingRevisionProps {
  readonly path: string;
  readonly stretches: readonly RevisionStretch[];
  /** Revision letters by line number of the new text, and by line number of the old one for lines that went. */
  readonly letters?:
    | {
        readonly toBe: ByLine<readonly string[]>;
        readonly was: ByLine<readonly string[]>;
      }
    | undefined;
  /** What stands below a line: its comments, the way to add one. Keyed as `letters`. */
  readonly notes?: { readonly toBe: ByLine<ReactNode>; readonly was: ByLine<ReactNode> } | undefined;
  /** Which of the page's texts this is, from 0; sets the lines' addresses. */
  readonly index?: number | undefined;
}

interface LineContext {
  readonly letters: DrawingRevisionProps["letters"];
  readonly notes: DrawingRevisionProps["notes"];
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

/** Said where a firmware reads the same as before. */
function Aside({ line }: { line: RevisionLine }) {
  if (!line.onlySpace || line.kind !== "changed") return null;
  const inLine = line.segments.some(({ kind }) => kind !== "same");
  return (
    <bdi className="line-aside">
      {inLine ? "only spacing or a comment differs" : "only the line end differs"}
    </bdi>
  );
}

/** The value of a keyed record for a line: by its new number, else by its old one. */
function ofLine<T>(
  record: { toBe: ByLine<T>; was: ByLine<T> } | undefined,
  line: RevisionLine,
): T | undefined {
  const found = line.toBeLine === null ? undefined : record?.toBe[line.toBeLine];
  if (found !== undefined || line.kind === "same" || line.wasLine === null) return found;
  return record?.was[line.wasLine];
}

function Line({ line, context }: { line: RevisionLine; context: LineContext }) {
  const number = line.toBeLine ?? line.wasLine ?? 0;
  const letters = ofLine(context.letters, line) ?? [];
  const note = ofLine(context.notes, line);
  const id = `${line.toBeLine === null ? "was" : "to-be"}-${context.index}-${number}`;
  return (
    <li id={id} className={`code-line code-line-${line.kind}`}>
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
    </li>
  );
}

/** The zigzag of a shortened part. */
function BreakLine() {
  return (
    <span className="break-line" aria-hidden="true">
      <svg width="36" height="14" viewBox="0 0 36 14">
        <path d="M0 7h9l5-5.5 8 11L27 7h9" />
      </svg>
    </span>
  );
}

function Closed({ stretch, context }: { stretch: RevisionStretch; context: LineContext }) {
  return (
    <li className="code-break">
      <details>
        <summary>
          <BreakLine />
          <span className="break-words">{plural(stretch.lines.length, "line")} as before</span>
        </summary>
        <ol className="code-lines">
          {stretch.lines.map((line, index) => (
            <Line key={index} line={line} context={context} />
          ))}
        </ol>
      </details>
    </li>
  );
}

/**
 * Was / To be as a drawing revision: one column of text, the old value struck, the new one beside it underlined, the
 * revision letter in the margin. What stays as it was closes with a break line that opens without script.
 */
export function DrawingRevision({ path, stretches, letters, notes, index = 0 }: DrawingRevisionProps) {
  const context: LineContext = { letters, notes, index };
  const numbers = stretches.flatMap(({ lines }) => lines.map((line) => line.toBeLine ?? line.wasLine ?? 0));
  const widest = { "--digits": String(Math.max(1, numbers.at(-1) ?? 1)).length } as CSSProperties;
  return (
    <div className="code-sheet code-revision" role="group" aria-label={`Revision of ${path}`} style={widest}>
      <p className="revision-key" aria-hidden="true">
        <del>was</del> <ins>to be</ins>
      </p>
      <ol className="code-lines">
        {stretches.map((stretch, at) =>
          stretch.closed ? (
            <Closed key={at} stretch={stretch} context={context} />
          ) : (
            stretch.lines.map((line, row) => <Line key={`${at}.${row}`} line={line} context={context} />)
          ),
        )}
      </ol>
    </div>
  );
}
