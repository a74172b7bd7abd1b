import { z } from "zod";

/** The computed quantities, with unit and words; definitions in lib/rules and lib/physics. */
export const QUANTITIES = {
  winding_current_rms: { unit: "A", label: "Winding current, rms" },
  hold_current_rms: { unit: "A", label: "Hold current, rms" },
  sense_resistor_power: { unit: "W", label: "Power in the sense resistor" },
  driver_power: { unit: "W", label: "Driver heat" },
  driver_junction_c: { unit: "°C", label: "Driver junction" },
  winding_c: { unit: "°C", label: "Winding" },
  case_c: { unit: "°C", label: "Motor case" },
  steps_per_mm_expected: { unit: "1/mm", label: "Steps per mm from the geometry" },
  step_rate: { unit: "Hz", label: "Step rate" },
  peak_speed: { unit: "m/s", label: "Highest speed reached" },
  voltage_limit_speed: { unit: "m/s", label: "Voltage-limit speed" },
  torque_available: { unit: "N·m", label: "Torque available" },
  torque_required: { unit: "N·m", label: "Torque required" },
  torque_margin: { unit: "", label: "Torque margin" },
  start_stop_speed: { unit: "m/s", label: "Start-stop speed" },
  hold_torque_margin: { unit: "", label: "Hold torque margin" },
  resonance_hz: { unit: "Hz", label: "Rotor resonance" },
  full_step_rate: { unit: "Hz", label: "Full-step rate" },
  bus_voltage_after_braking: { unit: "V", label: "Bus voltage after braking" },
  minimum_current_peak: { unit: "A", label: "Lowest controllable current, peak" },
  ramp_torque_margin: { unit: "", label: "Least torque margin on the ramp" },
  torque_required_rms: { unit: "N·m", label: "Torque of the longest move, rms" },
  move_time: { unit: "s", label: "Time of the longest move" },
  driver_current_limit: { unit: "A", label: "Highest driver current at this ambient, rms" },
  static_position_error: { unit: "m", label: "Position error under load" },
  inertia_ratio: { unit: "", label: "Inertia ratio" },
  axis_resonance_hz: { unit: "Hz", label: "Axis resonance" },
  fall_distance: { unit: "m", label: "Way fallen before the brake holds" },
  supply_load: { unit: "W", label: "Load on the supply" },
  cable_drop: { unit: "V", label: "Voltage lost on the supply cable" },
  coupled_torque_margin: { unit: "", label: "Torque margin of the busiest coupled motor" },
} as const;

export type QuantityName = keyof typeof QUANTITIES;
export const QUANTITY_NAMES = Object.keys(QUANTITIES) as QuantityName[];
export const quantityNameSchema = z.enum(QUANTITY_NAMES as [QuantityName, ...QuantityName[]]);

export interface Quantity {
  /** null: of the machine. */
  readonly axis: string | null;
  readonly name: QuantityName;
  readonly value: number;
  /** As QUANTITIES says, but "rad", "rad/s" and "1/deg" on a rotary axis. */
  readonly unit: string;
}
