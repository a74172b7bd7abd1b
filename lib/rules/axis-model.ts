import type { AxisKind } from "@/lib/domain/axis-kind";
import type { ParameterName } from "@/lib/domain/parameters";
import { fromText, gather, hardware, missing, motorCount, orDefault } from "./data";
import { ratingRms } from "./quantities/current";
import { shaftInertia, moved, weight } from "./quantities/load";
import { travel } from "./quantities/motion";
import { driven } from "./quantities/torque";
import type { AxisView, Datum, Missing, RuleInput } from "./types";
import { ruleContext } from "./view";

/**
 * One axis in SI numbers, for what needs whole curves and not only the table of quantities. Of a rotary axis, travel is
 * in rad, forces are N·m at the output and the moving inertia is kg·m² there.
 */
export interface AxisModel {
  readonly axis: string;
  readonly kind: AxisKind;
  readonly motorCount: number;
  /** Travel for one radian of the motor, m (rad). */
  readonly radius: number;
  readonly supplyVoltage: number;
  /** Ω of one winding at its working temperature, with on-resistance and sense resistance. */
  readonly resistance: number;
  /** Ω of the winding alone at 20 °C. */
  readonly resistanceAt20: number;
  /** H */
  readonly inductance: number;
  /** N·m at rated current, both phases on. */
  readonly holdingTorque: number;
  /** A rms */
  readonly ratedCurrent: number;
  /** A rms as set, even above the rated current. */
  readonly runCurrent: number;
  readonly rotorTeeth: number;
  /** Rotor and drive train at the shaft of one motor, kg·m². */
  readonly motorInertia: number;
  /** Moving mass, kg (kg·m² at the output). */
  readonly movingInertia: number;
  /** Share of 1. */
  readonly efficiency: number;
  /** N (N·m) */
  readonly friction: number;
  /** External load and weight along the axis, signed, N (N·m). */
  readonly steadyLoad: number;
  /** N·m */
  readonly detentTorque: number | null;
  /** A rms */
  readonly holdCurrent: number | null;
  /** m/s (rad/s) */
  readonly maxSpeed: number | null;
  /** m/s² (rad/s²) */
  readonly acceleration: number | null;
  /** m/s³ (rad/s³) */
  readonly jerk: number | null;
  /** m/s (rad/s) */
  readonly cornerSpeed: number | null;
  /** m (rad) */
  readonly travel: number | null;
  readonly microsteps: number | null;
}

export interface KnownAxisModel {
  readonly ok: true;
  readonly value: AxisModel;
  /** Paths of the defaults that the numbers rest on. */
  readonly assumed: readonly string[];
}

/** The numbers of one axis (its name without regard to case), or all that is missing for them. */
export function axisModel(input: RuleInput, axis: string): KnownAxisModel | Missing {
  const view = ruleContext(input).axes.find((known) => known.axis.toLowerCase() === axis.toLowerCase());
  return view === undefined ? missing(`axes.${axis}`) : modelOf(view);
}

function modelOf(view: AxisView): KnownAxisModel | Missing {
  const motor = driven(view);
  const parts = gather({
    motorPart: motor.ok ? { ok: true, value: 0, assumed: motor.assumed } : motor,
    runCurrent: view.quantity("winding_current_rms"),
    ratedCurrent: ratingRms(view, "motor"),
    resistanceAt20: hardware(view, "motor", "resistance_ohm"),
    holdingTorque: hardware(view, "motor", "holding_torque_nm"),
    motorInertia: shaftInertia(view),
    movingInertia: moved(view),
    efficiency: hardware(view, "drive_train", "efficiency"),
    friction: hardware(view, "load", view.kind === "rotary" ? "friction_nm" : "friction_n"),
    external: orDefault(
      hardware(view, "load", view.kind === "rotary" ? "external_torque_nm" : "external_force_n"),
      0,
    ),
    weight: weight(view),
    motorCount: motorCount(view),
  });
  if (!parts.ok) return parts;
  // A missing motor part has made `parts` missing as well.
  if (!motor.ok) return motor;
  const { motorPart: _, external, weight: along, ...values } = parts.values;
  return {
    ok: true,
    assumed: parts.assumed,
    value: {
      axis: view.axis,
      kind: view.kind,
      radius: motor.radius,
      supplyVoltage: motor.motor.voltage,
      resistance: motor.motor.resistance,
      inductance: motor.motor.inductance,
      rotorTeeth: motor.motor.rotorTeeth,
      steadyLoad: external + along,
      ...values,
      ...optional(view),
    },
  };
}

type Optional = Pick<
  AxisModel,
  | "detentTorque"
  | "holdCurrent"
  | "maxSpeed"
  | "acceleration"
  | "jerk"
  | "cornerSpeed"
  | "travel"
  | "microsteps"
>;

function optional(view: AxisView): Optional {
  const stated = (name: ParameterName): number | null => view.parameter(name)?.value ?? null;
  return {
    detentTorque: valueOf(hardware(view, "motor", "detent_torque_nm")),
    holdCurrent: valueOf(view.quantity("hold_current_rms")),
    maxSpeed: stated("max_speed"),
    acceleration: stated("acceleration"),
    jerk: stated("jerk"),
    cornerSpeed: stated("corner_speed"),
    travel: valueOf(travel(view)),
    microsteps: valueOf(fromText(view, "microsteps", "positive")),
  };
}

function valueOf(found: Datum): number | null {
  return found.ok ? found.value : null;
}
