import type { Finding } from "@/lib/domain/findings";
import { LEVEL_WORDS, type Level } from "@/lib/domain/levels";
import { parameterDefinition, parameterLabel, type ParameterName } from "@/lib/domain/parameters";
import type { Quantity } from "@/lib/domain/quantities";
import { formatNumber } from "@/lib/domain/units";
import type { ParameterValue } from "@/lib/domain/values";
import { RULES } from "@/lib/rules/table";
import { onAxis } from "./axis-word";
import type { Consequence } from "./drift-types";
import { showValue } from "./show-value";
import { shownPair } from "./shown-pair";

/** One side of the comparison: what the machine requires, or what counts on it. */
export interface DriftSide {
  readonly parameters: readonly ParameterValue[];
  readonly quantities: readonly Quantity[];
}

/** Whether checks rest on a parameter, and whether any of them could judge it. */
export type Checked = "judged" | "cannot" | "no_check";

export interface SentenceInput {
  readonly axis: string | null;
  readonly parameter: ParameterName;
  readonly required: ParameterValue | null;
  readonly actual: ParameterValue;
  readonly consequence: Consequence | null;
  readonly checked: Checked;
  readonly sides: { readonly required: DriftSide; readonly actual: DriftSide };
}

/** What a drifted parameter means on the machine, as a technician would say it: "X torque margin 0.91 → 0.07". */
export function driftSentence(input: SentenceInput): string {
  if (input.parameter === "direction_reversed") return onAxis(input.axis, "runs the other way");
  if (input.consequence) return consequenceSentence(input, input.consequence);
  const change = onAxis(input.axis, changeWords(input));
  if (input.checked === "cannot") return `${change}, cannot be checked`;
  if (input.checked === "no_check") return `${change}, no check rests on it`;
  const slower = plainSpeedWords(input);
  return slower === null
    ? `${change}, no effect on a limit`
    : onAxis(input.axis, `${slower}, no other effect`);
}

/** "corner speed 12 → 14 mm/s" */
function changeWords({ parameter, required, actual }: SentenceInput): string {
  const words = lowerLabel(parameter, actual);
  if (required === null) return `${words} ${showValue(parameter, actual)}`;
  const isNumber = parameterDefinition(parameter).dimension !== "boolean";
  if (isNumber && required.unit === actual.unit && required.basis === actual.basis)
    return `${words} ${shownPair(required.value, actual.value, actual.unit)}${basisWord(actual)}`;
  return `${words} ${showValue(parameter, required, 4)} → ${showValue(parameter, actual, 4)}`;
}

function basisWord({ basis }: ParameterValue): string {
  return basis === null ? "" : ` ${basis}`;
}

/** Speeds and accelerations are said by what one sees; the rest by its numbers. */
function plainSpeedWords({ parameter, required, actual }: SentenceInput): string | null {
  if (required === null) return null;
  const more = actual.value > required.value;
  if (parameter === "max_speed") return more ? "faster" : "slower";
  if (parameter === "acceleration") return more ? "accelerates faster" : "accelerates more slowly";
  return null;
}

function consequenceSentence(input: SentenceInput, { was, toBe }: Consequence): string {
  if (toBe.level === "cannot") return cannotSentence(input, toBe);
  const { axis } = toBe;
  if (toBe.ruleId === "hold-torque" && toBe.value !== null && toBe.value < 0)
    return onAxis(axis, fallingWords(toBe.value + 1, toBe.level));
  if (toBe.ruleId === "steps-per-mm") return partsSentence(input, toBe);
  if (toBe.ruleId === "corner-speed") return cornerSentence(was, toBe);
  const words = VALUE_WORDS[toBe.ruleId];
  if (words === undefined || toBe.value === null) return titledSentence(input, toBe, LEVEL_WORDS[toBe.level]);
  return onAxis(axis, `${words} ${shownPair(was?.value ?? null, toBe.value, toBe.unit)}`);
}

/** Only over limit does nothing but the motor hold the load: a holding brake makes it near limit. */
function fallingWords(share: number, level: Level): string {
  const shown = formatNumber(Math.max(0, Math.round(share * 100) / 100));
  return `hold ${shown} of the load: ${level === "over" ? "may fall" : "the brake alone holds it"}`;
}

/** "X current scale 20 → 8: set-point near limit" */
function titledSentence(input: SentenceInput, finding: Finding, verdict: string): string {
  const title = RULES.find(({ id }) => id === finding.ruleId)?.title ?? finding.ruleId;
  const change = onAxis(input.axis, changeWords(input));
  return `${change}: ${title[0]?.toLowerCase() ?? ""}${title.slice(1)} ${verdict}`;
}

/** What the value of a check is called in a sentence. */
const VALUE_WORDS: Readonly<Record<string, string>> = {
  "torque-margin": "torque margin",
  "hold-torque": "hold torque margin",
  "step-rate": "step rate",
  "driver-junction": "driver junction",
  "mount-temperature": "motor case",
  "touch-temperature": "motor case",
  "winding-temperature": "winding",
  "sense-resistor": "sense resistor",
  "braking-voltage": "bus voltage after braking",
  "supply-voltage": "supply voltage",
  "run-current-driver": "winding current",
  "run-current-motor": "winding current",
  "speed-reached": "speed reached",
};

function cornerSentence(was: Finding | null, toBe: Finding): string {
  const moved = was === null || was.value !== toBe.value;
  if (toBe.value === null || toBe.limit === null) return onAxis(toBe.axis, "corner speed over its limit");
  if (moved) return onAxis(toBe.axis, `corner speed ${shownPair(was?.value ?? null, toBe.value, toBe.unit)}`);
  return onAxis(toBe.axis, `start-stop speed ${shownPair(was.limit, toBe.limit, toBe.unit)}`);
}

/** Parts come out short or long by what steps per mm and geometry now make of a commanded millimetre. */
function partsSentence({ sides }: SentenceInput, { axis, sentence }: Finding): string {
  const [required, actual] = [scaleError(sides.required, axis), scaleError(sides.actual, axis)];
  if (required === null || actual === null) return sentence;
  const ratio = actual / required;
  if (ratio > 1.5 || ratio < 0.67) return onAxis(axis, `moves ${formatNumber(ratio, 3)} times as far`);
  const share = formatNumber(Math.abs(ratio - 1) * 100, 2);
  return onAxis(axis, `parts ${share} % ${ratio < 1 ? "short" : "long"}`);
}

function scaleError({ parameters, quantities }: DriftSide, axis: string | null): number | null {
  const onThisAxis = (place: { readonly axis: string | null }) =>
    place.axis?.toLowerCase() === axis?.toLowerCase();
  const scale = parameters.find((value) => value.parameter === "steps_per_mm" && onThisAxis(value));
  const expected = quantities.find(
    ({ name, ...place }) => name === "steps_per_mm_expected" && onThisAxis(place),
  );
  return scale && expected ? scale.value / expected.value : null;
}

function cannotSentence(input: SentenceInput, finding: Finding): string {
  const { parameter, actual, required } = input;
  if (required?.basis && actual.basis === null)
    return onAxis(input.axis, `${lowerLabel(parameter, actual)} has no basis, peak or rms`);
  return titledSentence(input, finding, "cannot be checked");
}

/** The label inside a sentence: "corner speed". */
export function lowerLabel(parameter: ParameterName, value: { readonly unit: string } | null = null): string {
  const label = parameterLabel(parameter, value?.unit === "1/deg" ? "rotary" : "linear");
  return `${label[0]?.toLowerCase() ?? ""}${label.slice(1)}`;
}
