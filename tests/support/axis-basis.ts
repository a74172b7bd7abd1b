import type { AxisBasis } from "@/components/axis/types";
import { DEFAULT_POLICY } from "@/lib/domain/policy";

/** A carriage on a belt that keeps step as its text stands; invented. */
export const AXIS_BASIS: AxisBasis = {
  machineId: "5b1c2b5e-7f39-4a53-9a0d-0d0b4a6f9a11",
  serial: "LD-117",
  axis: "x",
  kind: "linear",
  files: [
    {
      path: "machine.conf",
      text: "[axis.x]\nrun_ma = 1000\nhold_ma = 500\nsubdivide = 16\ntop_speed = 250\naccel = 3000\n",
    },
  ],
  keyTable: {
    rules: [
      { key: "axis.{axis}.run_ma", parameter: "run_current", unit: "mA", basis: "rms" },
      { key: "axis.{axis}.hold_ma", parameter: "hold_current", unit: "mA", basis: "rms" },
      { key: "axis.{axis}.subdivide", parameter: "microsteps" },
      { key: "axis.{axis}.top_speed", parameter: "max_speed", unit: "mm/s" },
      { key: "axis.{axis}.accel", parameter: "acceleration", unit: "mm/s²" },
    ],
  },
  assembly: {
    ambient_c: 30,
    supply: { voltage_v: 24 },
    axes: [
      {
        axis: "x",
        travel_mm: 120,
        motor_count: 1,
        motor: {
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
        },
        driver: {
          max_current_a: 2,
          max_current_basis: "rms",
          rds_on_ohm: 0.25,
          rds_on_at_c: 25,
          set_point: { method: "direct", sense_resistance_ohm: 0.1 },
        },
        drive_train: { kind: "belt", pitch_mm: 2, teeth: 20, efficiency: 0.95 },
        load: { mass_kg: 0.6, friction_n: 4, incline_deg: 0 },
      },
    ],
  },
  policy: DEFAULT_POLICY,
};
