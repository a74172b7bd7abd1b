import { peakSpeed } from "@/lib/physics/profiles";
import { fullStepRate, stepRate } from "@/lib/physics/step-rate";
import { axisPath, computed, fromText, gather, given, hardware, missing } from "../data";
import { plain, show, showScale } from "../show";
import type { AxisView, Datum } from "../types";
import type { QuantityDefinition } from "./definition";
import {
  accelerationUnit,
  GEOMETRY_READS,
  isScaleReversed,
  lengthUnit,
  radius,
  scaleInUse,
  scaleUnit,
  speedUnit,
  stepsPerInsideUnit,
} from "./geometry";

export const TRAVEL_READS = ["travel_min", "travel_max", "axis.travel_mm", "axis.travel_deg"] as const;

/** Travel of the axis, m (rad): between the text's ends where it has both, else the machine's own. */
export function travel(axis: AxisView): Datum {
  const least = axis.parameter("travel_min");
  const most = axis.parameter("travel_max");
  if (least && most && most.value > least.value) return given(most.value - least.value);
  const { travel_mm, travel_deg } = axis.hardware;
  if (axis.kind === "rotary")
    return travel_deg === undefined
      ? missing(axisPath(axis, "travel_deg"))
      : given((travel_deg * Math.PI) / 180);
  return travel_mm === undefined ? missing(axisPath(axis, "travel_mm")) : given(travel_mm / 1000);
}

/**
 * Jerk of the text, m/s³ (rad/s³); null where it has none or 0, and the acceleration is then there at once. One below 0
 * is unusable.
 */
export function jerkLimit(axis: AxisView): Datum | null {
  const found = axis.parameter("jerk");
  return !found || found.value === 0 ? null : fromText(axis, "jerk", "positive");
}

export const PEAK_SPEED: QuantityDefinition = {
  reads: ["max_speed", "acceleration", ...TRAVEL_READS],
  from: [],
  compute: (axis) => {
    const speed = fromText(axis, "max_speed");
    const length = travel(axis);
    const unit = speedUnit(axis);
    if (!length.ok)
      return speed.ok ? computed(speed.value, speed.assumed, () => show(speed.value, unit)) : speed;
    const parts = gather({ speed, acceleration: fromText(axis, "acceleration"), travel: length });
    if (!parts.ok) return parts;
    const peak = peakSpeed(parts.values);
    return computed(
      peak,
      parts.assumed,
      () =>
        `min(${show(parts.values.speed, unit)}, √(${show(parts.values.acceleration, accelerationUnit(axis))} · ${show(parts.values.travel, lengthUnit(axis))})) = ${show(peak, unit)}`,
    );
  },
};

/**
 * Speeds at which the axis dwells, m/s (rad/s): its highest first, and the one at which it seeks its reference where the
 * text has one. Ramps pass through all others.
 */
export function dwellSpeeds(axis: AxisView, peak: number): readonly number[] {
  const seeking = fromText(axis, "reference_run_speed", "positive");
  return seeking.ok ? [peak, seeking.value] : [peak];
}

/** Size of the scale in use as a formula has it: of one below 0 as the text states it, between bars. */
function scaleSize(axis: AxisView, scale: number): string {
  const unit = scaleUnit(axis);
  return isScaleReversed(axis) ? `|${showScale(-scale, unit)}|` : showScale(scale, unit);
}

export const STEP_RATE: QuantityDefinition = {
  reads: ["max_speed", "steps_per_mm"],
  from: ["steps_per_mm_expected"],
  compute: (axis) => {
    const parts = gather({ speed: fromText(axis, "max_speed"), scale: scaleInUse(axis) });
    if (!parts.ok) return parts;
    const { speed, scale } = parts.values;
    const rate = stepRate(speed, stepsPerInsideUnit(axis, scale));
    return computed(
      rate,
      parts.assumed,
      () => `${show(speed, speedUnit(axis))} · ${scaleSize(axis, scale)} = ${show(rate, "Hz")}`,
    );
  },
};

export const FULL_STEP_RATE: QuantityDefinition = {
  reads: ["motor.step_angle_deg", ...GEOMETRY_READS],
  from: ["peak_speed"],
  compute: (axis) => {
    const parts = gather({
      speed: axis.quantity("peak_speed"),
      radius: radius(axis),
      stepAngle: hardware(axis, "motor", "step_angle_deg"),
    });
    if (!parts.ok) return parts;
    const { speed, stepAngle } = parts.values;
    const shaft = speed / parts.values.radius;
    const rate = fullStepRate(shaft, stepAngle);
    return computed(
      rate,
      parts.assumed,
      () => `${plain(shaft)} rad/s · 4 · ${plain(90 / stepAngle)} / 2π = ${show(rate, "Hz")}`,
    );
  },
};
