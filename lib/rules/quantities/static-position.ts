import { rotorTeeth } from "@/lib/physics/drive-train";
import { positionError } from "@/lib/physics/static-torque";
import { axisPath, computed, gather, given, hardware, missing, motorCount, orDefault } from "../data";
import { plain, show } from "../show";
import type { AxisView, Datum, Missing } from "../types";
import type { CurrentParameter } from "./set-point-current";
import type { QuantityDefinition } from "./definition";
import { GEOMETRY_READS, lengthUnit, radius } from "./geometry";
import { FORCE_READS, weight } from "./load";
import { HOLDING_READS, holdingTorque } from "./torque";

/**
 * The current at standstill: the hold current where the text states one, else the run current. That a driver without a
 * stated hold current keeps its run current is an assumption, which `standstillLoad` names, or refuses where a weight
 * or an external force pulls on the axis. Source: common practice; many drivers lower their current by themselves.
 */
export function standstillCurrent(axis: AxisView): CurrentParameter {
  return axis.parameter("hold_current") || axis.parameter("hold_scale") ? "hold_current" : "run_current";
}

/** Loads at standstill, N·m at each motor, beside what it can hold. */
export interface StandstillLoad {
  readonly ok: true;
  /** Weight and external force, which never rest. */
  readonly steady: number;
  /** Friction, which only keeps the axis where it happens to be. */
  readonly friction: number;
  readonly holding: number;
  readonly radius: number;
  readonly assumed: readonly string[];
}

export function standstillLoad(axis: AxisView): StandstillLoad | Missing {
  const parts = gather({
    holding: standstillTorque(axis),
    stated: statedStandstill(axis),
    friction: frictionForce(axis),
    external: externalForce(axis),
    weight: weight(axis),
    motors: motorCount(axis),
    radius: radius(axis),
  });
  if (!parts.ok) return parts;
  const { holding, friction, external, motors, radius: r } = parts.values;
  const perMotor = r / motors;
  return {
    ok: true,
    steady: Math.abs(external + parts.values.weight) * perMotor,
    friction: friction * perMotor,
    holding,
    radius: r,
    assumed: parts.assumed,
  };
}

/**
 * The hold current is a datum of its own: where the text has none, nobody knows what a driver lowers by itself. Under
 * friction alone the run current may stand in for it, and counts as assumed; under a load that never rests nothing may.
 */
function statedStandstill(axis: AxisView): Datum {
  if (standstillCurrent(axis) === "hold_current") return given(0);
  const path = axisPath(axis, "hold_current");
  const pull = gather({ external: externalForce(axis), weight: weight(axis) });
  const pulled = pull.ok && (pull.values.external !== 0 || pull.values.weight !== 0);
  return pulled ? missing(path) : given(0, [path]);
}

function standstillTorque(axis: AxisView) {
  const name = standstillCurrent(axis);
  return holdingTorque(
    axis,
    axis.quantity(name === "hold_current" ? "hold_current_rms" : "winding_current_rms"),
  );
}

/** N, or N·m at the output of a rotary axis. */
export function frictionForce(axis: AxisView): Datum {
  return hardware(axis, "load", axis.kind === "rotary" ? "friction_nm" : "friction_n");
}

/** N, or N·m at the output of a rotary axis; signed as the weight. */
export function externalForce(axis: AxisView): Datum {
  return orDefault(
    hardware(axis, "load", axis.kind === "rotary" ? "external_torque_nm" : "external_force_n"),
    0,
  );
}

export const STANDSTILL_READS = [
  ...HOLDING_READS,
  ...FORCE_READS,
  ...GEOMETRY_READS,
  "axis.motor_count",
] as const;

export const STATIC_POSITION_ERROR: QuantityDefinition = {
  reads: [...STANDSTILL_READS, "motor.step_angle_deg"],
  from: ["winding_current_rms", "hold_current_rms"],
  compute: (axis) => {
    const load = standstillLoad(axis);
    const stepAngle = hardware(axis, "motor", "step_angle_deg");
    if (!load.ok) return load;
    if (!stepAngle.ok) return stepAngle;
    const { steady, friction, holding, radius: r, assumed } = load;
    const teeth = rotorTeeth(stepAngle.value);
    const angle = positionError({ load: steady + friction, holdingTorque: holding, rotorTeeth: teeth });
    if (angle === null) return NO_REST;
    return computed(
      angle * r,
      assumed,
      () =>
        `asin(${show(steady + friction, "N·m")} / ${show(holding, "N·m")}) / ${plain(teeth)} · r = ${show(angle * r, lengthUnit(axis))}`,
    );
  },
};

const NO_REST: Missing = {
  ok: false,
  needs: [],
  reason: "The load is greater than the torque at standstill: there is no position of rest.",
};
