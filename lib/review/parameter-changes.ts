import type { ParameterValue } from "@/lib/domain/values";
import { diffParameters } from "@/lib/diff/parameters";
import { revisionLetter } from "./revision-letter";
import type { CheckReport, ParameterChange } from "./types";

/**
 * What changed in meaning from one configuration to the other, each with its revision letter, by axis and in the
 * order of the parameter list. `change` is a share of the old value.
 */
export function parameterChanges(before: CheckReport, after: CheckReport): ParameterChange[] {
  return diffParameters(before.parameters, after.parameters).map(
    ({ axis, parameter, was, toBe, change }, index) => ({
      letter: revisionLetter(index),
      axis,
      parameter,
      was: side(was),
      toBe: side(toBe),
      change,
    }),
  );
}

function side(value: ParameterValue | null): ParameterChange["was"] {
  if (value === null) return null;
  const { line, path } = value.source;
  return { value: value.value, unit: value.unit, basis: value.basis, line, path };
}
