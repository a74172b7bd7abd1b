import { z } from "zod";
import type { AxisKind } from "./axis-kind";
import type { Dimension } from "./units";

export const AXIS_PARAMETERS = [
  "run_current",
  "hold_current",
  "reference_voltage",
  "current_scale",
  "hold_scale",
  "sense_resistance",
  "microsteps",
  "steps_per_mm",
  "max_speed",
  "acceleration",
  "jerk",
  "corner_speed",
  "corner_deviation",
  "travel_min",
  "travel_max",
  "reference_run_speed",
  "pulse_width",
  "direction_setup",
  "direction_reversed",
  "driver_interpolation",
  "standstill_delay",
] as const;
export const MACHINE_PARAMETERS = ["supply_voltage", "max_step_rate"] as const;
export const PARAMETER_NAMES = [...AXIS_PARAMETERS, ...MACHINE_PARAMETERS] as const;

export const parameterNameSchema = z.enum(PARAMETER_NAMES);
export type ParameterName = z.infer<typeof parameterNameSchema>;

export interface ParameterDefinition {
  readonly name: ParameterName;
  readonly scope: "axis" | "machine";
  readonly dimension: Dimension;
  /** Words for tables and sentences; no unit. */
  readonly label: string;
  /** Column head of the floor, at most nine characters. */
  readonly short: string;
  readonly description: string;
}

function axis(
  name: ParameterName,
  dimension: Dimension,
  label: string,
  short: string,
  description: string,
): ParameterDefinition {
  return { name, scope: "axis", dimension, label, short, description };
}

const DEFINITIONS: readonly ParameterDefinition[] = [
  axis(
    "run_current",
    "current",
    "Run current",
    "current",
    "Current in each winding while the axis moves; peak or rms as its basis says.",
  ),
  axis(
    "hold_current",
    "current",
    "Hold current",
    "hold",
    "Current in each winding at standstill; in per cent it is a share of the run current.",
  ),
  axis(
    "reference_voltage",
    "voltage",
    "Reference voltage",
    "Vref",
    "Voltage that sets the trip current through gain and sense resistor.",
  ),
  axis(
    "current_scale",
    "count",
    "Current scale",
    "scale",
    "Register step that sets the run current, counted from 0.",
  ),
  axis(
    "hold_scale",
    "count",
    "Hold scale",
    "hold scale",
    "Register step that sets the hold current, counted from 0.",
  ),
  axis(
    "sense_resistance",
    "resistance",
    "Sense resistance",
    "sense R",
    "The sense resistance that the firmware reckons with; the machine's own resistor counts.",
  ),
  axis("microsteps", "count", "Microsteps", "µsteps", "Microsteps in one full step."),
  axis(
    "steps_per_mm",
    "scale",
    "Steps per mm",
    "steps/mm",
    "Step pulses for one millimetre of travel; for a rotary axis, for one degree.",
  ),
  axis("max_speed", "speed", "Maximum speed", "speed", "The highest speed the firmware will command."),
  axis("acceleration", "acceleration", "Acceleration", "accel.", "The acceleration the firmware commands."),
  axis("jerk", "jerk", "Jerk", "jerk", "Rate of change of the acceleration."),
  axis(
    "corner_speed",
    "speed",
    "Corner speed",
    "corner",
    "The largest jump of this axis's speed at a corner.",
  ),
  axis("corner_deviation", "length", "Corner deviation", "corner d.", "How far a corner may be cut."),
  axis("travel_min", "length", "Travel, lower end", "min", "Lower end of the software travel."),
  axis("travel_max", "length", "Travel, upper end", "max", "Upper end of the software travel."),
  axis(
    "reference_run_speed",
    "speed",
    "Reference run speed",
    "ref. run",
    "Speed at which the axis seeks its reference switch.",
  ),
  axis("pulse_width", "time", "Pulse width", "pulse", "Length of the high part of a step pulse."),
  axis(
    "direction_setup",
    "time",
    "Direction set-up",
    "dir. set",
    "Time between a change of direction and the next step pulse.",
  ),
  axis(
    "direction_reversed",
    "boolean",
    "Direction reversed",
    "reversed",
    "Whether the direction signal is inverted.",
  ),
  axis(
    "driver_interpolation",
    "boolean",
    "Driver interpolation",
    "interp.",
    "Whether the driver fills in microsteps between step pulses.",
  ),
  axis(
    "standstill_delay",
    "time",
    "Standstill delay",
    "delay",
    "Time at standstill before the hold current takes over.",
  ),
  {
    name: "supply_voltage",
    scope: "machine",
    dimension: "voltage",
    label: "Supply voltage",
    short: "supply",
    description: "Motor supply voltage that the text states.",
  },
  {
    name: "max_step_rate",
    scope: "machine",
    dimension: "frequency",
    label: "Maximum step rate",
    short: "step rate",
    description: "Highest step rate that the firmware allows.",
  },
];

const BY_NAME = new Map(DEFINITIONS.map((definition) => [definition.name, definition]));

export const PARAMETERS = DEFINITIONS;

export function parameterDefinition(name: ParameterName): ParameterDefinition {
  const definition = BY_NAME.get(name);
  if (!definition) throw new Error(`Parameter ${name} has no definition.`);
  return definition;
}

/** Rank in the parameter list, for tables. */
export function parameterRank(name: ParameterName): number {
  return PARAMETER_NAMES.indexOf(name);
}

/** The label with the words that fit the axis: a rotary axis counts steps per degree. */
export function parameterLabel(name: ParameterName, kind: AxisKind = "linear"): string {
  if (name === "steps_per_mm" && kind === "rotary") return "Steps per degree";
  return parameterDefinition(name).label;
}

/** Whether a parameter is a current and therefore needs a basis. */
export function needsBasis(name: ParameterName): boolean {
  return name === "run_current" || name === "hold_current";
}
