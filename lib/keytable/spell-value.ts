import { parameterDefinition } from "@/lib/domain/parameters";
import type { Place } from "./resolve";
import { spellNumber } from "./spell-number";

/** Number as it stands in a value: sign, hexadecimal or decimal digits, exponent. */
const NUMBER = /[+-]?(?:0x[0-9a-f]+|0b[01]+|(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?)/i;

/**
 * New spelling of the value at a place, in the unit that stands there: only the digits change; unit, quotes,
 * brackets and suffix stay. null where the place has no spelling for the value.
 */
export function spellValue(place: Place, typed: number): string | null {
  const { dimension } = parameterDefinition(place.target.rule.parameter);
  if (dimension === "boolean") return spellBoolean(place.raw, typed);
  const { raw } = place;
  const from = numberStart(place);
  const match = NUMBER.exec(raw.slice(from));
  if (!match) return null;
  const start = from + match.index;
  return raw.slice(0, start) + spellNumber(typed, match[0]) + raw.slice(start + match[0].length);
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
