import type { ClearingValue, Finding } from "@/lib/domain/findings";
import type { ParameterValue } from "@/lib/domain/values";
import { evaluateRules } from "@/lib/rules/evaluate-rules";
import { findingKey } from "@/lib/domain/findings";
import { decimalsOf, indexOf, typedAt, typedValue } from "./grid";
import { MOVED } from "./knobs";
import type { SolveInput } from "./types";
import { placeOf, withTyped } from "./with-values";

/**
 * Values that a finding over limit sets to the one number that is right (a scale to what the geometry gives, a current
 * to what its set-point gives): typed numbers by place. They are no matter of more or less, and come first.
 */
export function corrected(input: SolveInput): ReadonlyMap<string, number> {
  const over = evaluateRules(input).findings.filter(({ level }) => level === "over");
  return over.reduce<ReadonlyMap<string, number>>((typed, finding) => {
    const to = finding.clearingValue;
    if (to === null || !(isSetting(to) || finding.ruleId === "set-point")) return typed;
    const stated = input.parameters.find(
      ({ axis, parameter }) => parameter === to.parameter && axis?.toLowerCase() === to.axis?.toLowerCase(),
    );
    if (!stated || typed.has(placeOf(stated)) || input.writable?.(stated) === false) return typed;
    const number = firstClearing(input, { finding, stated, typed, choices: choicesOf(stated, to.value) });
    return number === null ? typed : new Map([...typed, [placeOf(stated), number]]);
  }, new Map());
}

function isSetting({ parameter }: ClearingValue): boolean {
  return !MOVED.has(parameter);
}

/** The steps of the text around the right number, and the number itself where no step is near enough. */
function choicesOf(stated: ParameterValue, value: number): number[] {
  const wanted = typedValue(stated, value);
  const decimals = decimalsOf(stated);
  const nearest = indexOf(wanted, decimals);
  const around = [nearest, nearest - 1, nearest + 1].map((index) => typedAt(index, decimals));
  return [...around, Number(wanted.toPrecision(7))];
}

interface Question {
  readonly finding: Finding;
  readonly stated: ParameterValue;
  readonly typed: ReadonlyMap<string, number>;
  readonly choices: readonly number[];
}

function firstClearing(input: SolveInput, { finding, stated, typed, choices }: Question): number | null {
  const found = choices.find((choice) => {
    const parameters = withTyped(input.parameters, new Map([...typed, [placeOf(stated), choice]]));
    const after = evaluateRules({ ...input, parameters }).findings.find(
      (one) => findingKey(one) === findingKey(finding),
    );
    return after !== undefined && (after.level === "near" || after.level === "within");
  });
  return found ?? null;
}
