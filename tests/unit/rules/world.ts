import type { Assembly, AxisAssembly } from "@/lib/domain/assembly";
import type { Finding } from "@/lib/domain/findings";
import type { ParameterName } from "@/lib/domain/parameters";
import { parameterDefinition } from "@/lib/domain/parameters";
import { DEFAULT_POLICY } from "@/lib/domain/policy";
import type { Policy } from "@/lib/domain/policy";
import type { QuantityName } from "@/lib/domain/quantities";
import { insideUnit } from "@/lib/domain/units";
import type { Basis, ParameterValue } from "@/lib/domain/values";
import { evaluateRules } from "@/lib/rules/evaluate-rules";
import type { RuleInput, RuleResult } from "@/lib/rules/types";

/** One value of a text: a number in the unit typed, the factor from it to the inside unit, the basis of a current. */
export interface Typed {
  readonly typed: number;
  readonly unit: string | null;
  /** Inside units for one typed unit; 1 where missing. */
  readonly factor?: number;
  readonly basis?: Basis | null;
}

export type Texts = Partial<Record<ParameterName, Typed>>;

/** The text of the worked example: everything that the checks of a level belt axis can ask of it. */
export const EXAMPLE_TEXT: Texts = {
  run_current: { typed: 800, unit: "mA", factor: 1e-3, basis: "rms" },
  hold_current: { typed: 50, unit: "%" },
  microsteps: { typed: 16, unit: null },
  steps_per_mm: { typed: 80, unit: "steps/mm" },
  max_speed: { typed: 300, unit: "mm/s", factor: 1e-3 },
  acceleration: { typed: 3000, unit: "mm/s^2", factor: 1e-3 },
  corner_speed: { typed: 10, unit: "mm/s", factor: 1e-3 },
};

export function exampleAxis(axis = "x"): AxisAssembly {
  return {
    axis,
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
      set_point: {
        method: "reference_voltage",
        gain: 8,
        basis: "peak",
        sense_resistance_ohm: 0.1,
        sense_resistor_rating_w: 0.25,
      },
    },
    drive_train: { kind: "belt", pitch_mm: 2, teeth: 20, ratio: 1, efficiency: 0.95, inertia_kgm2: 0 },
    load: {
      mass_kg: 0.6,
      friction_n: 4,
      incline_deg: 0,
      external_force_n: 0,
      counterbalance_n: 0,
      holding_brake: false,
    },
    mount: { softening_c: 60 },
    travel_mm: 400,
  };
}

export function exampleAssembly(): Assembly {
  return {
    ambient_c: 35,
    enclosure_rise_k: 5,
    supply: { voltage_v: 24, tolerance: 0.05, rated_power_w: 150, bus_capacitance_uf: 1000 },
    controller_board: { max_step_rate_hz: 100000 },
    axes: [exampleAxis()],
  };
}

/** A machine like the example, changed in place by `change`. */
export function assemblyWith(change: (axis: AxisAssembly, assembly: Assembly) => void): Assembly {
  const assembly = exampleAssembly();
  change(assembly.axes[0]!, assembly);
  return assembly;
}

/** The parameters that a key table would read out of such texts, by axis ("" for the machine). */
export function parametersOf(texts: Texts, assembly: Assembly, axis = "x"): ParameterValue[] {
  const hardware = assembly.axes.find((one) => one.axis === axis);
  const kind = hardware?.drive_train?.kind === "rotary" ? "rotary" : "linear";
  return Object.entries(texts).map(([key, { typed, unit, factor = 1, basis = null }], index) => {
    const parameter = key as ParameterName;
    const definition = parameterDefinition(parameter);
    return {
      axis: definition.scope === "machine" ? null : axis,
      parameter,
      value: Number((typed * factor).toPrecision(12)),
      unit: unit === "%" ? "%" : insideUnit(definition.dimension, kind),
      basis,
      typed: { value: typed, unit },
      source: {
        path: "gantry.conf",
        line: index + 2,
        column: 10,
        start: 20 * index,
        end: 20 * index + 4,
        raw: String(typed),
        key: `axis.${axis}.${parameter}`,
      },
    };
  });
}

export interface World {
  readonly input: RuleInput;
  readonly result: RuleResult;
  readonly finding: (ruleId: string, axis?: string | null) => Finding;
  readonly has: (ruleId: string, axis?: string | null) => boolean;
  readonly quantity: (name: QuantityName, axis?: string | null) => number | undefined;
}

/** Evaluates a text on a machine, and gives the results by name. */
export function world(
  texts: Texts = EXAMPLE_TEXT,
  assembly: Assembly = exampleAssembly(),
  policy: Partial<Policy> = {},
): World {
  return worldOf({
    parameters: parametersOf(texts, assembly, assembly.axes[0]?.axis),
    assembly,
    policy: { ...DEFAULT_POLICY, ...policy },
  });
}

export function worldOf(input: RuleInput): World {
  const result = evaluateRules(input);
  const first = input.assembly.axes[0]?.axis ?? null;
  const where = (ruleId: string) => (ruleId === "braking-voltage" ? null : first);
  const all = (ruleId: string, axis: string | null) =>
    result.findings.filter((finding) => finding.ruleId === ruleId && finding.axis === axis);
  return {
    input,
    result,
    finding: (ruleId, axis = where(ruleId)) => {
      const found = all(ruleId, axis);
      if (found.length !== 1) throw new Error(`${found.length} findings of ${ruleId} on ${axis}`);
      return found[0]!;
    },
    has: (ruleId, axis = where(ruleId)) => all(ruleId, axis).length > 0,
    quantity: (name, axis = name === "bus_voltage_after_braking" ? null : first) =>
      result.quantities.find((quantity) => quantity.name === name && quantity.axis === axis)?.value,
  };
}

/** The example's text with some of its values another. */
export function texts(changes: Texts): Texts {
  return { ...EXAMPLE_TEXT, ...changes };
}

/** The example's text without some of its parameters. */
export function textsWithout(...names: readonly ParameterName[]): Texts {
  return Object.fromEntries(
    Object.entries(EXAMPLE_TEXT).filter(([name]) => !names.includes(name as ParameterName)),
  );
}
