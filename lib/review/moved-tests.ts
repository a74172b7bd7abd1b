import { parameterLabel } from "@/lib/domain/parameters";
import type { QuantityName } from "@/lib/domain/quantities";
import type { Test } from "@/lib/domain/test-sheets";
import { shownPair } from "./shown-pair";
import type { Effect, ParameterChange } from "./types";

/** A test that a change asks for, since what is predicted of it has moved. */
export interface MovedTest {
  readonly axis: string;
  readonly test: Test;
  /** The predictions that moved, in words: "torque margin 0.91 → 0.62". */
  readonly because: readonly string[];
}

/** Two numbers closer than this share of their size have not moved. */
const SAME = 1e-9;

interface Asks {
  readonly quantities: readonly QuantityName[];
  /** The test, by the effects on those of these quantities that moved. */
  readonly test: (moved: readonly Effect[]) => Test;
}

/** Near or over its limit, or not to be checked: then only a ladder says how far away the boundary is. */
const isDoubtful = ({ levelToBe }: Effect): boolean => levelToBe !== null && levelToBe !== "within";

const ASKED: readonly Asks[] = [
  {
    quantities: ["torque_margin", "ramp_torque_margin", "coupled_torque_margin"],
    test: (moved) => (moved.some(isDoubtful) ? "acceleration_ladder" : "move_run"),
  },
  {
    quantities: ["start_stop_speed"],
    test: (moved) => (moved.some(isDoubtful) ? "corner_ladder" : "corner_run"),
  },
  { quantities: ["hold_torque_margin"], test: () => "hold_run" },
  { quantities: ["case_c", "winding_c", "driver_junction_c"], test: () => "heat_record" },
];

/**
 * Only what moved: the tests whose prediction a change moves, by axis in the order of the effects. A corner speed that
 * changes asks for its test although the start-stop speed stays. Nothing is asked for where nothing moved.
 */
export function movedTests(effects: readonly Effect[], changes: readonly ParameterChange[]): MovedTest[] {
  const axes = [...new Set(effects.flatMap(({ axis }) => axis ?? []))];
  return axes.flatMap((axis) => {
    const own = effects.filter((effect) => effect.axis === axis);
    return ASKED.flatMap(({ quantities, test }) => {
      const moved = own.filter((effect) => quantities.includes(effect.quantity) && hasMoved(effect, changes));
      if (moved.length === 0) return [];
      return [{ axis, test: test(moved), because: moved.map((effect) => because(effect, changes)) }];
    });
  });
}

function hasMoved(effect: Effect, changes: readonly ParameterChange[]): boolean {
  const { was, toBe } = effect;
  if (cornerChange(effect, changes)) return true;
  // Neither side can be predicted, and it rests on what changed: the test is all there is.
  if (was === null || toBe === null) return was !== toBe || effect.letters.length > 0;
  return Math.abs(toBe - was) > SAME * Math.max(Math.abs(was), Math.abs(toBe));
}

function cornerChange({ quantity, letters }: Effect, changes: readonly ParameterChange[]) {
  if (quantity !== "start_stop_speed") return undefined;
  return changes.find(({ parameter, letter }) => parameter === "corner_speed" && letters.includes(letter));
}

function because(effect: Effect, changes: readonly ParameterChange[]): string {
  const { label, unit, was, toBe } = effect;
  const words = lowered(label);
  const corner = cornerChange(effect, changes);
  if (corner?.toBe) {
    const pair = shownPair(corner.was?.value ?? null, corner.toBe.value, corner.toBe.unit);
    return `${lowered(parameterLabel("corner_speed"))} ${pair}`;
  }
  if (toBe === null)
    return was === null ? `${words} cannot be predicted` : `${words} cannot be predicted any more`;
  if (was === null) return `${words} ${shownPair(null, toBe, unit)}, not known before`;
  return `${words} ${shownPair(was, toBe, unit)}`;
}

function lowered(label: string): string {
  return `${label.charAt(0).toLowerCase()}${label.slice(1)}`;
}
