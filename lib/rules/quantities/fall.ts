import { fallAcceleration, fallDistance } from "@/lib/physics/gravity";
import { computed, gather, given, hardware, motorCount } from "../data";
import { plain, show } from "../show";
import type { AxisView, Computed, Datum } from "../types";
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

/** Acceleration, m/s² (rad/s²), with which the axis falls without current. */
export function fall(axis: AxisView): Datum {
  const parts = gather({
    weight: weight(axis),
    friction: frictionForce(axis),
    detentTorque: hardware(axis, "motor", "detent_torque_nm"),
    motors: motorCount(axis),
    radius: radius(axis),
    mass: moved(axis),
    shaftInertia: shaftInertia(axis),
  });
  return parts.ok ? given(fallAcceleration(parts.values), parts.assumed) : parts;
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
    const parts = gather({ fall: fall(axis), delay: hardware(axis, "load", "brake_delay_ms") });
    if (!parts.ok) return parts;
    const { fall: acceleration, delay } = parts.values;
    const distance = fallDistance(acceleration, delay / 1000);
    return computed(
      distance,
      parts.assumed,
      () =>
        `${show(acceleration, accelerationUnit(axis))} · (${plain(delay)} ms)² / 2 = ${show(distance, lengthUnit(axis))}`,
    );
  },
};

const NOTHING_FALLS: Computed = { ok: false, needs: [], reason: "No weight lies along the axis." };
