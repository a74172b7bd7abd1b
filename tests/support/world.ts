import { randomUUID } from "node:crypto";
import type { CatalogKind, HardwareFact, ModelHardware } from "@/lib/domain/catalog";
import type { KeyRule } from "@/lib/domain/key-table";
import type { Actor, Role } from "@/lib/domain/roles";
import { createItem } from "@/lib/services/catalog/create";
import type { Context } from "@/lib/services/kernel/context";
import { saveKeyTable } from "@/lib/services/key-tables/save";
import { createMachine } from "@/lib/services/machines/create";
import { recordHardware } from "@/lib/services/machines/record-hardware";
import { createModel } from "@/lib/services/models/create";
import { Site } from "@/models/catalog";
import { User } from "@/models/people";

let counter = 0;
/** A word that no other object of this run has. */
export function unique(word: string): string {
  counter += 1;
  return `${word}-${counter}-${randomUUID().slice(0, 8)}`;
}

export interface TestPerson extends Context {
  readonly actor: Extract<Actor, { kind: "person" }>;
}

/** Somebody with a role, as a context to call services with. */
export async function person(role: Role, now = new Date()): Promise<TestPerson> {
  const name = unique(role);
  const user = await User.create({
    email: `${name}@example.test`,
    name,
    role,
    passwordHash: "no password: this person never signs in",
  });
  return { actor: { kind: "person", id: user.id, name, role, sessionId: randomUUID() }, now };
}

export async function site(ambientC: number | null = 35): Promise<Site> {
  const code = unique("site");
  return Site.create({ code, name: `Hall ${code}`, ambientC });
}

/** Invented hardware that every check can be computed with. */
export const CATALOG_SAMPLE: Record<CatalogKind, Record<string, unknown>> = {
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
    case_to_ambient_k_per_w: 7,
    thermal_time_constant_s: 1200,
  },
  driver: {
    max_current_a: 2,
    max_current_basis: "rms",
    rds_on_ohm: 0.25,
    rds_on_at_c: 25,
    junction_to_ambient_k_per_w: 35,
    junction_limit_c: 150,
    quiescent_power_w: 0.1,
    switching_edge_ns: 0,
    operating_max_v: 29,
    absolute_max_v: 33,
    min_pulse_high_us: 1,
    min_pulse_low_us: 1,
    min_direction_setup_us: 0.2,
    min_on_time_us: 1.5,
    chopping_frequency_hz: 30000,
    decay_mode: "slow",
    set_point: { method: "direct", basis: "rms", sense_resistance_ohm: 0.1, sense_resistor_rating_w: 0.5 },
  },
  controller_board: { max_step_rate_hz: 100_000 },
  supply: { voltage_v: 24, tolerance: 0.05, rated_power_w: 150, bus_capacitance_uf: 1000 },
  drive_train: { kind: "belt", pitch_mm: 2, teeth: 20, ratio: 1, efficiency: 0.95, inertia_kgm2: 0 },
  mount: { softening_c: 60 },
};

export const EVIDENCE = "Data sheet of the maker, read for this test";

export async function item(
  context: Context,
  kind: CatalogKind,
  data: Record<string, unknown> = CATALOG_SAMPLE[kind],
) {
  const code = unique(kind.replaceAll("_", "-")).slice(0, 40);
  return createItem(context, { kind, code, name: `Test ${code}`, data, evidence: EVIDENCE });
}

export interface TestHardware {
  readonly motor: string;
  readonly driver: string;
  readonly drive_train: string;
  readonly mount: string;
  readonly supply: string;
  readonly controller_board: string;
}

/** One catalog item of each kind. */
export async function hardwareItems(context: Context): Promise<TestHardware> {
  const made = await Promise.all(
    (["motor", "driver", "drive_train", "mount", "supply", "controller_board"] as const).map(
      async (kind) => [kind, (await item(context, kind)).id] as const,
    ),
  );
  return Object.fromEntries(made) as unknown as TestHardware;
}

/** A model's hardware with the named axes, all alike and level. */
export function modelHardwareOf(items: TestHardware, axes: readonly string[] = ["x", "y"]): ModelHardware {
  return {
    supply: items.supply,
    controller_board: items.controller_board,
    enclosure_rise_k: 5,
    has_read_back: true,
    axes: axes.map((axis) => ({
      axis,
      motor_count: 1,
      motor: items.motor,
      driver: items.driver,
      drive_train: items.drive_train,
      mount: items.mount,
      load: { mass_kg: 0.6, friction_n: 4, incline_deg: 0 },
      travel_mm: 400,
      coupled_with: [],
    })),
  };
}

/** Keys of `[axis.x]` sections, currents in mA rms. */
export const KEY_RULES: readonly KeyRule[] = [
  { key: "axis.{axis}.run_ma", parameter: "run_current", unit: "mA", basis: "rms" },
  { key: "axis.{axis}.hold_ma", parameter: "hold_current", unit: "mA", basis: "rms" },
  { key: "axis.{axis}.microsteps", parameter: "microsteps" },
  { key: "axis.{axis}.steps_mm", parameter: "steps_per_mm" },
  { key: "axis.{axis}.speed", parameter: "max_speed", unit: "mm/s" },
  { key: "axis.{axis}.accel", parameter: "acceleration", unit: "mm/s²" },
];

export interface TestModel {
  readonly id: string;
  readonly code: string;
  readonly items: TestHardware;
}

/** A machine model with its key table. */
export async function model(context: Context, axes: readonly string[] = ["x", "y"]): Promise<TestModel> {
  const items = await hardwareItems(context);
  const code = unique("model").slice(0, 40);
  const made = await createModel(context, {
    code,
    name: `Test ${code}`,
    hardware: modelHardwareOf(items, axes),
  });
  await saveKeyTable(context, { modelId: made.id, rules: [...KEY_RULES], note: "", ifMatch: 0 });
  return { id: made.id, code, items };
}

export async function machine(
  context: Context,
  { modelId, siteId }: { readonly modelId: string; readonly siteId: string },
) {
  return createMachine(context, { serial: unique("SN"), modelId, siteId, note: "" });
}

/** Another item recorded on one machine. */
export async function swapped(
  context: Context,
  { id, ...fact }: Partial<HardwareFact> & Pick<HardwareFact, "part"> & { readonly id: string },
) {
  return recordHardware(context, { axis: null, itemId: null, data: {}, evidence: EVIDENCE, id, ...fact });
}
