import { withoutLineEnd } from "./text-lines";
import type { RevisionLine, RevisionStretch } from "./types";

/** A revision without the lines that closed stretches hold: most of a long text, and quick to hand over without them. */
export type OutlineStretch =
  | { readonly closed: false; readonly lines: readonly RevisionLine[] }
  | {
      readonly closed: true;
      /** Numbers of its first line, from 1. */
      readonly wasLine: number;
      readonly toBeLine: number;
      readonly count: number;
    };

export function outlineOf(stretches: readonly RevisionStretch[]): OutlineStretch[] {
  return stretches.map(({ closed, lines }) =>
    closed
      ? {
          closed,
          wasLine: lines[0]?.wasLine ?? 1,
          toBeLine: lines[0]?.toBeLine ?? 1,
          count: lines.length,
        }
      : { closed, lines },
  );
}

/** The lines of a closed stretch, out of the lines of the new text: they are as they were. */
export function openStretch(
  { wasLine, toBeLine, count }: Extract<OutlineStretch, { closed: true }>,
  toBe: readonly string[],
): RevisionLine[] {
  return Array.from({ length: count }, (_, index) => {
    const text = withoutLineEnd(toBe[toBeLine - 1 + index] ?? "");
    return {
      kind: "same",
      wasLine: wasLine + index,
      toBeLine: toBeLine + index,
      segments: text === "" ? [] : [{ kind: "same", text }],
      onlySpace: false,
    };
  });
}
