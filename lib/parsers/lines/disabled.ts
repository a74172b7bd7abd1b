import { canonicalUnit } from "@/lib/domain/units";
import { CHAR, isDigit, isLetter, isQuote, isWordChar } from "../chars";
import type { ParsedValue } from "../types";
import type { LineEntry } from "./line-entry";

const DOLLAR = 36;

/** A name as keys have it: letters, digits, _ . $ - and at least one letter or $. */
export function isName(text: string, start: number, end: number): boolean {
  let named = false;
  for (let i = start; i < end; i++) {
    const code = text.charCodeAt(i);
    if (isLetter(code) || code === DOLLAR) named = true;
    else if (!isWordChar(code) && code !== CHAR.dot && code !== CHAR.minus) return false;
  }
  return named;
}

/** A name that prose would not have: with a digit, an underscore, a dot or a dollar sign. */
export function isTechnical(text: string, start: number, end: number): boolean {
  for (let i = start; i < end; i++) {
    const code = text.charCodeAt(i);
    if (isDigit(code) || code === CHAR.underscore || code === CHAR.dot || code === DOLLAR) return true;
  }
  return false;
}

/**
 * Tells a commented-out key from prose. After `=` any single word or readable value will do; after `:` or
 * white space, where prose is common, it must be a number in a known unit, a truth value, or a list of those.
 */
export function readsAsKey(text: string, entry: LineEntry): boolean {
  const { value, keyEnd, valueStart } = entry;
  if (isPlain(value)) return true;
  const equals = entry.marked && text.slice(keyEnd, valueStart).includes("=");
  if (!equals || value.kind === "none" || value.kind === "number") return false;
  if (value.kind === "list") return true;
  return isQuote(text.charCodeAt(valueStart)) || (value.kind === "text" && !/\s/.test(value.value));
}

function isPlain(value: ParsedValue): boolean {
  if (value.kind === "number") return value.unit === null || canonicalUnit(value.unit) !== null;
  if (value.kind === "list")
    return value.items.length > 0 && value.items.every((item) => isPlain(item.value));
  return value.kind === "boolean";
}
