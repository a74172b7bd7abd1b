import type { ParameterChange } from "./types";

/** Revision letters by path and line (from 1) of one side of a change. */
export type LettersByLine = Map<string, Map<number, string[]>>;

/** Where the revision letters stand in the margin: at the line that held the old value and at the one that holds the new. */
export function lineLetters(changes: readonly ParameterChange[]): {
  was: LettersByLine;
  toBe: LettersByLine;
} {
  const was: LettersByLine = new Map();
  const toBe: LettersByLine = new Map();
  for (const change of changes) {
    if (change.was) add(was, change.was, change.letter);
    if (change.toBe) add(toBe, change.toBe, change.letter);
  }
  return { was, toBe };
}

function add(letters: LettersByLine, { path, line }: { path: string; line: number }, letter: string): void {
  const lines = letters.get(path) ?? new Map<number, string[]>();
  lines.set(line, [...(lines.get(line) ?? []), letter]);
  letters.set(path, lines);
}
