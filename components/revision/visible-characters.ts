/** A run of a line: plain, or one character that a reader could not see or that would reorder the rest. */
export type VisibleRun =
  | { readonly kind: "plain"; readonly text: string }
  | { readonly kind: "hidden"; readonly text: string; readonly codePoint: string; readonly name: string };

/** Default-ignorable, reordering, control and lone surrogate characters and unusual spaces (Unicode Character Database). */
const CLASS = "(?![ \\t\\n\\r])[\\p{DI}\\p{Bidi_C}\\p{Cc}\\p{Cs}\\p{White_Space}]";
const EVERY = new RegExp(CLASS, "gu");
const ANY = new RegExp(CLASS, "u");

const NAMES: ReadonlyMap<number, string> = new Map([
  [0x00, "zero character"],
  [0x1b, "escape character"],
  [0xa0, "no-break space"],
  [0xad, "soft hyphen"],
  [0x200b, "zero-width space"],
  [0x200c, "zero-width non-joiner"],
  [0x200d, "zero-width joiner"],
  [0x200e, "left-to-right mark"],
  [0x200f, "right-to-left mark"],
  [0x202a, "left-to-right embedding"],
  [0x202b, "right-to-left embedding"],
  [0x202c, "end of a writing direction"],
  [0x202d, "left-to-right override"],
  [0x202e, "right-to-left override"],
  [0x2060, "word joiner"],
  [0x2066, "left-to-right isolate"],
  [0x2067, "right-to-left isolate"],
  [0x2068, "first-strong isolate"],
  [0x2069, "end of an isolate"],
  [0xfeff, "byte order mark"],
]);

function nameOf(code: number, character: string): string {
  const known = NAMES.get(code);
  if (known !== undefined) return known;
  if (/\p{White_Space}/u.test(character)) return "unusual space";
  return /\p{DI}/u.test(character) ? "hidden character" : "control character";
}

/** Cuts a line (without its line end) so that every hidden or reordering character stands alone, to be drawn by its code. */
export function visibleRuns(line: string): VisibleRun[] {
  const runs: VisibleRun[] = [];
  let at = 0;
  for (const { 0: character, index } of line.matchAll(EVERY)) {
    if (index > at) runs.push({ kind: "plain", text: line.slice(at, index) });
    const code = character.codePointAt(0) ?? 0;
    const codePoint = `U+${code.toString(16).toUpperCase().padStart(4, "0")}`;
    runs.push({ kind: "hidden", text: character, codePoint, name: nameOf(code, character) });
    at = index + character.length;
  }
  if (at < line.length) runs.push({ kind: "plain", text: line.slice(at) });
  return runs;
}

/** Whether a line needs cutting at all; most do not. */
export function hasHidden(line: string): boolean {
  return ANY.test(line);
}

/** Blanks and tabs drawn as marks, for a change of nothing but them. */
export function visibleBlanks(text: string): string {
  return text.replace(/ /g, "·").replace(/\t/g, "→\t");
}
