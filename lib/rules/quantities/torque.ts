import { peakFromRms } from "@/lib/physics/current-conventions";
import { rotorTeeth } from "@/lib/physics/drive-train";
import { weightTorque } from "@/lib/physics/gravity";
import { accelerationTorque, reflectedInertia } from "@/lib/physics/load-torque";
import { copperFactor } from "@/lib/physics/motor-heat";
import { conservativePullOut, voltageConstant, voltageLimitSpeed } from "@/lib/physics/pull-out";
import type { DrivenMotor } from "@/lib/physics/pull-out";
import { holdingTorqueAt } from "@/lib/physics/static-torque";
import {
  bothMissing,
  computed,
  fromText,
  gather,
  given,
  hardware,
  merged,
  motorCount,
  setPoint,
  supplyVoltage,
} from "../data";
import { plain, show, showRms } from "../show";
import type { AxisView, Computed, Datum, Missing } from "../types";
import { RATED_READS, ratingRms } from "./current";
import type { QuantityDefinition } from "./definition";
import { isClosedLoop, notCovered } from "./open-loop";
import { GEOMETRY_READS, radius, speedUnit } from "./geometry";
import {
  INERTIA_READS,
  LOAD_TORQUE_READS,
  loadTorque,
  moved,
  shaftInertia,
  weight,
  WEIGHT_READS,
} from "./load";

export const HOLDING_READS = ["motor.holding_torque_nm", ...RATED_READS] as const;

export const DRIVEN_READS = [
  ...HOLDING_READS,
  "motor.resistance_ohm",
  "motor.inductance_mh",
  "motor.step_angle_deg",
  "motor.winding_limit_c",
  "driver.rds_on_ohm",
  "driver.set_point.sense_resistance_ohm",
  "supply.voltage_v",
  ...GEOMETRY_READS,
] as const;

/** Holding torque at a current (A rms), N·m. */
export function holdingTorque(axis: AxisView, current: Datum): Computed {
  const parts = gather({
    current,
    holdingTorque: hardware(axis, "motor", "holding_torque_nm"),
    ratedCurrent: ratingRms(axis, "motor"),
  });
  if (!parts.ok) return parts;
  const { current: amperes, holdingTorque: rated, ratedCurrent } = parts.values;
  const torque = holdingTorqueAt(parts.values);
  return computed(
    torque,
    parts.assumed,
    () =>
      `${show(rated, "N·m")} · min(${showRms(amperes)} / ${showRms(ratedCurrent)}, 1) = ${show(torque, "N·m")}`,
  );
}

/**
 * Winding temperature that the torque is reckoned at, °C: the settled one, at most the winding's limit; the limit where
 * it never settles; 20 °C where it cannot be known, and then what is missing for it counts as assumed.
 */
export function torqueTemperature(axis: AxisView): Datum {
  const winding = axis.quantity("winding_c");
  const limit = hardware(axis, "motor", "winding_limit_c");
  if (winding.ok)
    return given(limit.ok ? Math.min(winding.value, limit.value) : winding.value, winding.assumed);
  if (winding.runaway === true) return limit;
  return given(20, winding.needs);
}

export interface Driven {
  readonly ok: true;
  readonly motor: DrivenMotor;
  /** Travel for one radian of the motor, m or rad. */
  readonly radius: number;
  /** °C at which the resistance is taken. */
  readonly temperature: number;
  readonly assumed: readonly string[];
}

/** The motor on its driver and supply, as the pull-out formulas need it; current at most the rated one. */
export function driven(axis: AxisView): Driven | Missing {
  if (isClosedLoop(axis.hardware)) return notCovered(axis.axis);
  const parts = gather({
    voltage: supplyVoltage(axis),
    current: axis.quantity("winding_current_rms"),
    rated: ratingRms(axis, "motor"),
    holding: hardware(axis, "motor", "holding_torque_nm"),
    resistance: hardware(axis, "motor", "resistance_ohm"),
    inductance: hardware(axis, "motor", "inductance_mh"),
    stepAngle: hardware(axis, "motor", "step_angle_deg"),
    onResistance: hardware(axis, "driver", "rds_on_ohm"),
    sense: setPoint(axis, "sense_resistance_ohm"),
    temperature: torqueTemperature(axis),
    radius: radius(axis),
  });
  if (!parts.ok) return parts;
  const { voltage, current, rated, temperature, radius: r } = parts.values;
  const motor: DrivenMotor = {
    voltage,
    resistance:
      parts.values.resistance * copperFactor(temperature) + parts.values.onResistance + parts.values.sense,
    inductance: parts.values.inductance * 1e-3,
    voltageConstant: voltageConstant(parts.values.holding, rated),
    rotorTeeth: rotorTeeth(parts.values.stepAngle),
    peakCurrent: peakFromRms(Math.min(current, rated)),
  };
  return { ok: true, motor, radius: r, temperature, assumed: parts.assumed };
}

function motorWords({ motor, temperature }: Driven): string {
  return `V = ${show(motor.voltage, "V")}, R = ${show(motor.resistance, "Ω")} with the winding at ${show(temperature, "°C")}, L = ${plain(motor.inductance * 1e3)} mH, Ke = ${plain(motor.voltageConstant)} V·s/rad, I_pk = ${show(motor.peakCurrent, "A")}`;
}

export const VOLTAGE_LIMIT_SPEED: QuantityDefinition = {
  reads: DRIVEN_READS,
  from: ["winding_current_rms", "winding_c"],
  compute: (axis) => {
    const motor = driven(axis);
    if (!motor.ok) return motor;
    const speed = voltageLimitSpeed(motor.motor) * motor.radius;
    return computed(
      speed,
      motor.assumed,
      () =>
        `ω at which hypot(R·I_pk + Ke·ω, Nr·ω·L·I_pk) = V, with ${motorWords(motor)}: ${show(speed, speedUnit(axis))}`,
    );
  },
};

export const TORQUE_AVAILABLE: QuantityDefinition = {
  reads: DRIVEN_READS,
  from: ["winding_current_rms", "winding_c", "peak_speed"],
  compute: (axis) => {
    const motor = driven(axis);
    const speed = axis.quantity("peak_speed");
    if (!motor.ok) return speed.ok ? motor : bothMissing(motor, speed);
    if (!speed.ok) return speed;
    const shaft = speed.value / motor.radius;
    const torque = conservativePullOut(motor.motor, shaft);
    return computed(
      torque,
      merged(motor.assumed, speed.assumed),
      () => `pull-out at ${plain(shaft)} rad/s with ${motorWords(motor)}: ${show(torque, "N·m")}`,
    );
  },
};

/** What a move asks of each motor: a steady part, N·m, and an inertia, kg·m², with the efficiency in both. */
export interface MoveDemand {
  readonly ok: true;
  readonly load: number;
  readonly inertia: number;
  /** m (rad) for one radian of the motor. */
  readonly radius: number;
  /** m/s² (rad/s²) */
  readonly acceleration: number;
  readonly assumed: readonly string[];
}

export const DEMAND_READS = [
  ...LOAD_TORQUE_READS,
  ...INERTIA_READS,
  ...GEOMETRY_READS,
  "acceleration",
] as const;

export function moveDemand(axis: AxisView): MoveDemand | Missing {
  const parts = gather({
    load: loadTorque(axis),
    motors: motorCount(axis),
    radius: radius(axis),
    efficiency: hardware(axis, "drive_train", "efficiency"),
    shaft: shaftInertia(axis),
    moved: moved(axis),
    acceleration: fromText(axis, "acceleration"),
  });
  if (!parts.ok) return parts;
  const { load, motors, radius: r, efficiency, shaft, moved: mass, acceleration } = parts.values;
  const inertia = shaft + reflectedInertia(mass, r) / (motors * efficiency);
  return { ok: true, load, inertia, radius: r, acceleration, assumed: parts.assumed };
}

/** Torque of each motor, N·m, at an acceleration of the axis (m/s², rad/s²). */
export function demandAt({ load, inertia, radius: r }: MoveDemand, acceleration: number): number {
  return load + accelerationTorque(inertia, acceleration / r);
}

export const TORQUE_REQUIRED: QuantityDefinition = {
  reads: DEMAND_READS,
  from: [],
  compute: (axis) => {
    const demand = moveDemand(axis);
    if (!demand.ok) return demand;
    const { load, inertia, acceleration, radius: r } = demand;
    const torque = demandAt(demand, acceleration);
    return computed(
      torque,
      demand.assumed,
      () =>
        `${show(load, "N·m")} + ${plain(inertia)} kg·m² · ${plain(acceleration / r)} rad/s² = ${show(torque, "N·m")}`,
    );
  },
};

export const TORQUE_MARGIN: QuantityDefinition = {
  reads: [],
  from: ["torque_available", "torque_required"],
  compute: (axis) => {
    const parts = gather({
      available: axis.quantity("torque_available"),
      required: axis.quantity("torque_required"),
    });
    if (!parts.ok) return parts;
    const { available, required } = parts.values;
    if (required === 0) return NOTHING_REQUIRED;
    const margin = available / required - 1;
    return computed(
      margin,
      parts.assumed,
      () => `${show(available, "N·m")} / ${show(required, "N·m")} − 1 = ${plain(margin)}`,
    );
  },
};

const NOTHING_REQUIRED: Computed = { ok: false, needs: [], reason: "Nothing is required of the motor." };

export const HOLD_TORQUE_MARGIN: QuantityDefinition = {
  reads: [...HOLDING_READS, ...WEIGHT_READS, ...GEOMETRY_READS, "axis.motor_count"],
  from: ["hold_current_rms"],
  compute: (axis) => {
    const along = weight(axis);
    if (along.ok && along.value === 0) return NOTHING_TO_HOLD;
    const holding = holdingTorque(axis, axis.quantity("hold_current_rms"));
    const parts = gather({ along, holding, radius: radius(axis), motors: motorCount(axis) });
    if (!parts.ok) return parts;
    const { holding: torque, radius: r, motors } = parts.values;
    const needed = weightTorque({ weight: parts.values.along, radius: r, motors });
    const margin = torque / needed - 1;
    return computed(
      margin,
      parts.assumed,
      () => `${show(torque, "N·m")} / ${show(needed, "N·m")} − 1 = ${plain(margin)}`,
    );
  },
};

const NOTHING_TO_HOLD: Computed = { ok: false, needs: [], reason: "No weight lies along the axis." };
