import { findingKey, type Finding } from "@/lib/domain/findings";
import { levelRank } from "@/lib/domain/levels";
import { showText } from "@/lib/domain/units";
import type { ParameterValue } from "@/lib/domain/values";
import { parameterKey } from "./axis-word";
import { isGraver, pairFindings } from "./compare-findings";
import type { Consequence } from "./drift-types";

/** Checks by what a person should hear first when several come out equally grave. */
const FIRST_TOLD = [
  "hold-torque",
  "torque-margin",
  "corner-speed",
  "steps-per-mm",
  "step-rate",
  "driver-junction",
  "mount-temperature",
  "winding-temperature",
  "sense-resistor",
  "braking-voltage",
  "supply-voltage",
  "run-current-driver",
  "run-current-motor",
  "set-point",
  "touch-temperature",
  "resonance",
  "speed-reached",
  "microstep-current",
];

/** What the checks say with one single drifted value put in place of the required one. */
export interface AloneEvaluation {
  readonly value: ParameterValue;
  readonly findings: readonly Finding[];
}

export interface AttributeInput {
  readonly required: readonly Finding[];
  /** With every drifted value in place: levels and numbers are these. */
  readonly actual: readonly Finding[];
  readonly alone: readonly AloneEvaluation[];
}

/**
 * Consequences by parameter (keys as parameterKey gives them). What is worse on the machine as a whole is laid to
 * every value that makes the same check worse by itself; where none does so alone, to those that the check rests on.
 */
export function attributeConsequences({
  required,
  actual,
  alone,
}: AttributeInput): ReadonlyMap<string, Consequence[]> {
  const byParameter = new Map<string, Consequence[]>();
  const worseAlone = alone.map(({ value, findings }) => ({
    value,
    keys: new Set(worsened(required, findings).map(({ toBe }) => findingKey(toBe))),
  }));
  for (const consequence of worsened(required, actual)) {
    const guilty = worseAlone.filter(({ keys }) => keys.has(findingKey(consequence.toBe)));
    const blamed = guilty.length > 0 ? guilty.map(({ value }) => value) : restingOn(consequence.toBe, alone);
    for (const key of blamed.map(parameterKey))
      byParameter.set(key, [...(byParameter.get(key) ?? []), consequence]);
  }
  for (const consequences of byParameter.values()) consequences.sort(byGravity);
  return byParameter;
}

/** Several values that do it only together: those that the check names, else all of its axis, else all. */
function restingOn(finding: Finding, alone: readonly AloneEvaluation[]): ParameterValue[] {
  const values = alone.map(({ value }) => value);
  const onAxis = values.filter(
    ({ axis }) => axis === null || finding.axis === null || axis.toLowerCase() === finding.axis.toLowerCase(),
  );
  const named = onAxis.filter(({ parameter }) => finding.parameters.includes(parameter));
  return [named, onAxis, values].find((list) => list.length > 0) ?? [];
}

function worsened(required: readonly Finding[], other: readonly Finding[]): Consequence[] {
  return pairFindings(required, other).flatMap(({ was, toBe }) =>
    toBe && isWorse(was, toBe) ? [{ was, toBe }] : [],
  );
}

/** Graver, or over or near as before with a margin that is smaller as far as a reader can see. */
function isWorse(was: Finding | null, toBe: Finding): boolean {
  if (was === null || was.level !== toBe.level) return isGraver(was?.level ?? "within", toBe.level);
  if (toBe.level === "within" || toBe.level === "cannot") return false;
  if (was.margin === null || toBe.margin === null || toBe.margin >= was.margin) return false;
  return shownValue(was) !== shownValue(toBe);
}

function shownValue({ value, limit, unit }: Finding): string {
  return [value, limit].map((number) => (number === null ? "" : showText(number, unit))).join("|");
}

/** Gravest first, then what a person should hear first. */
export function byGravity(one: Consequence, other: Consequence): number {
  return levelRank(one.toBe.level) - levelRank(other.toBe.level) || toldRank(one) - toldRank(other);
}

function toldRank({ toBe }: Consequence): number {
  const rank = FIRST_TOLD.indexOf(toBe.ruleId);
  return rank < 0 ? FIRST_TOLD.length : rank;
}
