import type { CSSProperties } from "react";
import { plural } from "@/lib/domain/sentences";
import type { RevisionStretch } from "@/lib/diff/types";
import { FoldQuiet } from "./fold-quiet";
import { isFoldable, RevisionRow, type LineContext } from "./revision-row";

export interface DrawingRevisionProps {
  readonly path: string;
  readonly stretches: readonly RevisionStretch[];
  readonly letters?: LineContext["letters"];
  readonly notes?: LineContext["notes"];
  readonly keep?: LineContext["keep"];
  /** Which of the page's texts this is, from 0; sets the lines' addresses. */
  readonly index?: number | undefined;
}

/** The zigzag of a shortened part. */
export function BreakLine() {
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
            <li key={index}>
              <RevisionRow line={line} context={context} />
            </li>
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
export function DrawingRevision({ path, stretches, letters, notes, keep, index = 0 }: DrawingRevisionProps) {
  const context: LineContext = { letters, notes, keep, index };
  const foldable = stretches.flatMap(({ lines }) => lines).filter((line) => isFoldable(line, context)).length;
  const numbers = stretches.flatMap(({ lines }) => lines.map((line) => line.toBeLine ?? line.wasLine ?? 0));
  const widest = { "--digits": String(Math.max(1, numbers.at(-1) ?? 1)).length } as CSSProperties;
  return (
    <div className="code-sheet code-revision" role="group" aria-label={`Revision of ${path}`} style={widest}>
      <p className="revision-key" aria-hidden="true">
        <del>was</del> <ins>to be</ins>
      </p>
      <FoldQuiet count={foldable} />
      <ol className="code-lines">
        {stretches.map((stretch, at) =>
          stretch.closed ? (
            <Closed key={at} stretch={stretch} context={context} />
          ) : (
            stretch.lines.map((line, row) => (
              <li key={`${at}.${row}`}>
                <RevisionRow line={line} context={context} />
              </li>
            ))
          ),
        )}
      </ol>
    </div>
  );
}
