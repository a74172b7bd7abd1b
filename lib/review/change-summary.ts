import type { Finding } from "@/lib/domain/findings";
import { LEVEL_WORDS, levelRank } from "@/lib/domain/levels";
import { needWords } from "@/lib/domain/need-words";
import { parameterLabel } from "@/lib/domain/parameters";
import { joinWords } from "@/lib/domain/sentences";
import { formatNumber, showText } from "@/lib/domain/units";
import { axisWord } from "./axis-word";
import { findingWords } from "./finding-words";
import { gaugeDrawing } from "./gauge-text";
import { showValue } from "./show-value";
import type { Effect, ParameterChange } from "./types";

export interface ChangeSummaryInput {
  readonly changes: readonly ParameterChange[];
  readonly effects: readonly Effect[];
  /** Findings of the configuration to be; those within limits are left out. */
  readonly findings: readonly Finding[];
}

/**
 * A change in plain lines for e-mails: parameters Was → To be, effects with their limit and level in words, and the
 * findings that stand. Numbers in the units that the floor reads. Parts without content are left out.
 */
export function changeSummary({ changes, effects, findings }: ChangeSummaryInput): string[] {
  const standing = findings
    .filter(({ level }) => level !== "within")
    .sort((a, b) => levelRank(a.level) - levelRank(b.level));
  const parts = [
    part("Parameters (was → to be)", changes.map(changeLine)),
    part(
      "Effects (was → to be; in the gauges o is was, * is to be, # the limit)",
      effects.flatMap((effect) => [effectLine(effect), ...effectGauge(effect)]),
    ),
    part(
      "Findings",
      standing.map((finding) => `${LEVEL_WORDS[finding.level]}: ${findingWords(finding)}`),
    ),
  ].filter((lines) => lines.length > 0);
  return parts.flatMap((lines, index) => (index === 0 ? lines : ["", ...lines]));
}

function part(head: string, lines: readonly string[]): string[] {
  return lines.length === 0 ? [] : [head, ...lines.map((line) => `  ${line}`)];
}

function changeLine({ letter, axis, parameter, was, toBe, change }: ParameterChange): string {
  const kind = [was, toBe].some((side) => side?.unit.includes("deg") || side?.unit.includes("rad"))
    ? "rotary"
    : "linear";
  const share = change === null ? "" : ` (${signed(change * 100)} %)`;
  const place = toBe ?? was;
  const side = (value: ParameterChange["was"]) =>
    value === null ? "not in the text" : showValue(parameter, value);
  const where = place === null ? "" : `, ${place.path} line ${place.line}`;
  return `${letter}  ${subject(axis, parameterLabel(parameter, kind))}: ${side(was)} → ${side(toBe)}${share}${where}`;
}

function effectLine(effect: Effect): string {
  const { axis, label, was, toBe, levelToBe, letters, missing } = effect;
  const level = levelToBe === null ? "" : `, ${LEVEL_WORDS[levelToBe]}`;
  const by = letters.length === 0 ? "" : ` (${letters.join(", ")})`;
  const why =
    missing.length === 0 ? "" : `, not known: ${joinWords(missing.map((path) => needWords(path).words))}`;
  const numbers =
    was === null && toBe === null ? "no number" : `${shown(was, effect)} → ${shown(toBe, effect)}`;
  return `${subject(axis, label)}: ${numbers}${limitText(effect)}${level}${why}${by}`;
}

/** The effect drawn in one line of characters, where it has a value and a limit to be held against. */
function effectGauge({ was, toBe, limit, nearLimit, limitSense }: Effect): string[] {
  const drawing = gaugeDrawing({
    reading: { value: toBe, before: was, limit, nearLimit, sense: limitSense },
  });
  return drawing === null ? [] : [`  ${drawing}`];
}

function limitText(effect: Effect): string {
  if (effect.limit === null) return "";
  return `, limit ${effect.limitSense === "lower" ? "≥" : "≤"} ${shown(effect.limit, effect)}`;
}

function shown(value: number | null, { unit }: Effect): string {
  return value === null ? "–" : showText(value, unit);
}

function subject(axis: string | null, words: string): string {
  return axis === null ? words : `${axisWord(axis)} axis, ${words[0]?.toLowerCase() ?? ""}${words.slice(1)}`;
}

function signed(percent: number): string {
  return `${percent > 0 ? "+" : ""}${formatNumber(percent, 3)}`;
}
