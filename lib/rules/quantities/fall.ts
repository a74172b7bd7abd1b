import { DETENT_RESERVE, detentForce, fallAcceleration, fallDistance } from "@/lib/physics/gravity";
import { bothMissing, computed, gather, hardware, merged, motorCount } from "../data";
import { plain, show } from "../show";
import type { AxisView, Computed, Missing } from "../types";
import type { QuantityDefinition } from "./definition";
import { accelerationUnit, GEOMETRY_READS, lengthUnit, radius } from "./geometry";
import { INERTIA_READS, moved, shaftInertia, weight, WEIGHT_READS } from "./load";
import { frictionForce } from "./static-position";

export const FALL_READS = [
  ...WEIGHT_READS,
  ...GEOMETRY_READS,
  ...INERTIA_READS,
  "motor.detent_torque_nm",
  "load.friction_n",
  "load.friction_nm",
] as const;

/** What a load does once its current is gone. */
export interface Fall {
  readonly ok: true;
  /** Acceleration of its fall, m/s² (rad/s²); 0 where friction alone carries it. */
  readonly acceleration: number;
  /** Detent torque carries it at rest with its reserve: it counts as held. */
  readonly held: boolean;
  /** Friction and detent torque together may keep it while nothing stirs it. */
  readonly mayStay: boolean;
  readonly assumed: readonly string[];
}

/**
 * The load of an axis without current. Detent torque holds a resting load or lets it go; friction alone is never counted
 * on. Source: Newton's second law; detent torque does no work over a tooth pitch.
 */
export function fall(axis: AxisView): Fall | Missing {
  const parts = gather({
    weight: weight(axis),
    friction: frictionForce(axis),
    motors: motorCount(axis),
    radius: radius(axis),
    mass: moved(axis),
    shaftInertia: shaftInertia(axis),
  });
  const detent = hardware(axis, "motor", "detent_torque_nm");
  if (!parts.ok) return detent.ok ? parts : bothMissing(parts, detent);
  const acceleration = fallAcceleration(parts.values);
  if (!detent.ok)
    return {
      ...detent,
      reason: `Once it moves it falls with ${show(acceleration, accelerationUnit(axis))} without current.`,
    };
  const carried = detentForce({ ...parts.values, detentTorque: detent.value });
  const weightSize = Math.abs(parts.values.weight);
  return {
    ok: true,
    acceleration,
    held: carried >= DETENT_RESERVE * weightSize,
    mayStay: parts.values.friction + carried >= weightSize,
    assumed: parts.assumed,
  };
}

const NO_BRAKE: Computed = {
  ok: false,
  needs: [],
  reason: "No brake ends the fall.",
};

/** From the loss of power until the brake holds. */
export const FALL_DISTANCE: QuantityDefinition = {
  reads: [...FALL_READS, "load.holding_brake", "load.brake_delay_ms"],
  from: [],
  compute: (axis) => {
    const along = weight(axis);
    if (along.ok && along.value === 0) return NOTHING_FALLS;
    if (axis.hardware.load?.holding_brake !== true) return NO_BRAKE;
    const falling = fall(axis);
    const delay = hardware(axis, "load", "brake_delay_ms");
    if (!falling.ok) return delay.ok ? falling : bothMissing(falling, delay);
    if (falling.held) return computed(0, falling.assumed, () => "n·T_detent/r ≥ 2·|W|: the load stays");
    if (!delay.ok) return delay;
    const { acceleration } = falling;
    const distance = fallDistance(acceleration, delay.value / 1000);
    return computed(
      distance,
      merged(falling.assumed, delay.assumed),
      () =>
        `${show(acceleration, accelerationUnit(axis))} · (${plain(delay.value)} ms)² / 2 = ${show(distance, lengthUnit(axis))}`,
    );
  },
};

const NOTHING_FALLS: Computed = { ok: false, needs: [], reason: "No weight lies along the axis." };
