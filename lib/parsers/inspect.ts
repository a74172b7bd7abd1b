import type { Diagnostic, DiagnosticCode, Severity } from "@/lib/domain/diagnostic";
import { CHAR } from "./chars";
import { diagnosticList } from "./diagnostic-list";
import { Place } from "./place";

type Kind = "hidden" | "space" | "bidirectional" | "control" | "half";

/** Ranges of code points after the Unicode Character Database (Default_Ignorable_Code_Point, Bidi_Control, White_Space, Cc). */
const RANGES: readonly (readonly [number, number, Kind])[] = [
  [0x00, 0x08, "control"],
  [0x0b, 0x0c, "control"],
  [0x0e, 0x1f, "control"],
  [0x7f, 0x9f, "control"],
  [0xa0, 0xa0, "space"],
  [0xad, 0xad, "hidden"],
  [0x34f, 0x34f, "hidden"],
  [0x61c, 0x61c, "bidirectional"],
  [0x115f, 0x1160, "hidden"],
  [0x1680, 0x1680, "space"],
  [0x17b4, 0x17b5, "hidden"],
  [0x180b, 0x180f, "hidden"],
  [0x2000, 0x200a, "space"],
  [0x200b, 0x200d, "hidden"],
  [0x200e, 0x200f, "bidirectional"],
  [0x2028, 0x2029, "space"],
  [0x202a, 0x202e, "bidirectional"],
  [0x202f, 0x202f, "space"],
  [0x205f, 0x205f, "space"],
  [0x2060, 0x2065, "hidden"],
  [0x2066, 0x2069, "bidirectional"],
  [0x206a, 0x206f, "hidden"],
  [0x3000, 0x3000, "space"],
  [0x3164, 0x3164, "hidden"],
  [0xd800, 0xdfff, "half"],
  [0xfe00, 0xfe0f, "hidden"],
  [0xfeff, 0xfeff, "hidden"],
  [0xffa0, 0xffa0, "hidden"],
  [0xfff0, 0xfffb, "hidden"],
  [0x1bca0, 0x1bca3, "hidden"],
  [0x1d173, 0x1d17a, "hidden"],
  [0xe0000, 0xe0fff, "hidden"],
];

const NAMES: ReadonlyMap<number, string> = new Map([
  [0x00, "a zero character"],
  [0x1b, "an escape character"],
  [0x7f, "a delete character"],
  [0x85, "a next-line character"],
  [0xa0, "a no-break space"],
  [0xad, "a soft hyphen"],
  [0x200b, "a zero-width space"],
  [0x200c, "a zero-width non-joiner"],
  [0x200d, "a zero-width joiner"],
  [0x200e, "a left-to-right mark"],
  [0x200f, "a right-to-left mark"],
  [0x202a, "a left-to-right embedding"],
  [0x202b, "a right-to-left embedding"],
  [0x202c, "the end of a writing direction"],
  [0x202d, "a left-to-right override"],
  [0x202e, "a right-to-left override"],
  [0x2060, "a word joiner"],
  [0x2066, "a left-to-right isolate"],
  [0x2067, "a right-to-left isolate"],
  [0x2068, "a first-strong isolate"],
  [0x2069, "the end of an isolate"],
  [0xfeff, "a byte order mark inside the text"],
]);

interface Notice {
  readonly code: DiagnosticCode;
  readonly severity: Severity;
  readonly name: string;
  readonly why: string;
}

const NOTICES: Record<Kind, Notice> = {
  hidden: {
    code: "hidden-character",
    severity: "warning",
    name: "a hidden character",
    why: "No screen shows it, and a key or value with it is another one than it seems.",
  },
  space: {
    code: "hidden-character",
    severity: "note",
    name: "an unusual space",
    why: "It looks like a space, but a firmware may not read it as one.",
  },
  bidirectional: {
    code: "bidirectional-character",
    severity: "warning",
    name: "a control of the writing direction",
    why: "It can make a line look different from what the firmware reads.",
  },
  control: {
    code: "control-character",
    severity: "warning",
    name: "a control character",
    why: "A configuration text has no use for it.",
  },
  half: {
    code: "control-character",
    severity: "warning",
    name: "half of a surrogate pair",
    why: "It is no character and cannot be written to a file.",
  },
};

/** Reports characters that a reader cannot see or that make a line look other than it is. The text is kept as it is. */
export function inspectText(text: string): Diagnostic[] {
  const found = diagnosticList();
  const place = new Place(text);
  for (let i = 0; i < text.length; i++) {
    const unit = text.charCodeAt(i);
    if ((unit >= 32 && unit < 127) || unit === CHAR.lineFeed || unit === CHAR.carriageReturn) continue;
    const point = text.codePointAt(i) ?? unit;
    const kind = i === 0 && point === CHAR.byteOrderMark ? null : kindOf(point);
    const length = point > 0xffff ? 2 : 1;
    if (kind) {
      const { code, severity, name, why } = NOTICES[kind];
      const span = place.span(i, i + length);
      const what = `${NAMES.get(point) ?? name} (U+${point.toString(16).toUpperCase().padStart(4, "0")})`;
      const message = `Line ${span.line}, column ${span.column} has ${what}. ${why} It is kept; delete it if nobody put it there on purpose.`;
      found.add(code, severity, span, message);
    }
    i += length - 1;
  }
  return found.all();
}

function kindOf(point: number): Kind | null {
  let low = 0;
  let high = RANGES.length - 1;
  while (low <= high) {
    const middle = (low + high) >> 1;
    const [from, to, kind] = RANGES[middle] ?? [0, 0, "control"];
    if (point < from) high = middle - 1;
    else if (point > to) low = middle + 1;
    else return kind;
  }
  return null;
}
