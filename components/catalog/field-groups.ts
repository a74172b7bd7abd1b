import type { CatalogKind } from "@/lib/domain/catalog";
import type { FormField } from "@/lib/schemas/form-fields";

export type FieldSubject = CatalogKind | "load" | "sense_resistor";

export interface FieldGroupPlan {
  readonly legend: string;
  readonly help?: string;
  /** Fields by path; "set_point." stands for all fields of the set-point. */
  readonly paths: readonly string[];
}

const PLANS: Partial<Record<FieldSubject, readonly FieldGroupPlan[]>> = {
  motor: [
    {
      legend: "Winding",
      paths: [
        "rated_current_a",
        "rated_current_basis",
        "resistance_ohm",
        "inductance_mh",
        "rating_of",
        "connection",
      ],
    },
    {
      legend: "Torque and rotor",
      paths: ["holding_torque_nm", "detent_torque_nm", "rotor_inertia_gcm2", "step_angle_deg"],
    },
    {
      legend: "Heat",
      paths: [
        "winding_limit_c",
        "thermal_class",
        "winding_to_ambient_k_per_w",
        "case_to_ambient_k_per_w",
        "thermal_time_constant_s",
      ],
    },
  ],
  driver: [
    {
      legend: "Current and voltage",
      paths: ["max_current_a", "max_current_basis", "operating_max_v", "absolute_max_v"],
    },
    {
      legend: "Set-point",
      help: "How the driver is told its current.",
      paths: ["set_point."],
    },
    {
      legend: "Heat",
      paths: [
        "rds_on_ohm",
        "rds_on_at_c",
        "junction_to_ambient_k_per_w",
        "junction_limit_c",
        "quiescent_power_w",
        "switching_edge_ns",
      ],
    },
    {
      legend: "Step signal",
      paths: ["min_pulse_high_us", "min_pulse_low_us", "min_direction_setup_us"],
    },
    { legend: "Chopping", paths: ["chopping_frequency_hz", "min_on_time_us", "decay_mode"] },
  ],
  supply: [
    {
      legend: "Output",
      paths: ["voltage_v", "tolerance", "rated_power_w", "bus_capacitance_uf", "other_load_w"],
    },
    { legend: "Cable to the drivers", paths: ["cable_length_m", "cable_ohm_per_km"] },
  ],
  drive_train: [
    {
      legend: "Motion",
      paths: ["kind", "pitch_mm", "teeth", "lead_mm", "module_mm", "ratio", "efficiency", "inertia_kgm2"],
    },
    { legend: "Preload", paths: ["preload_n", "preload_friction"] },
    {
      legend: "Stiffness",
      paths: ["belt_stiffness_n_per_mm", "belt_width_mm", "belt_length_mm", "axial_stiffness_n_per_um"],
    },
  ],
  load: [
    {
      legend: "Linear axis",
      paths: [
        "mass_kg",
        "friction_n",
        "incline_deg",
        "external_force_n",
        "counterbalance_n",
        "reference_overtravel_mm",
      ],
    },
    {
      legend: "Rotary axis",
      paths: ["inertia_kgm2", "friction_nm", "external_torque_nm", "gravity_torque_nm"],
    },
    { legend: "Brake", paths: ["holding_brake", "brake_delay_ms"] },
  ],
};

export interface GroupedFields extends FieldGroupPlan {
  readonly fields: readonly FormField[];
}

function belongs(field: FormField, paths: readonly string[]): boolean {
  return paths.some((path) => (path.endsWith(".") ? field.path.startsWith(path) : field.path === path));
}

/** Fields under headings; what no heading names comes last. */
export function groupedFields(subject: FieldSubject, fields: readonly FormField[]): GroupedFields[] {
  const plans = PLANS[subject] ?? [];
  const rest = fields.filter((field) => !plans.some(({ paths }) => belongs(field, paths)));
  const groups = plans.map((plan) => ({
    ...plan,
    fields: fields.filter((field) => belongs(field, plan.paths)),
  }));
  const last = { legend: plans.length === 0 ? "Data" : "Further data", paths: [], fields: rest };
  return [...groups, last].filter(({ fields: own }) => own.length > 0);
}

/** Fields that count only for some choices: by path, the path of the choice and its values. */
const ONLY_FOR: Readonly<Record<string, { readonly choice: string; readonly values: readonly string[] }>> = {
  pitch_mm: { choice: "kind", values: ["belt"] },
  teeth: { choice: "kind", values: ["belt", "rack"] },
  lead_mm: { choice: "kind", values: ["screw"] },
  module_mm: { choice: "kind", values: ["rack"] },
  preload_n: { choice: "kind", values: ["screw"] },
  preload_friction: { choice: "kind", values: ["screw"] },
  belt_stiffness_n_per_mm: { choice: "kind", values: ["belt"] },
  belt_width_mm: { choice: "kind", values: ["belt"] },
  belt_length_mm: { choice: "kind", values: ["belt"] },
  axial_stiffness_n_per_um: { choice: "kind", values: ["belt", "screw", "rack"] },
  connection: { choice: "rating_of", values: ["half_coil"] },
  brake_delay_ms: { choice: "holding_brake", values: ["yes"] },
  "set_point.gain": { choice: "set_point.method", values: ["reference_voltage"] },
  "set_point.gain_a_per_v": { choice: "set_point.method", values: ["transconductance"] },
  "set_point.full_scale_v": { choice: "set_point.method", values: ["digital_scale"] },
  "set_point.internal_resistance_ohm": { choice: "set_point.method", values: ["digital_scale"] },
  "set_point.steps": { choice: "set_point.method", values: ["digital_scale"] },
  "set_point.overall_scale": { choice: "set_point.method", values: ["digital_scale"] },
};

/** Whether a field is asked for: always, but for those that the choice made rules out and that are empty. */
export function isAsked(path: string, typed: (path: string) => string): boolean {
  const condition = ONLY_FOR[path];
  if (!condition || typed(path) !== "") return true;
  const chosen = typed(condition.choice);
  return chosen === "" || condition.values.includes(chosen);
}
