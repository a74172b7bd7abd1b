import { CHAR, closeQuote, isBlank, isDigit, isLetter, isQuote } from "./chars";
import type { ListItem } from "./types";

export type Scalar = ListItem["value"];

/** How a format writes its values. */
export interface Manner {
  /** C literals: suffixes such as `f` and `UL`, a leading 0 for octal; no units. */
  readonly c: boolean;
}

const NONE: Scalar = { kind: "none" };
const BOOLEANS: ReadonlyMap<string, boolean> = new Map([
  ["true", true],
  ["yes", true],
  ["on", true],
  ["false", false],
  ["no", false],
  ["off", false],
]);

/** A value that is no list: number with an optional unit, boolean, quoted or plain text. The range has no outer blanks. */
export function readScalar(text: string, start: number, end: number, manner: Manner): Scalar {
  if (start >= end) return NONE;
  const first = text.charCodeAt(start);
  if (isDigit(first) || first === CHAR.minus || first === CHAR.plus || first === CHAR.dot)
    return readNumber(text, start, end, manner) ?? plain(text, start, end);
  if (isQuote(first) && closeQuote(text, start, end) === end)
    return { kind: "text", value: text.slice(start + 1, end - 1) };
  const length = end - start;
  if (length >= 2 && length <= 5) {
    const truth = BOOLEANS.get(text.slice(start, end).toLowerCase());
    if (truth !== undefined) return { kind: "boolean", value: truth };
  }
  return plain(text, start, end);
}

function plain(text: string, start: number, end: number): Scalar {
  return { kind: "text", value: text.slice(start, end) };
}

function readNumber(text: string, start: number, end: number, manner: Manner): Scalar | null {
  const first = text.charCodeAt(start);
  const signed = first === CHAR.minus || first === CHAR.plus;
  const digits = signed ? start + 1 : start;
  const radix = radixAt(text, digits, end);
  const stop = radix === 10 ? endOfDecimal(text, digits, end) : endOfRadix(text, digits + 2, end, radix);
  if (stop < 0) return null;
  const size =
    radix === 10 ? decimal(text, digits, stop, manner) : parseInt(text.slice(digits + 2, stop), radix);
  if (!Number.isFinite(size)) return null;
  const unit = manner.c ? cSuffix(text, stop, end) : unitAt(text, stop, end);
  if (unit === undefined) return null;
  return { kind: "number", value: first === CHAR.minus ? -size : size, unit };
}

function radixAt(text: string, at: number, end: number): 2 | 10 | 16 {
  if (text.charCodeAt(at) !== CHAR.zero || at + 1 >= end) return 10;
  const mark = text.charCodeAt(at + 1) | 32;
  if (mark === 120) return 16;
  const next = text.charCodeAt(at + 2);
  return mark === 98 && (next === CHAR.zero || next === CHAR.zero + 1) ? 2 : 10;
}

/** End of the hexadecimal or binary digits from `start`; -1 for none. */
function endOfRadix(text: string, start: number, end: number, radix: 2 | 16): number {
  let i = start;
  for (; i < end; i++) {
    const code = text.charCodeAt(i);
    const lower = code | 32;
    const fits = radix === 16 ? isDigit(code) || (lower >= 97 && lower <= 102) : (code & ~1) === CHAR.zero;
    if (!fits) break;
  }
  return i === start ? -1 : i;
}

/** End of digits, point and exponent; -1 where no digit stands. An exponent needs digits of its own. */
function endOfDecimal(text: string, start: number, end: number): number {
  let i = start;
  while (i < end && isDigit(text.charCodeAt(i))) i++;
  let count = i - start;
  if (i < end && text.charCodeAt(i) === CHAR.dot) {
    const fraction = ++i;
    while (i < end && isDigit(text.charCodeAt(i))) i++;
    count += i - fraction;
  }
  if (count === 0) return -1;
  if (i < end && (text.charCodeAt(i) | 32) === 101) {
    let j = i + 1;
    const sign = text.charCodeAt(j);
    if (sign === CHAR.plus || sign === CHAR.minus) j++;
    if (j < end && isDigit(text.charCodeAt(j))) {
      while (j < end && isDigit(text.charCodeAt(j))) j++;
      return j;
    }
  }
  return i;
}

function decimal(text: string, start: number, stop: number, manner: Manner): number {
  if (stop - start <= 15) {
    let whole = 0;
    let i = start;
    for (; i < stop; i++) {
      const code = text.charCodeAt(i);
      if (!isDigit(code)) break;
      whole = whole * 10 + (code - CHAR.zero);
    }
    if (i === stop && !(manner.c && isOctal(text, start, stop))) return whole;
  }
  if (manner.c && isOctal(text, start, stop)) return octal(text, start, stop);
  return Number(text.slice(start, stop));
}

/** A C integer literal with a leading 0 is octal (ISO/IEC 9899, 6.4.4.1). */
function isOctal(text: string, start: number, stop: number): boolean {
  if (stop - start < 2 || text.charCodeAt(start) !== CHAR.zero) return false;
  for (let i = start; i < stop; i++) if (!isDigit(text.charCodeAt(i))) return false;
  return true;
}

function octal(text: string, start: number, stop: number): number {
  let value = 0;
  for (let i = start; i < stop; i++) {
    const digit = text.charCodeAt(i) - CHAR.zero;
    if (digit > 7) return NaN;
    value = value * 8 + digit;
  }
  return value;
}

/** null: nothing but a C suffix follows the number; undefined: something else does. */
function cSuffix(text: string, start: number, end: number): null | undefined {
  if (end - start > 3) return undefined;
  for (let i = start; i < end; i++) {
    const lower = text.charCodeAt(i) | 32;
    if (lower !== 102 && lower !== 108 && lower !== 117) return undefined;
  }
  return null;
}

/** Words that may follow the unit of a current, to say its basis. */
const BASIS_WORDS = ["rms", "peak", "pk"];

/** The unit after a number: null for none, undefined where what follows is no unit, so that the value is no number. */
function unitAt(text: string, stop: number, end: number): string | null | undefined {
  if (stop === end) return null;
  let start = stop;
  while (start < end && isBlank(text.charCodeAt(start))) start++;
  if (!startsUnit(text, start, stop)) return undefined;
  let i = start;
  while (i < end && !isBlank(text.charCodeAt(i))) {
    if (!isUnitChar(text.charCodeAt(i))) return undefined;
    i++;
  }
  if (i === end || BASIS_WORDS.includes(text.slice(i, end).trim().toLowerCase()))
    return text.slice(start, end);
  return undefined;
}

/** A unit begins with a letter, a sign such as % or µ, or, set apart by a blank, with 1/. */
function startsUnit(text: string, start: number, stop: number): boolean {
  const code = text.charCodeAt(start);
  if (isLetter(code) || code === CHAR.percent || code > 127) return true;
  return start > stop && text.startsWith("1/", start);
}

/** Letters, digits (exponents), / ^ . * - _ % and whatever is not ASCII (µ, Ω, ², ·). */
function isUnitChar(code: number): boolean {
  if (isLetter(code) || isDigit(code) || code > 127) return true;
  return (
    code === CHAR.slash ||
    code === CHAR.percent ||
    code === CHAR.dot ||
    code === CHAR.minus ||
    code === CHAR.star ||
    code === CHAR.underscore ||
    code === 94
  );
}

/** Reads a text that is nothing but one value, such as the inside of a quoted value; units are allowed. */
export function readScalarText(text: string): Scalar {
  const trimmed = text.trim();
  return readScalar(trimmed, 0, trimmed.length, { c: false });
}
