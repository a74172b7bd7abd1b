import { diffParameters } from "@/lib/diff/parameters";
import type { ParameterValue } from "@/lib/domain/values";
import { parameterKey } from "./axis-word";
import type { CountedValue } from "./standing";

/** A value that counts on a machine and is not what is required; `required` null: nothing requires it. */
export interface DifferingPair {
  readonly required: ParameterValue | null;
  readonly counted: CountedValue;
  /** (actual − required)/|required|; null where it cannot be given. */
  readonly change: number | null;
}

/** The counted values that mean something else than the required ones; another unit, notation or basis of the same value is the same. */
export function differingPairs(
  required: readonly ParameterValue[],
  counted: readonly CountedValue[],
): DifferingPair[] {
  const wanted = new Map(required.map((value) => [parameterKey(value), value]));
  const values = counted.map(({ value }) => value);
  const actual = withValues(required, values);
  return counted.flatMap((value): DifferingPair[] => {
    const own = wanted.get(parameterKey(value));
    if (!own) return [{ required: null, counted: value, change: null }];
    const mixed = own.unit !== value.value.unit;
    const one = mixed ? inAmperes(own, required) : own;
    const other = mixed ? inAmperes(value.value, actual) : value.value;
    const [difference] = diffParameters([one], [other]);
    return difference ? [{ required: own, counted: value, change: difference.change }] : [];
  });
}

/** The required parameters with other values put in their places; values that nothing requires come last. */
export function withValues(
  required: readonly ParameterValue[],
  values: readonly ParameterValue[],
): ParameterValue[] {
  const left = new Map(values.map((value) => [parameterKey(value), value]));
  const replaced = required.map((value) => {
    const other = left.get(parameterKey(value));
    left.delete(parameterKey(value));
    return other ?? value;
  });
  return [...replaced, ...left.values()];
}

/** A hold current in per cent as the current that it is beside the run current of its own configuration. */
function inAmperes(value: ParameterValue, beside: readonly ParameterValue[]): ParameterValue {
  if (value.parameter !== "hold_current" || value.unit !== "%") return value;
  const run = beside.find(
    ({ axis, parameter }) => parameter === "run_current" && axis?.toLowerCase() === value.axis?.toLowerCase(),
  );
  if (!run) return value;
  return { ...value, value: (run.value * value.value) / 100, unit: run.unit, basis: run.basis };
}
