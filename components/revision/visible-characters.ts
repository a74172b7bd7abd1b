/** A run of a line: plain, or one character that a reader could not see or that would reorder the rest. */
export type VisibleRun =
  | { readonly kind: "plain"; readonly text: string }
  | { readonly kind: "hidden"; readonly text: string; readonly codePoint: string; readonly name: string };

/** Names after the Unicode Standard, chapters 9 and 23; ranges under a common name. */
const NAMES: readonly (readonly [from: number, to: number, name: string])[] = [
  [0x00, 0x08, "control character"],
  [0x0b, 0x1f, "control character"],
  [0x7f, 0x9f, "control character"],
  [0xad, 0xad, "soft hyphen"],
  [0x34f, 0x34f, "combining grapheme joiner"],
  [0x61c, 0x61c, "arabic letter mark"],
  [0x180e, 0x180e, "mongolian vowel separator"],
  [0x200b, 0x200b, "zero width space"],
  [0x200c, 0x200c, "zero width non-joiner"],
  [0x200d, 0x200d, "zero width joiner"],
  [0x200e, 0x200e, "left-to-right mark"],
  [0x200f, 0x200f, "right-to-left mark"],
  [0x2028, 0x2028, "line separator"],
  [0x2029, 0x2029, "paragraph separator"],
  [0x202a, 0x202a, "left-to-right embedding"],
  [0x202b, 0x202b, "right-to-left embedding"],
  [0x202c, 0x202c, "pop directional formatting"],
  [0x202d, 0x202d, "left-to-right override"],
  [0x202e, 0x202e, "right-to-left override"],
  [0x2060, 0x2060, "word joiner"],
  [0x2061, 0x2064, "invisible operator"],
  [0x2066, 0x2066, "left-to-right isolate"],
  [0x2067, 0x2067, "right-to-left isolate"],
  [0x2068, 0x2068, "first strong isolate"],
  [0x2069, 0x2069, "pop directional isolate"],
  [0x206a, 0x206f, "deprecated format character"],
  [0x3164, 0x3164, "hangul filler"],
  [0xfeff, 0xfeff, "zero width no-break space"],
  [0xfff9, 0xfffb, "interlinear annotation"],
  [0xe0000, 0xe007f, "tag character"],
];

const HIDDEN = new RegExp(
  `[${NAMES.map(([from, to]) => `\\u{${from.toString(16)}}-\\u{${to.toString(16)}}`).join("")}]`,
  "gu",
);

function nameOf(code: number): string {
  return NAMES.find(([from, to]) => from <= code && code <= to)?.[2] ?? "hidden character";
}

/** Cuts a line (without its line end) so that every hidden or reordering character stands alone, to be drawn by its code. */
export function visibleRuns(line: string): VisibleRun[] {
  const runs: VisibleRun[] = [];
  let at = 0;
  for (const match of line.matchAll(HIDDEN)) {
    if (match.index > at) runs.push({ kind: "plain", text: line.slice(at, match.index) });
    const code = match[0].codePointAt(0) ?? 0;
    const codePoint = `U+${code.toString(16).toUpperCase().padStart(4, "0")}`;
    runs.push({ kind: "hidden", text: match[0], codePoint, name: nameOf(code) });
    at = match.index + match[0].length;
  }
  if (at < line.length) runs.push({ kind: "plain", text: line.slice(at) });
  return runs;
}

/** Whether a line needs cutting at all; most do not. */
export function hasHidden(line: string): boolean {
  HIDDEN.lastIndex = 0;
  return HIDDEN.test(line);
}

/** Blanks and tabs drawn as marks, for lines where only they differ. */
export function visibleBlanks(text: string): string {
  return text.replace(/ /g, "·").replace(/\t/g, "→\t");
}
