import type { CatalogKind } from "../../lib/domain/catalog";

/** One catalog item of the invented fleet; values as a data sheet would give them. */
export interface DemoItem {
  readonly kind: CatalogKind;
  readonly code: string;
  readonly name: string;
  readonly data: Readonly<Record<string, unknown>>;
  readonly evidence: string;
}

const SHEET = "Data sheet, read when the item was taken into the catalog";
const MEASURED = "Measured on the bench: heating record and pull with a spring scale";

const motor = (code: string, name: string, data: Readonly<Record<string, unknown>>): DemoItem => ({
  kind: "motor",
  code,
  name,
  evidence: SHEET,
  data: {
    rated_current_basis: "rms",
    step_angle_deg: 1.8,
    winding_limit_c: 130,
    thermal_class: "B",
    ...data,
  },
});

const driver = (code: string, name: string, data: Readonly<Record<string, unknown>>): DemoItem => ({
  kind: "driver",
  code,
  name,
  evidence: SHEET,
  data: {
    max_current_basis: "rms",
    rds_on_at_c: 25,
    junction_limit_c: 150,
    quiescent_power_w: 0.15,
    switching_edge_ns: 60,
    chopping_frequency_hz: 30_000,
    min_pulse_high_us: 1,
    min_pulse_low_us: 1,
    min_direction_setup_us: 0.5,
    decay_mode: "mixed",
    feedback: "open_loop",
    ...data,
  },
});

/** The hardware of three machine models: an own drafting, dosing and sorting line of no real maker. */
export const DEMO_ITEMS: readonly DemoItem[] = [
  motor("carriage-motor", "Carriage motor", {
    rated_current_a: 1.5,
    resistance_ohm: 2.1,
    inductance_mh: 3,
    holding_torque_nm: 0.45,
    detent_torque_nm: 0.012,
    rotor_inertia_gcm2: 54,
    winding_to_ambient_k_per_w: 8.5,
    case_to_ambient_k_per_w: 7,
    thermal_time_constant_s: 1200,
  }),
  motor("lift-motor", "Lift motor", {
    rated_current_a: 2,
    resistance_ohm: 1.4,
    inductance_mh: 2.8,
    holding_torque_nm: 0.8,
    detent_torque_nm: 0.02,
    rotor_inertia_gcm2: 110,
    winding_to_ambient_k_per_w: 6.2,
    case_to_ambient_k_per_w: 5.1,
    thermal_time_constant_s: 1500,
  }),
  motor("small-motor", "Small motor", {
    rated_current_a: 0.7,
    resistance_ohm: 5.2,
    inductance_mh: 4,
    holding_torque_nm: 0.11,
    detent_torque_nm: 0.004,
    rotor_inertia_gcm2: 12,
    winding_to_ambient_k_per_w: 13,
    case_to_ambient_k_per_w: 11,
    thermal_time_constant_s: 800,
  }),
  motor("carriage-motor-b", "Carriage motor, second source", {
    rated_current_a: 1.2,
    resistance_ohm: 3.3,
    inductance_mh: 5.2,
    holding_torque_nm: 0.4,
    detent_torque_nm: 0.012,
    rotor_inertia_gcm2: 57,
    winding_to_ambient_k_per_w: 8.8,
    case_to_ambient_k_per_w: 7.3,
  }),
  driver("axis-driver", "Axis driver board", {
    max_current_a: 2,
    rds_on_ohm: 0.34,
    junction_to_ambient_k_per_w: 30,
    operating_max_v: 29,
    absolute_max_v: 33,
    set_point: { method: "direct", basis: "rms", sense_resistance_ohm: 0.1, sense_resistor_rating_w: 0.5 },
  }),
  driver("shuttle-driver", "Shuttle driver board", {
    max_current_a: 1.8,
    rds_on_ohm: 0.4,
    junction_to_ambient_k_per_w: 24,
    operating_max_v: 36,
    absolute_max_v: 40,
    decay_mode: "slow",
    min_on_time_us: 0.5,
    set_point: { method: "direct", basis: "peak", sense_resistance_ohm: 0.1, sense_resistor_rating_w: 1 },
  }),
  {
    kind: "controller_board",
    code: "desk-controller",
    name: "Five-axis controller",
    evidence: SHEET,
    data: { max_step_rate_hz: 45_000 },
  },
  {
    kind: "controller_board",
    code: "shuttle-controller",
    name: "Two-axis controller",
    evidence: SHEET,
    data: { max_step_rate_hz: 60_000 },
  },
  {
    kind: "supply",
    code: "supply-24",
    name: "24 V supply",
    evidence: "Label of the supply; its output capacitors are not stated",
    data: {
      voltage_v: 24,
      tolerance: 0.05,
      rated_power_w: 240,
      other_load_w: 35,
      cable_length_m: 1.5,
      cable_ohm_per_km: 13.3,
    },
  },
  {
    kind: "supply",
    code: "supply-30",
    name: "30 V supply",
    evidence: SHEET,
    data: {
      voltage_v: 30,
      tolerance: 0.05,
      rated_power_w: 200,
      bus_capacitance_uf: 2200,
      other_load_w: 20,
      cable_length_m: 2,
      cable_ohm_per_km: 13.3,
    },
  },
  belt({ code: "carriage-belt", name: "Carriage belt", teeth: 20, length: 1300 }),
  belt({ code: "shuttle-belt", name: "Shuttle belt", teeth: 24, length: 2000 }),
  {
    kind: "drive_train",
    code: "lift-screw",
    name: "Lift screw",
    evidence: MEASURED,
    data: { kind: "screw", lead_mm: 4, efficiency: 0.5, inertia_kgm2: 2e-6, axial_stiffness_n_per_um: 20 },
  },
  {
    kind: "drive_train",
    code: "feed-screw",
    name: "Feed screw",
    evidence: SHEET,
    data: { kind: "screw", lead_mm: 2, efficiency: 0.35, axial_stiffness_n_per_um: 20 },
  },
  {
    kind: "drive_train",
    code: "valve-gear",
    name: "Valve gear",
    evidence: SHEET,
    data: { kind: "rotary", ratio: 4, efficiency: 0.9 },
  },
  {
    kind: "mount",
    code: "printed-mount",
    name: "Printed mount",
    evidence: "Material sheet of the filament: heat deflection at 1.8 MPa",
    data: { softening_c: 76 },
  },
  {
    kind: "mount",
    code: "plate-mount",
    name: "Aluminium plate",
    evidence: "Strength of the alloy falls above this; common practice, no source",
    data: { softening_c: 120 },
  },
];

interface Belt {
  readonly code: string;
  readonly name: string;
  readonly teeth: number;
  /** mm, both spans. */
  readonly length: number;
}

function belt({ code, name, teeth, length }: Belt): DemoItem {
  const data = {
    kind: "belt",
    pitch_mm: 2,
    teeth,
    ratio: 1,
    efficiency: 0.95,
    belt_stiffness_n_per_mm: 7500,
    belt_width_mm: 9,
    belt_length_mm: length,
  };
  return { kind: "drive_train", code, name, evidence: MEASURED, data };
}
