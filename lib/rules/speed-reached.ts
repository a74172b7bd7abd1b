import { travelToReach } from "@/lib/physics/profiles";
import { exceeds, hint, judged } from "./assessment";
import type { Assessment } from "./assessment";
import { axisRule } from "./check";
import { fromText, gather } from "./data";
import { lengthUnit, speedUnit } from "./quantities/geometry";
import { travel } from "./quantities/motion";
import { readsOf } from "./quantities/table";
import { show } from "./show";
import type { AxisView } from "./types";

function assess(axis: AxisView): Assessment {
  const parts = gather({
    peak: axis.quantity("peak_speed"),
    speed: fromText(axis, "max_speed"),
    acceleration: fromText(axis, "acceleration"),
    travel: travel(axis),
  });
  if (!parts.ok) return parts;
  const { peak, speed, acceleration, travel: length } = parts.values;
  const short = exceeds(speed, peak);
  const [unit, lengths] = [speedUnit(axis), lengthUnit(axis)];
  return judged(hint({ value: peak, applies: short, nearLimit: speed, unit }), {
    assumed: parts.assumed,
    sentence: () =>
      short
        ? `On its travel of ${show(length, lengths)} the axis never reaches ${show(speed, unit)}: it turns round at ${show(peak, unit)}.${neededTravel(speed, acceleration, lengths)}`
        : `The axis reaches its maximum speed of ${show(speed, unit)} on its travel of ${show(length, lengths)}.`,
    formula: () => (short ? `${parts.formula("peak")} < ${show(speed, unit)}` : parts.formula("peak")),
  });
}

function neededTravel(speed: number, acceleration: number, unit: string): string {
  const needed = travelToReach(speed, acceleration);
  return Number.isFinite(needed) ? ` It would need ${show(needed, unit)}.` : "";
}

export const SPEED_REACHED = axisRule({
  id: "speed-reached",
  title: "Maximum speed reached",
  compares: "The highest speed that the travel allows with the maximum speed of the text.",
  formula: "min(v, √(a·d)) = v",
  source: "Kinematics of a move from rest to rest",
  needs: readsOf("peak_speed"),
  margin: "near where the maximum speed is never reached, never over",
  caution: null,
  parameters: () => ["max_speed", "acceleration", "travel_min", "travel_max"],
  assess,
});
