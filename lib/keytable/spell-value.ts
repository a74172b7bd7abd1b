import { parameterDefinition } from "@/lib/domain/parameters";
import { readScalarText } from "@/lib/parsers/scalar";
import type { Place } from "./resolve";
import { spellNumber } from "./spell-number";

/** Number as it stands in a value: sign, hexadecimal or decimal digits (underscores between them), exponent. */
const NUMBER = /[+-]?(?:0x[0-9a-f_]+|0b[01_]+|0o[0-7_]+|(?:\d[\d_]*\.?[\d_]*|\.\d+)(?:e[+-]?[\d_]+)?)/i;

/**
 * New spelling of the value at a place, in the unit that stands there: only the digits change; unit, quotes,
 * brackets and suffix stay. null where the place has no spelling for the value.
 */
export function spellValue(place: Place, typed: number): string | null {
  const { dimension } = parameterDefinition(place.target.rule.parameter);
  if (dimension === "boolean") return spellBoolean(place.raw, typed);
  const { raw } = place;
  const from = numberStart(place);
  const match = NUMBER.exec(withoutEscapes(raw).slice(from));
  if (!match || !isTheValue(place, match[0])) return null;
  const start = from + match.index;
  const spelt = asTyped(place, spellNumber(typed, match[0]), match[0]);
  return raw.slice(0, start) + spelt + raw.slice(start + match[0].length);
}

/** Escapes have digits of their own; a blank in the place of each of their characters keeps the offsets. */
function withoutEscapes(raw: string): string {
  if (!raw.includes("\\")) return raw;
  const escape = /\\(?:u[0-9a-f]{4}|U[0-9a-f]{8}|x[0-9a-f]{2}|[^])/gi;
  return raw.replace(escape, (one) => " ".repeat(one.length));
}

/** Whether the digits found are all of the number, none of it being spelt by an escape. */
function isTheValue({ value, raw }: Place, digits: string): boolean {
  if (!raw.includes("\\")) return true;
  const scalar = value.kind === "text" ? readScalarText(value.value) : value;
  if (scalar.kind !== "number") return true;
  const sign = digits.startsWith("-") ? -1 : 1;
  return sign * Number(digits.replace(/^[+-]/, "").replaceAll("_", "")) === scalar.value;
}

const WITH_FLOATS: readonly string[] = ["toml", "yaml"];

/** A number with a point or an exponent stays one where the format sets such numbers apart from whole ones. */
function asTyped({ document, value }: Place, spelt: string, was: string): string {
  if (value.kind !== "number" || !WITH_FLOATS.includes(document.format)) return spelt;
  const wasFloat = /[.e]/i.test(was) && !/^[+-]?0x/i.test(was);
  return wasFloat && /^[+-]?[\d_]+$/.test(spelt) ? `${spelt}.0` : spelt;
}

/** Microsteps written 1/16 have their number after the stroke. */
function numberStart({ raw, target }: Place): number {
  const divided = target.rule.parameter === "microsteps" ? /^\D*1\s*\/\s*(?=\d)/.exec(raw) : null;
  return divided ? divided[0].length : 0;
}

const PAIRS = [
  ["false", "true"],
  ["no", "yes"],
  ["off", "on"],
  ["0", "1"],
] as const;

/** The other word of the same pair, in the same case. */
function spellBoolean(raw: string, typed: number): string | null {
  const word = /[A-Za-z]+|[01]/.exec(raw);
  const pair = PAIRS.find((words) => words.some((one) => one === word?.[0].toLowerCase()));
  if (!word || !pair) return null;
  const next = inCaseOf(pair[typed === 0 ? 0 : 1], word[0]);
  return raw.slice(0, word.index) + next + raw.slice(word.index + word[0].length);
}

function inCaseOf(word: string, was: string): string {
  if (was === was.toUpperCase()) return word.toUpperCase();
  return was[0] === was[0]?.toUpperCase() ? `${word[0]?.toUpperCase()}${word.slice(1)}` : word;
}
