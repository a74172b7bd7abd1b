import type { ParameterName } from "@/lib/domain/parameters";
import { QUANTITIES, QUANTITY_NAMES } from "@/lib/domain/quantities";
import type { QuantityName } from "@/lib/domain/quantities";
import type { AxisKind } from "@/lib/domain/axis-kind";
import { BUS_VOLTAGE_AFTER_BRAKING } from "./braking";
import { HOLD_CURRENT, WINDING_CURRENT } from "./current";
import { COUPLED_TORQUE_MARGIN } from "./coupled";
import type { MachineQuantityDefinition, QuantityDefinition } from "./definition";
import { DRIVER_CURRENT_LIMIT, DRIVER_JUNCTION, DRIVER_POWER, SENSE_RESISTOR_POWER } from "./driver";
import { MINIMUM_CURRENT } from "./fidelity";
import { FALL_DISTANCE } from "./fall";
import { EXPECTED_SCALE } from "./geometry";
import { FULL_STEP_RATE, PEAK_SPEED, STEP_RATE } from "./motion";
import { CASE_TEMPERATURE, WINDING_TEMPERATURE } from "./motor-heat";
import { presumesOpenLoop } from "./open-loop";
import { MOVE_TIME, RAMP_TORQUE_MARGIN, TORQUE_REQUIRED_RMS } from "./ramp";
import { AXIS_RESONANCE, INERTIA_RATIO } from "./stiffness";
import { STATIC_POSITION_ERROR } from "./static-position";
import { CABLE_DROP, SUPPLY_LOAD } from "./supply-load";
import { RESONANCE, START_STOP_SPEED } from "./start-stop";
import {
  HOLD_TORQUE_MARGIN,
  TORQUE_AVAILABLE,
  TORQUE_MARGIN,
  TORQUE_REQUIRED,
  VOLTAGE_LIMIT_SPEED,
} from "./torque";

export type MachineQuantityName =
  "bus_voltage_after_braking" | "supply_load" | "cable_drop" | "coupled_torque_margin";
export type AxisQuantityName = Exclude<QuantityName, MachineQuantityName>;

export const AXIS_QUANTITIES: Readonly<Record<AxisQuantityName, QuantityDefinition>> = {
  winding_current_rms: WINDING_CURRENT,
  hold_current_rms: HOLD_CURRENT,
  sense_resistor_power: SENSE_RESISTOR_POWER,
  driver_power: DRIVER_POWER,
  driver_junction_c: DRIVER_JUNCTION,
  winding_c: WINDING_TEMPERATURE,
  case_c: CASE_TEMPERATURE,
  steps_per_mm_expected: EXPECTED_SCALE,
  step_rate: STEP_RATE,
  peak_speed: PEAK_SPEED,
  voltage_limit_speed: VOLTAGE_LIMIT_SPEED,
  torque_available: TORQUE_AVAILABLE,
  torque_required: TORQUE_REQUIRED,
  torque_margin: TORQUE_MARGIN,
  start_stop_speed: START_STOP_SPEED,
  hold_torque_margin: HOLD_TORQUE_MARGIN,
  resonance_hz: RESONANCE,
  full_step_rate: FULL_STEP_RATE,
  minimum_current_peak: MINIMUM_CURRENT,
  ramp_torque_margin: RAMP_TORQUE_MARGIN,
  torque_required_rms: TORQUE_REQUIRED_RMS,
  move_time: MOVE_TIME,
  driver_current_limit: DRIVER_CURRENT_LIMIT,
  static_position_error: STATIC_POSITION_ERROR,
  inertia_ratio: INERTIA_RATIO,
  axis_resonance_hz: AXIS_RESONANCE,
  fall_distance: FALL_DISTANCE,
};

export const MACHINE_QUANTITIES: Readonly<Record<MachineQuantityName, MachineQuantityDefinition>> = {
  bus_voltage_after_braking: BUS_VOLTAGE_AFTER_BRAKING,
  supply_load: SUPPLY_LOAD,
  cable_drop: CABLE_DROP,
  coupled_torque_margin: COUPLED_TORQUE_MARGIN,
};

export function isMachineQuantity(name: QuantityName): name is MachineQuantityName {
  return name in MACHINE_QUANTITIES;
}

/** Unit of a quantity on an axis of this kind: lengths in rad, speeds in rad/s and the scale in 1/deg on a rotary axis. */
export function quantityUnit(name: QuantityName, kind: AxisKind): string {
  const { unit } = QUANTITIES[name];
  if (kind === "linear") return unit;
  if (unit === "m") return "rad";
  if (unit === "m/s") return "rad/s";
  return unit === "1/mm" ? "1/deg" : unit;
}

function definition(name: QuantityName): Pick<QuantityDefinition, "reads" | "from"> {
  const { reads, from } = isMachineQuantity(name) ? MACHINE_QUANTITIES[name] : AXIS_QUANTITIES[name];
  return { from, reads: presumesOpenLoop(name) ? [...reads, "driver.feedback"] : reads };
}

/** Every hardware field and parameter that quantities rest on, spelt as in `Rule.needs`. */
export function readsOf(...names: readonly QuantityName[]): readonly string[] {
  const { reads, from } = names.reduce<{ reads: string[]; from: QuantityName[] }>(
    (all, name) => ({
      reads: [...all.reads, ...definition(name).reads],
      from: [...all.from, ...definition(name).from],
    }),
    { reads: [], from: [] },
  );
  return [...new Set(from.length > 0 ? [...reads, ...readsOf(...from)] : reads)];
}

const MOVED_BY: ReadonlyMap<QuantityName, ReadonlySet<string>> = new Map(
  QUANTITY_NAMES.map((name) => [name, new Set(readsOf(name))]),
);

/** Whether another value of a parameter can move a quantity. */
export function rests(name: QuantityName, parameter: ParameterName): boolean {
  return MOVED_BY.get(name)?.has(parameter) === true;
}
