import { FREE_FALL, weightAlongAxis } from "@/lib/physics/gravity";
import { forceTorque, opposingForce, preloadTorque, reflectedInertia } from "@/lib/physics/load-torque";
import { computed, gather, given, hardware, motorCount, orDefault } from "../data";
import { plain, show } from "../show";
import type { AxisView, Computed, Datum } from "../types";
import { radius } from "./geometry";

export const WEIGHT_READS = [
  "load.mass_kg",
  "load.incline_deg",
  "load.counterbalance_n",
  "load.gravity_torque_nm",
] as const;

export const FORCE_READS = [
  ...WEIGHT_READS,
  "load.friction_n",
  "load.external_force_n",
  "load.friction_nm",
  "load.external_torque_nm",
] as const;

export const MOVED_READS = ["load.mass_kg", "load.inertia_kgm2"] as const;

export const INERTIA_READS = [
  "motor.rotor_inertia_gcm2",
  "drive_train.inertia_kgm2",
  "axis.motor_count",
  ...MOVED_READS,
] as const;

/** What moves: kg, or kg·m² at the output of a rotary axis. */
export function moved(axis: AxisView): Datum {
  return hardware(axis, "load", axis.kind === "rotary" ? "inertia_kgm2" : "mass_kg");
}

/** Weight along the axis W, N; on a rotary axis its gravity torque, N·m. A missing incline is not level. */
export function weight(axis: AxisView): Computed {
  if (axis.kind === "rotary") {
    const torque = hardware(axis, "load", "gravity_torque_nm");
    return torque.ok ? computed(torque.value, torque.assumed, () => show(torque.value, "N·m")) : torque;
  }
  const parts = gather({
    mass: hardware(axis, "load", "mass_kg"),
    inclineDeg: hardware(axis, "load", "incline_deg"),
    counterbalance: orDefault(hardware(axis, "load", "counterbalance_n"), 0),
  });
  if (!parts.ok) return parts;
  const { mass, inclineDeg, counterbalance } = parts.values;
  const force = weightAlongAxis(parts.values);
  return computed(
    force,
    parts.assumed,
    () =>
      `${show(mass, "kg")} · ${FREE_FALL} m/s² · sin ${plain(inclineDeg)}° − ${show(counterbalance, "N")} = ${show(force, "N")}`,
  );
}

/** Force against the motion F, N; N·m at the output of a rotary axis. */
export function force(axis: AxisView): Datum {
  const rotary = axis.kind === "rotary";
  const parts = gather({
    friction: hardware(axis, "load", rotary ? "friction_nm" : "friction_n"),
    external: orDefault(hardware(axis, "load", rotary ? "external_torque_nm" : "external_force_n"), 0),
    weight: weight(axis),
  });
  if (!parts.ok) return parts;
  return given(opposingForce(parts.values), parts.assumed);
}

export const LOAD_TORQUE_READS = [
  ...FORCE_READS,
  "axis.motor_count",
  "drive_train.efficiency",
  "drive_train.preload_n",
  "drive_train.preload_friction",
] as const;

/** Load torque T_L at each motor, N·m: F/n·r/η, and what the preload of its nut takes where one is given. */
export function loadTorque(axis: AxisView): Datum {
  const parts = gather({
    force: force(axis),
    motors: motorCount(axis),
    radius: radius(axis),
    efficiency: hardware(axis, "drive_train", "efficiency"),
    preload: nutFriction(axis),
  });
  if (!parts.ok) return parts;
  const { motors, radius: r, efficiency, preload } = parts.values;
  const value = forceTorque({ force: parts.values.force / motors, radius: r, efficiency });
  return given(value + preloadTorque({ preload, friction: 1, radius: r }), parts.assumed);
}

/** Friction force of a preloaded nut, N: μ0·F0; 0 where no preload is stated. */
function nutFriction(axis: AxisView): Datum {
  const preload = axis.hardware.drive_train?.preload_n ?? 0;
  if (preload === 0) return given(0);
  const friction = hardware(axis, "drive_train", "preload_friction");
  return friction.ok ? given(friction.value * preload) : friction;
}

/** Inertia of one motor with what sits on its shaft Jm, kg·m². */
export function shaftInertia(axis: AxisView): Datum {
  const parts = gather({
    rotor: hardware(axis, "motor", "rotor_inertia_gcm2"),
    driveTrain: orDefault(hardware(axis, "drive_train", "inertia_kgm2"), 0),
  });
  if (!parts.ok) return parts;
  return given(parts.values.rotor * 1e-7 + parts.values.driveTrain, parts.assumed);
}

/** Inertia at each motor J = Jm + m·r²/n, kg·m². */
export function totalInertia(axis: AxisView): Datum {
  const parts = gather({
    shaft: shaftInertia(axis),
    moved: moved(axis),
    radius: radius(axis),
    motors: motorCount(axis),
  });
  if (!parts.ok) return parts;
  const { shaft, motors } = parts.values;
  const load = reflectedInertia(parts.values.moved, parts.values.radius) / motors;
  return given(shaft + load, parts.assumed);
}
