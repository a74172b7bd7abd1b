import { jerkPeakSpeed, jerkRampAcceleration, jerkTimes, trapezoidTimes } from "@/lib/physics/profiles";
import { dutyTorque } from "@/lib/physics/load-torque";
import { conservativePullOut, voltageLimitSpeed } from "@/lib/physics/pull-out";
import { bothMissing, computed, fromText, gather, merged } from "../data";
import { plain, show, showPercent } from "../show";
import type { AxisView, Datum, Missing } from "../types";
import type { QuantityDefinition } from "./definition";
import { speedUnit } from "./geometry";
import { travel, TRAVEL_READS } from "./motion";
import { DEMAND_READS, demandAt, driven, DRIVEN_READS, moveDemand } from "./torque";

/** Where a ramp from rest to the peak speed has least to spare against the policy. */
export interface WeakestPlace {
  readonly ok: true;
  /** m/s (rad/s) */
  readonly speed: number;
  /** m/s² (rad/s²) at that speed. */
  readonly acceleration: number;
  /** N·m of each motor. */
  readonly available: number;
  readonly required: number;
  readonly margin: number;
  /** The policy's margin at that speed. */
  readonly wanted: number;
  /** m/s (rad/s) */
  readonly limitSpeed: number;
  readonly peak: number;
  readonly assumed: readonly string[];
}

/** Speeds looked at between rest and the peak; the voltage-limit speed, where the policy changes, is one more. */
const PLACES = 48;

/** Jerk, m/s³; null where the text has none or 0, and the acceleration is then there at once. */
function jerkOf(axis: AxisView): number | null {
  const found = axis.parameter("jerk");
  return found && found.value > 0 ? found.value : null;
}

interface Course {
  readonly peak: number;
  readonly accelerationAt: (speed: number) => number;
}

/** Peak speed and acceleration over speed of a ramp, jerk-limited where the text states a jerk. */
function course(axis: AxisView, peak: number, acceleration: number): Course {
  const jerk = jerkOf(axis);
  const length = travel(axis);
  if (jerk === null) return { peak, accelerationAt: () => acceleration };
  const reached = length.ok
    ? Math.min(peak, jerkPeakSpeed({ speed: peak, acceleration, jerk, travel: length.value }))
    : peak;
  return {
    peak: reached,
    accelerationAt: (speed) => jerkRampAcceleration({ speed, peak: reached, acceleration, jerk }),
  };
}

/** The place of a ramp with the least margin beyond the policy's, or what is missing; null where nothing is required. */
export function weakestPlace(axis: AxisView): WeakestPlace | Missing | null {
  const motor = driven(axis);
  const demand = moveDemand(axis);
  const top = axis.quantity("peak_speed");
  const lacks = [motor, demand, top].flatMap((part) => (part.ok ? [] : [part]));
  if (!motor.ok || !demand.ok || !top.ok) return lacks.reduce(bothMissing);
  const { peak, accelerationAt } = course(axis, top.value, demand.acceleration);
  const limitSpeed = voltageLimitSpeed(motor.motor) * motor.radius;
  const { torque_margin_below_limit_speed: below, torque_margin_above_limit_speed: above } = axis.policy;
  let weakest: Omit<WeakestPlace, "ok" | "limitSpeed" | "peak" | "assumed"> | null = null;
  for (const speed of places(peak, limitSpeed)) {
    const acceleration = accelerationAt(speed);
    const required = demandAt(demand, acceleration);
    if (!(required > 0)) continue;
    const available = conservativePullOut(motor.motor, speed / motor.radius);
    const margin = available / required - 1;
    const wanted = speed > limitSpeed * (1 + 1e-9) ? above : below;
    if (weakest === null || margin - wanted <= weakest.margin - weakest.wanted)
      weakest = { speed, acceleration, available, required, margin, wanted };
  }
  if (weakest === null) return null;
  const assumed = [motor.assumed, demand.assumed, top.assumed].reduce(merged);
  return { ok: true, ...weakest, limitSpeed, peak, assumed };
}

function places(peak: number, limitSpeed: number): number[] {
  const even = Array.from({ length: PLACES + 1 }, (_, index) => (peak * index) / PLACES);
  const justAbove = limitSpeed * (1 + 1e-6);
  return justAbove < peak ? [...even, justAbove] : even;
}

export const RAMP_TORQUE_MARGIN: QuantityDefinition = {
  reads: [...DRIVEN_READS, ...DEMAND_READS, ...TRAVEL_READS, "jerk"],
  from: ["winding_current_rms", "winding_c", "peak_speed"],
  compute: (axis) => {
    const place = weakestPlace(axis);
    if (place === null) return { ok: false, needs: [], reason: "Nothing is required of the motor." };
    if (!place.ok) return place;
    const { available, required, margin, speed, assumed } = place;
    return computed(
      margin,
      assumed,
      () =>
        `at ${show(speed, speedUnit(axis))}: ${show(available, "N·m")} / ${show(required, "N·m")} − 1 = ${plain(margin)} (${showPercent(margin)})`,
    );
  },
};

interface Move {
  readonly speed: Datum;
  readonly acceleration: Datum;
  readonly travel: Datum;
}

function longestMove(axis: AxisView): { [K in keyof Move]: Move[K] } {
  return {
    speed: fromText(axis, "max_speed", "positive"),
    acceleration: fromText(axis, "acceleration", "positive"),
    travel: travel(axis),
  };
}

export const MOVE_TIME: QuantityDefinition = {
  reads: ["max_speed", "acceleration", "jerk", ...TRAVEL_READS],
  from: [],
  compute: (axis) => {
    const parts = gather(longestMove(axis));
    if (!parts.ok) return parts;
    const jerk = jerkOf(axis);
    const times = jerk === null ? trapezoidTimes(parts.values) : jerkTimes({ ...parts.values, jerk });
    return computed(
      times.total,
      parts.assumed,
      () => `2 · ${show(times.accelerating, "s")} + ${show(times.cruising, "s")} = ${show(times.total, "s")}`,
    );
  },
};

/** The torque of the longest move without a pause: up the ramp, along, and down again. The jerk is left out. */
export const TORQUE_REQUIRED_RMS: QuantityDefinition = {
  reads: [...DEMAND_READS, "max_speed", ...TRAVEL_READS],
  from: [],
  compute: (axis) => {
    const demand = moveDemand(axis);
    const parts = gather(longestMove(axis));
    if (!demand.ok) return parts.ok ? demand : bothMissing(demand, parts);
    if (!parts.ok) return parts;
    const { acceleration } = parts.values;
    const { accelerating, cruising } = trapezoidTimes(parts.values);
    const torques = [acceleration, 0, -acceleration].map((change) => demandAt(demand, change));
    const [up = 0, along = 0, down = 0] = torques;
    const torque = dutyTorque([
      { torque: up, time: accelerating },
      { torque: along, time: cruising },
      { torque: down, time: accelerating },
    ]);
    return computed(
      torque,
      merged(demand.assumed, parts.assumed),
      () =>
        `√((${plain(up)}² · ${plain(accelerating)} s + ${plain(along)}² · ${plain(cruising)} s + ${plain(down)}² · ${plain(accelerating)} s) / ${plain(2 * accelerating + cruising)} s) = ${show(torque, "N·m")}`,
    );
  },
};
