import { afterLineEnd, CHAR, isBlank, isLineEnd } from "../chars";
import type { Pieces } from "../pieces";
import { PIECE } from "../types";

/** One field: the stretch of its spelling without outer blanks, and what it says. */
export interface Field {
  readonly start: number;
  readonly end: number;
  readonly said: string;
  readonly quoted: boolean;
}

export interface CsvFault {
  readonly start: number;
  readonly end: number;
  readonly kind: "unclosed-quote" | "after-quote";
}

export interface Records {
  readonly records: readonly (readonly Field[])[];
  readonly faults: readonly CsvFault[];
}

const DELIMITERS = [CHAR.comma, CHAR.semicolon, CHAR.tab];

/** The sign between the fields: of comma, semicolon and tab the one that the first line has most of. */
export function delimiterOf(text: string): number {
  const counts = new Map<number, number>(DELIMITERS.map((code) => [code, 0]));
  let inQuotes = false;
  let begun = false;
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i);
    if (code === CHAR.doubleQuote) inQuotes = !inQuotes;
    if (inQuotes) continue;
    if (isLineEnd(code) && begun) break;
    begun ||= !isLineEnd(code) && code !== CHAR.byteOrderMark;
    const count = counts.get(code);
    if (count !== undefined) counts.set(code, count + 1);
  }
  return DELIMITERS.reduce((best, code) => ((counts.get(code) ?? 0) > (counts.get(best) ?? 0) ? code : best));
}

/** Cuts a text into records of fields (RFC 4180). Empty lines and lines that begin with `#` are no records. */
export function cutRecords(text: string, delimiter: number, pieces: Pieces): Records {
  const records: Field[][] = [];
  const faults: CsvFault[] = [];
  let at = text.charCodeAt(0) === CHAR.byteOrderMark ? 1 : 0;
  pieces.put(PIECE.space, 0, at);
  while (at < text.length) {
    if (text.charCodeAt(at) === CHAR.hash) {
      const end = endOfLine(text, at);
      pieces.put(PIECE.comment, at, end);
      at = end;
    } else if (!isLineEnd(text.charCodeAt(at))) {
      const fields: Field[] = [];
      at = cutRecord({ text, delimiter, pieces, faults }, at, fields);
      if (fields.length > 1 || fields[0]?.said !== "") records.push(fields);
    }
    const after = afterLineEnd(text, at);
    pieces.put(PIECE.lineEnd, at, after);
    at = after;
  }
  return { records, faults };
}

function endOfLine(text: string, start: number): number {
  let i = start;
  while (i < text.length && !isLineEnd(text.charCodeAt(i))) i++;
  return i;
}

interface Cutting {
  readonly text: string;
  readonly delimiter: number;
  readonly pieces: Pieces;
  readonly faults: CsvFault[];
}

/** Offset of the line end behind the record. */
function cutRecord(cutting: Cutting, start: number, fields: Field[]): number {
  const { text, delimiter, pieces } = cutting;
  let at = start;
  for (;;) {
    const from = skip(text, at, delimiter);
    pieces.put(PIECE.space, at, from);
    const quoted = text.charCodeAt(from) === CHAR.doubleQuote;
    const field = quoted ? quotedField(cutting, from) : bareField(cutting, from);
    pieces.put(fields.length === 0 ? PIECE.key : PIECE.value, field.start, field.end);
    fields.push(field);
    at = toDelimiter(cutting, field.end);
    if (at >= text.length || text.charCodeAt(at) !== delimiter) return at;
    pieces.put(PIECE.separator, at, at + 1);
    at++;
  }
}

function skip(text: string, start: number, delimiter: number): number {
  let i = start;
  while (isBlank(text.charCodeAt(i)) && text.charCodeAt(i) !== delimiter) i++;
  return i;
}

function quotedField({ text, faults }: Cutting, start: number): Field {
  let i = start + 1;
  while (i < text.length) {
    if (text.charCodeAt(i) === CHAR.doubleQuote) {
      if (text.charCodeAt(i + 1) !== CHAR.doubleQuote) break;
      i++;
    }
    i++;
  }
  if (i < text.length) {
    const said = text.slice(start + 1, i).replaceAll('""', '"');
    return { start, end: i + 1, said, quoted: true };
  }
  faults.push({ start, end: text.length, kind: "unclosed-quote" });
  return { start, end: text.length, said: text.slice(start + 1), quoted: true };
}

function bareField({ text, delimiter }: Cutting, start: number): Field {
  let i = start;
  while (i < text.length && text.charCodeAt(i) !== delimiter && !isLineEnd(text.charCodeAt(i))) i++;
  while (i > start && isBlank(text.charCodeAt(i - 1))) i--;
  return { start, end: i, said: text.slice(start, i), quoted: false };
}

/** Blanks behind a field; anything else behind a closing quote does not belong there. */
function toDelimiter({ text, delimiter, pieces, faults }: Cutting, start: number): number {
  const from = skip(text, start, delimiter);
  pieces.put(PIECE.space, start, from);
  let i = from;
  while (i < text.length && text.charCodeAt(i) !== delimiter && !isLineEnd(text.charCodeAt(i))) i++;
  if (i > from) faults.push({ start: from, end: i, kind: "after-quote" });
  pieces.put(PIECE.unread, from, i);
  return i;
}
