import type { Assembly } from "@/lib/domain/assembly";
import type { KeyTable } from "@/lib/domain/key-table";
import { DEFAULT_POLICY } from "@/lib/domain/policy";
import { checkConfiguration } from "@/lib/review/check";
import type { CheckInput, CheckReport, ConfigurationFile } from "@/lib/review/types";

/** An invented two-axis gantry: a level belt axis X and an upright screw axis Z that carries its load. */
export const TEXT = `# bench gantry
[machine]
supply = 24 V

[axis.x]
amps = 0.85     # A
standby = 0.5   # A
subdivide = 16
steps_mm = 80
vmax = 300      # mm/s
acc = 6000      # mm/s^2
corner = 12     # mm/s
colour = grey

[axis.z]
amps = 1.2      # A
standby = 1.0   # A
subdivide = 16
steps_mm = 400
vmax = 20       # mm/s
acc = 200       # mm/s^2
corner = 1      # mm/s
`;

export const KEY_TABLE: KeyTable = {
  rules: [
    { key: "machine.supply", parameter: "supply_voltage", unit: "V" },
    { key: "axis.{axis}.amps", parameter: "run_current", unit: "A", basis: "rms" },
    { key: "axis.{axis}.standby", parameter: "hold_current", unit: "A", basis: "rms" },
    { key: "axis.{axis}.subdivide", parameter: "microsteps" },
    { key: "axis.{axis}.steps_mm", parameter: "steps_per_mm", unit: "1/mm" },
    { key: "axis.{axis}.vmax", parameter: "max_speed", unit: "mm/s" },
    { key: "axis.{axis}.acc", parameter: "acceleration", unit: "mm/s²" },
    { key: "axis.{axis}.corner", parameter: "corner_speed", unit: "mm/s" },
    { key: "axis.{axis}.lower", parameter: "travel_min", unit: "mm" },
    { key: "axis.{axis}.upper", parameter: "travel_max", unit: "mm" },
    { key: "axis.{axis}.vref", parameter: "reference_voltage", unit: "V" },
    { key: "axis.{axis}.pulse", parameter: "pulse_width", unit: "µs" },
    { key: "axis.{axis}.reversed", parameter: "direction_reversed" },
  ],
};

const MOTOR = {
  rated_current_a: 1.5,
  rated_current_basis: "rms",
  resistance_ohm: 2.1,
  inductance_mh: 3,
  holding_torque_nm: 0.45,
  detent_torque_nm: 0.012,
  rotor_inertia_gcm2: 54,
  step_angle_deg: 1.8,
  winding_limit_c: 130,
  winding_to_ambient_k_per_w: 8.5,
  case_to_ambient_k_per_w: 7,
} as const;

const DRIVER = {
  max_current_a: 2,
  max_current_basis: "rms",
  rds_on_ohm: 0.25,
  rds_on_at_c: 25,
  junction_to_ambient_k_per_w: 35,
  junction_limit_c: 150,
  quiescent_power_w: 0.1,
  operating_max_v: 29,
  absolute_max_v: 33,
  min_pulse_high_us: 1,
  min_pulse_low_us: 1,
  min_on_time_us: 1.5,
  chopping_frequency_hz: 30_000,
  decay_mode: "mixed",
  set_point: { method: "direct", sense_resistance_ohm: 0.1, sense_resistor_rating_w: 0.5 },
} as const;

export const ASSEMBLY: Assembly = {
  ambient_c: 25,
  enclosure_rise_k: 5,
  supply: { voltage_v: 24, rated_power_w: 150, bus_capacitance_uf: 2200 },
  controller_board: { max_step_rate_hz: 50_000 },
  axes: [
    {
      axis: "x",
      motor: { ...MOTOR },
      driver: { ...DRIVER, set_point: { ...DRIVER.set_point } },
      drive_train: { kind: "belt", pitch_mm: 2, teeth: 20, efficiency: 0.95 },
      load: { mass_kg: 0.6, friction_n: 4, incline_deg: 0 },
      mount: { softening_c: 80 },
      travel_mm: 400,
    },
    {
      axis: "z",
      motor: { ...MOTOR },
      driver: { ...DRIVER, set_point: { ...DRIVER.set_point } },
      drive_train: { kind: "screw", lead_mm: 8, efficiency: 0.5 },
      load: { mass_kg: 8, friction_n: 5, incline_deg: 90 },
      mount: { softening_c: 120 },
      travel_mm: 150,
    },
  ],
};

export const POLICY = DEFAULT_POLICY;

export function files(text: string): ConfigurationFile[] {
  return [{ path: "gantry.conf", text }];
}

/** The text with one line of one axis rewritten, e.g. edited("x", "amps = 0.85", "amps = 1.05"). */
export function edited(axis: string, was: string, toBe: string, text = TEXT): string {
  const start = text.indexOf(`[axis.${axis}]`);
  const at = text.indexOf(was, start);
  if (start < 0 || at < 0) throw new Error(`No “${was}” on axis ${axis}.`);
  return text.slice(0, at) + toBe + text.slice(at + was.length);
}

export function input(text: string, more: Partial<CheckInput> = {}): CheckInput {
  return { files: files(text), keyTable: KEY_TABLE, assembly: ASSEMBLY, policy: POLICY, ...more };
}

export function check(text: string, more: Partial<CheckInput> = {}): CheckReport {
  return checkConfiguration(input(text, more));
}

/** A machine whose hardware lacks one field of one axis. */
export function withoutField(
  axis: string,
  part: "motor" | "mount" | "load" | "driver",
  field: string,
): Assembly {
  return {
    ...ASSEMBLY,
    axes: ASSEMBLY.axes.map((own) =>
      own.axis === axis
        ? {
            ...own,
            [part]: Object.fromEntries(Object.entries(own[part] ?? {}).filter(([key]) => key !== field)),
          }
        : own,
    ),
  };
}
