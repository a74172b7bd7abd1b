import { jerkPeakSpeed, jerkTravelToReach, travelToReach } from "@/lib/physics/profiles";
import { exceeds, hint, judged } from "./assessment";
import type { Assessment } from "./assessment";
import { axisRule } from "./check";
import { fromText, gather, OUT_OF_RANGE } from "./data";
import { accelerationUnit, jerkUnit, lengthUnit, speedUnit } from "./quantities/geometry";
import { jerkLimit, travel } from "./quantities/motion";
import { readsOf } from "./quantities/table";
import { show } from "./show";
import type { AxisView } from "./types";

function assess(axis: AxisView): Assessment {
  const stated = jerkLimit(axis);
  const parts = gather({
    peak: axis.quantity("peak_speed"),
    speed: fromText(axis, "max_speed"),
    acceleration: fromText(axis, "acceleration"),
    travel: travel(axis),
    ...(stated && { jerk: stated }),
  });
  if (!parts.ok) return parts;
  const { peak, speed } = parts.values;
  const jerk = stated?.ok === true ? stated.value : null;
  const move: Move = { ...parts.values, jerk };
  const reached = jerk === null ? peak : jerkPeakSpeed({ ...move, jerk });
  if (!Number.isFinite(reached)) return OUT_OF_RANGE;
  const short = exceeds(speed, reached);
  const unit = speedUnit(axis);
  // The value is the peak speed of the quantities, which knows no jerk; the jerk only makes the hint apply.
  return judged(hint({ value: peak, applies: short, nearLimit: speed, unit }), {
    assumed: parts.assumed,
    sentence: () => reachedSentence(axis, { move, reached, short }),
    formula: () => {
      const words = jerk === null ? parts.formula("peak") : jerkFormula(axis, { ...move, jerk, reached });
      return short ? `${words} < ${show(speed, unit)}` : words;
    },
  });
}

interface Move {
  readonly speed: number;
  readonly acceleration: number;
  readonly travel: number;
  readonly jerk: number | null;
}

function reachedSentence(
  axis: AxisView,
  { move, reached, short }: { move: Move; reached: number; short: boolean },
): string {
  const [unit, lengths] = [speedUnit(axis), lengthUnit(axis)];
  const way = `its travel of ${show(move.travel, lengths)}${move.jerk === null ? "" : " with the jerk of the text"}`;
  return short
    ? `On ${way} the axis never reaches ${show(move.speed, unit)}: it turns round at ${show(reached, unit)}.${neededTravel(move, lengths)}`
    : `The axis reaches its maximum speed of ${show(move.speed, unit)} on ${way}.`;
}

function neededTravel({ speed, acceleration, jerk }: Move, unit: string): string {
  const needed =
    jerk === null ? travelToReach(speed, acceleration) : jerkTravelToReach({ speed, acceleration, jerk });
  return Number.isFinite(needed) ? ` It would need ${show(needed, unit)}.` : "";
}

/** The law that the speed reached follows from, with its numbers. */
function jerkFormula(axis: AxisView, move: Move & { readonly jerk: number; readonly reached: number }) {
  const { acceleration: a, jerk: j, travel: d, reached } = move;
  const [unit, lengths] = [speedUnit(axis), lengthUnit(axis)];
  return `v · t(v) = ${show(d, lengths)} with ${show(a, accelerationUnit(axis))} and ${show(j, jerkUnit(axis))}, at most ${show(move.speed, unit)}: ${show(reached, unit)}`;
}

export const SPEED_REACHED = axisRule({
  id: "speed-reached",
  title: "Maximum speed reached",
  compares:
    "The highest speed that the travel allows, with the jerk of the text, with the maximum speed of the text.",
  formula:
    "min(v, √(a·d)) = v; with a jerk j: the v_p with v_p·t = d, t = v_p/a + a/j where v_p ≥ a²/j, else 2·√(v_p/j), reaches v",
  source:
    "Kinematics of a move from rest to rest, with a jerk of the S-curve; the value stays the speed without jerk",
  needs: [...readsOf("peak_speed"), "jerk"],
  margin: "near where the maximum speed is never reached, never over",
  caution: null,
  parameters: () => ["max_speed", "acceleration", "jerk", "travel_min", "travel_max"],
  assess,
});
