import { canonicalUnit } from "@/lib/domain/units";
import type { ParameterValue } from "@/lib/domain/values";
import { insideValue } from "./grid";

/** A place of a text: values that share one move together. */
export function placeOf({ source }: ParameterValue): string {
  return `${source.path}\u0000${source.start}`;
}

function isInSteps({ typed }: ParameterValue): boolean {
  return typed.unit !== null && canonicalUnit(typed.unit)?.startsWith("steps") === true;
}

/** Steps per unit of travel of an axis by its text: the scale, else the microsteps; null where neither is stated. */
function stepsOf(axis: string | null, parameters: readonly ParameterValue[]): number | null {
  const own = parameters.filter((one) => one.axis?.toLowerCase() === axis?.toLowerCase());
  const found =
    own.find(({ parameter }) => parameter === "steps_per_mm") ??
    own.find(({ parameter }) => parameter === "microsteps");
  return found ? found.value : null;
}

/**
 * The same values as the text would be read if its scale were the one of `now`: what is typed in steps/s means another
 * speed with another number of steps. `before` holds the scale that the values were read with.
 */
export function rescaled(
  values: readonly ParameterValue[],
  before: readonly ParameterValue[],
  now: readonly ParameterValue[],
): ParameterValue[] {
  return values.map((one) => {
    if (!isInSteps(one)) return one;
    const was = stepsOf(one.axis, before);
    const is = stepsOf(one.axis, now);
    if (was === null || is === null || was === is || is === 0) return one;
    return { ...one, value: Number(((one.value * was) / is).toPrecision(12)) };
  });
}

/** The values that a text gives when other numbers are typed at some of its places, in the units that stand there. */
export function withTyped(
  parameters: readonly ParameterValue[],
  typed: ReadonlyMap<string, number>,
): ParameterValue[] {
  const moved = parameters.map((one) => {
    const to = typed.get(placeOf(one));
    if (to === undefined || to === one.typed.value) return one;
    return { ...one, value: insideValue(one, to), typed: { ...one.typed, value: to } };
  });
  return rescaled(moved, parameters, moved);
}
