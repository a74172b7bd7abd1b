import { CHAR, isBlank, isLineEnd, isQuote } from "../chars";
import { readScalar, type Scalar } from "../scalar";
import type { ScalarAt } from "../tree";
import { PIECE } from "../types";
import type { Cursor } from "./cursor";

/** A text in quotes (TOML 1.0, “String”) at the cursor, which moves behind it. */
export function readString(cursor: Cursor, kind: typeof PIECE.value | typeof PIECE.key): ScalarAt {
  const start = cursor.at;
  const quote = cursor.text.charAt(start);
  const triple = cursor.startsWith(quote.repeat(3));
  const close = triple ? endOfMultiLine(cursor, quote) : endOfOneLine(cursor, quote);
  const end = close < 0 ? (triple ? cursor.end : cursor.lineEnd()) : close;
  if (close < 0) cursor.fault("unclosed-quote", start, end, "a text in quotes is not closed; close it.");
  const width = triple ? 3 : 1;
  const inner = cursor.text.slice(start + width, close < 0 ? end : end - width);
  const bare = triple ? inner.replace(/^(?:\r\n|\n)/, "") : inner;
  cursor.cut(kind, end);
  const value = quote === "'" ? bare : unescape(cursor, bare, { start, end });
  return { start, end, value: { kind: "text", value } };
}

/** Offset behind the closing quote on this line; -1 for none. */
function endOfOneLine({ text, at, end }: Cursor, quote: string): number {
  for (let i = at + 1; i < end; i++) {
    const code = text.charCodeAt(i);
    if (isLineEnd(code)) return -1;
    if (text.charAt(i) === quote) return i + 1;
    if (code === CHAR.backslash && quote === '"') i++;
  }
  return -1;
}

/** Behind three quotes; up to two more in front of them belong to the text. */
function endOfMultiLine({ text, at, end }: Cursor, quote: string): number {
  let run = 0;
  for (let i = at + 3; i < end; i++) {
    if (text.charAt(i) === quote) {
      run++;
      if (run === 5) return i + 1;
      continue;
    }
    if (run >= 3) return i;
    run = 0;
    if (text.charCodeAt(i) === CHAR.backslash && quote === '"') i++;
  }
  return run >= 3 ? end : -1;
}

const ESCAPE = /\\(?:u([0-9a-fA-F]{4})|U([0-9a-fA-F]{8})|[ \t]*\r?\n[ \t\r\n]*|([^]?))/g;
const SIMPLE: ReadonlyMap<string, string> = new Map([
  ["b", "\b"],
  ["t", "\t"],
  ["n", "\n"],
  ["f", "\f"],
  ["r", "\r"],
  ['"', '"'],
  ["\\", "\\"],
]);

function unescape(cursor: Cursor, text: string, { start, end }: { start: number; end: number }): string {
  if (!text.includes("\\")) return text;
  let wrong: string | null = null;
  const said = text.replace(ESCAPE, (whole: string, short?: string, long?: string, one?: string) => {
    const digits = short ?? long;
    const point = digits === undefined ? null : parseInt(digits, 16);
    const isCharacter = point !== null && point <= 0x10ffff && !(point >= 0xd800 && point <= 0xdfff);
    if (point !== null && isCharacter) return String.fromCodePoint(point);
    if (point === null && one === undefined) return "";
    const simple = SIMPLE.get(one ?? "");
    if (simple === undefined) wrong ??= whole;
    return simple ?? whole;
  });
  if (wrong !== null)
    cursor.fault(
      "not-standard",
      start,
      end,
      `“${String(wrong)}” is no escape of TOML; write a double backslash for one.`,
    );
  return said;
}

const INTEGER =
  /^(?:[+-]?(?:0|[1-9](?:_?\d)*)|0x[0-9a-f](?:_?[0-9a-f])*|0o[0-7](?:_?[0-7])*|0b[01](?:_?[01])*)$/i;
const FLOAT = /^[+-]?(?:0|[1-9](?:_?\d)*)(?:\.\d(?:_?\d)*)?(?:e[+-]?\d(?:_?\d)*)?$/i;
const UNBOUNDED = /^[+-]?(?:inf|nan)$/;
const DATE = /^\d{4}-\d\d-\d\d(?:[Tt ]\d\d:\d\d:\d\d(?:\.\d+)?(?:[Zz]|[+-]\d\d:\d\d)?)?$/;
const TIME = /^\d\d:\d\d:\d\d(?:\.\d+)?$/;

/** A number, truth value, date or time at the cursor; anything else is kept as its plain spelling and is a fault. */
export function readBare(cursor: Cursor, inList: boolean): ScalarAt {
  const { at: start, text } = cursor;
  const end = endOfBare(cursor, inList);
  const raw = text.slice(start, end);
  const value = bareValue(raw);
  cursor.cut(PIECE.value, end);
  if (value) return { start, end, value };
  if (raw === "") {
    cursor.fault("not-standard", start, end, "a value is missing.");
    return { start, end, value: { kind: "none" } };
  }
  cursor.fault("not-standard", start, end, `“${shorten(raw)}” is no value of TOML; put a text in quotes.`);
  return { start, end, value: readScalar(text, start, end, { c: false }) };
}

const LONGEST_QUOTE = 40;

function shorten(raw: string): string {
  return raw.length > LONGEST_QUOTE ? `${raw.slice(0, LONGEST_QUOTE)}…` : raw;
}

/** Up to a comment or the line's end; in a list or an inline table up to a comma or a closing bracket, too. */
function endOfBare({ text, at, end }: Cursor, inList: boolean): number {
  let i = at;
  while (i < end) {
    const code = text.charCodeAt(i);
    if (isLineEnd(code) || code === CHAR.hash) break;
    if (inList && (code === CHAR.comma || code === CHAR.closeBracket || code === CHAR.closeBrace)) break;
    i++;
  }
  while (i > at && isBlank(text.charCodeAt(i - 1))) i--;
  return i;
}

function bareValue(raw: string): Scalar | null {
  if (raw === "true" || raw === "false") return { kind: "boolean", value: raw === "true" };
  if (INTEGER.test(raw) || FLOAT.test(raw)) return numberOf(raw);
  if (UNBOUNDED.test(raw) || DATE.test(raw) || TIME.test(raw)) return { kind: "text", value: raw };
  return null;
}

function numberOf(raw: string): Scalar {
  const value = Number(raw.replaceAll("_", ""));
  return Number.isFinite(value) ? { kind: "number", value, unit: null } : { kind: "text", value: raw };
}

export function opensString(cursor: Cursor): boolean {
  return isQuote(cursor.code);
}
