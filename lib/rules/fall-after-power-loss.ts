import { DETENT_RESERVE } from "@/lib/physics/gravity";
import { hint, judged } from "./assessment";
import type { Assessment } from "./assessment";
import { axisRule } from "./check";
import { axisPath, gather, hardware, missing } from "./data";
import { fall, FALL_READS } from "./quantities/fall";
import type { Fall } from "./quantities/fall";
import { accelerationUnit, lengthUnit } from "./quantities/geometry";
import { weight } from "./quantities/load";
import { readsOf } from "./quantities/table";
import { plain, show } from "./show";
import type { AxisView } from "./types";

function assess(axis: AxisView): Assessment {
  const along = weight(axis);
  if (along.ok && along.value === 0) return null;
  const falling = fall(axis);
  if (!falling.ok) return falling;
  if (falling.held) return held(axis, falling);
  return axis.hardware.load?.holding_brake === true ? braked(axis, falling) : unbraked(axis, falling);
}

function held(axis: AxisView, { assumed }: Fall): Assessment {
  return judged(hint({ value: 0, applies: false, nearLimit: 0, unit: lengthUnit(axis) }), {
    assumed,
    sentence: () =>
      `Without current detent torque alone carries at least ${DETENT_RESERVE} times the weight of the resting load.`,
    formula: () => `n·T_detent/r ≥ ${DETENT_RESERVE}·|W|`,
  });
}

/** What becomes of a load that no brake holds. */
function fallWords(axis: AxisView, { acceleration, mayStay }: Fall): string {
  if (acceleration === 0)
    return "Without current friction alone keeps the load where it is, and vibration can set it off: do not count on it.";
  const falls = `Without current the load falls with ${show(acceleration, accelerationUnit(axis))} until it meets its end: nothing brakes it.`;
  return mayStay
    ? `${falls} Friction and detent torque may keep it while it rests; detent torque does not slow it once it moves.`
    : falls;
}

function unbraked(axis: AxisView, falling: Fall): Assessment {
  const { acceleration, assumed } = falling;
  const unit = accelerationUnit(axis);
  if (axis.hardware.load?.holding_brake === undefined)
    return {
      ...missing(axisPath(axis, "load.holding_brake")),
      reason:
        acceleration === 0
          ? "Without a brake friction alone would keep it."
          : `Without a brake it would fall with ${show(acceleration, unit)}.`,
    };
  return judged(hint({ value: null, applies: true, nearLimit: null, unit: lengthUnit(axis) }), {
    assumed,
    sentence: () => fallWords(axis, falling),
    formula: () => `max(0, |W| − F_f) / (m + n·Jm/r²) = ${show(acceleration, unit)}`,
  });
}

function braked(axis: AxisView, { acceleration }: Fall): Assessment {
  const parts = gather({
    distance: axis.quantity("fall_distance"),
    delay: hardware(axis, "load", "brake_delay_ms"),
  });
  if (!parts.ok) return parts;
  const { distance, delay } = parts.values;
  const unit = lengthUnit(axis);
  return judged(hint({ value: distance, applies: delay > 0, nearLimit: 0, unit }), {
    assumed: parts.assumed,
    sentence: () => {
      if (delay === 0) return "The brake holds at once when the power goes.";
      return acceleration === 0
        ? `When the power goes friction alone keeps the load for the ${plain(delay)} ms until its brake holds: do not count on it.`
        : `When the power goes the load falls ${show(distance, unit)} before its brake holds.`;
    },
    formula: () => parts.formula("distance"),
  });
}

export const FALL_AFTER_POWER_LOSS = axisRule({
  id: "fall-after-power-loss",
  title: "Fall after a loss of power",
  compares:
    "Twice the weight along the axis with the detent torque, and how far the load falls before a brake holds.",
  formula: "held where n·T_detent/r ≥ 2·|W|; else a·t²/2 with a = max(0, |W| − F_f)/(m + n·Jm/r²)",
  source:
    "Newton's second law; detent torque does no work over a tooth pitch, so that it holds at rest only, and twice the weight is the product's choice; the friction of the drive train is not counted on",
  needs: [...FALL_READS, ...readsOf("fall_distance")],
  margin: "near where the load falls, or where only friction or a bare detent torque keeps it; never over",
  caution:
    "A driver fault, a tripped protection or a lost supply lets a raised load fall. Block it before hands go under it; this check judges numbers, not safety.",
  cautionAlways: true,
  parameters: () => [],
  assess,
});
