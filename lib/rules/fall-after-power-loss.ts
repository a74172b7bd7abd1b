import { hint, judged } from "./assessment";
import type { Assessment } from "./assessment";
import { axisRule } from "./check";
import { axisPath, gather, missing } from "./data";
import { fall, FALL_READS } from "./quantities/fall";
import { accelerationUnit, lengthUnit } from "./quantities/geometry";
import { weight } from "./quantities/load";
import { readsOf } from "./quantities/table";
import { show } from "./show";
import type { AxisView } from "./types";

function assess(axis: AxisView): Assessment {
  const along = weight(axis);
  if (along.ok && along.value === 0) return null;
  const falling = fall(axis);
  if (!falling.ok) return falling;
  const unit = accelerationUnit(axis);
  if (falling.value === 0)
    return judged(hint({ value: 0, applies: false, nearLimit: 0, unit: lengthUnit(axis) }), {
      assumed: falling.assumed,
      sentence: () => "Without current friction and detent torque keep the load where it is.",
      formula: () => "|W| ≤ F_f + n·T_detent/r",
    });
  return axis.hardware.load?.holding_brake === true ? braked(axis) : unbraked(axis, falling.value, unit);
}

function unbraked(axis: AxisView, acceleration: number, unit: string): Assessment {
  if (axis.hardware.load?.holding_brake === undefined)
    return {
      ...missing(axisPath(axis, "load.holding_brake")),
      reason: `Without a brake it would fall with ${show(acceleration, unit)}.`,
    };
  return judged(hint({ value: null, applies: true, nearLimit: null, unit: lengthUnit(axis) }), {
    assumed: [],
    sentence: () =>
      `Without current the load falls with ${show(acceleration, unit)} until it meets its end: nothing brakes it.`,
    formula: () => `(|W| − F_f − n·T_detent/r) / (m + n·Jm/r²) = ${show(acceleration, unit)}`,
  });
}

function braked(axis: AxisView): Assessment {
  const parts = gather({ distance: axis.quantity("fall_distance") });
  if (!parts.ok) return parts;
  const { distance } = parts.values;
  const unit = lengthUnit(axis);
  return judged(hint({ value: distance, applies: distance > 0, nearLimit: 0, unit }), {
    assumed: parts.assumed,
    sentence: () =>
      distance > 0
        ? `When the power goes the load falls ${show(distance, unit)} before its brake holds.`
        : "The brake holds at once when the power goes.",
    formula: () => parts.formula("distance"),
  });
}

export const FALL_AFTER_POWER_LOSS = axisRule({
  id: "fall-after-power-loss",
  title: "Fall after a loss of power",
  compares:
    "The weight along the axis with friction and detent torque, and how far the load falls before a brake holds.",
  formula: "a·t²/2 with a = (|W| − F_f − n·T_detent/r)/(m + n·Jm/r²)",
  source: "Newton's second law; the friction of the drive train is not counted on",
  needs: [...FALL_READS, ...readsOf("fall_distance")],
  margin: "near where the load falls at all, never over",
  caution:
    "A driver fault, a tripped protection or a lost supply lets a raised load fall. Block it before hands go under it; this check judges numbers, not safety.",
  cautionAlways: true,
  parameters: () => [],
  assess,
});
