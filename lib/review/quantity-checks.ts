import type { ParameterName } from "@/lib/domain/parameters";
import type { QuantityName } from "@/lib/domain/quantities";
import type { ParameterValue } from "@/lib/domain/values";

/** How the limit of a check relates to the quantity in its row. */
type LimitKind =
  /** The check compares this quantity with its limit. */
  | "own"
  /** The quantity is itself the limit, and the check's value must stay below it. */
  | "is_limit"
  /** The check has no limit in the unit of this quantity. */
  | "none";

/** What the text states of the axis. */
type Stated = (name: ParameterName) => ParameterValue | undefined;

export interface QuantityChecks {
  readonly quantity: QuantityName;
  /** Checks that judge the quantity, the leading one first. */
  readonly ruleIds: readonly string[];
  readonly limit: LimitKind;
  /** Parameters that the row rests on: those that its findings name, or by CHECK's definition of the quantity. */
  readonly restsOn: "findings" | ((stated: Stated) => readonly ParameterName[]);
}

const CURRENT: readonly ParameterName[] = ["run_current", "reference_voltage", "current_scale"];
const TOP_SPEED: readonly ParameterName[] = ["max_speed", "acceleration", "travel_min", "travel_max"];

/** Every quantity in the order of the effects table: what loses steps or gets hot first, then what explains it. */
export const QUANTITY_CHECKS: readonly QuantityChecks[] = [
  judged("torque_margin", "torque-margin"),
  judged("ramp_torque_margin", "ramp-torque-margin"),
  judged("coupled_torque_margin", "coupled-motors"),
  judged("case_c", "mount-temperature", "touch-temperature"),
  judged("winding_c", "winding-temperature"),
  judged("driver_junction_c", "driver-junction"),
  { ...judged("step_rate", "step-rate"), restsOn: stepRateParameters },
  { ...judged("start_stop_speed", "corner-speed"), limit: "is_limit" },
  judged("hold_torque_margin", "hold-torque"),
  hinted("resonance_hz", "resonance", () => CURRENT),
  judged("sense_resistor_power", "sense-resistor"),
  { ...judged("bus_voltage_after_braking", "braking-voltage"), restsOn: () => TOP_SPEED },
  judged("winding_current_rms", "run-current-motor", "run-current-driver"),
  explaining("hold_current_rms", holdParameters),
  hinted("peak_speed", "speed-reached", () => TOP_SPEED),
  hinted("steps_per_mm_expected", "steps-per-mm", () => ["microsteps"]),
  explaining("voltage_limit_speed", () => CURRENT),
  explaining("torque_available", () => [...CURRENT, ...TOP_SPEED]),
  explaining("torque_required", () => ["acceleration"]),
  explaining("driver_power", () => CURRENT),
  hinted("full_step_rate", "resonance", () => TOP_SPEED),
  hinted("minimum_current_peak", "microstep-current", () => []),
  hinted("static_position_error", "static-position", () => [...CURRENT, "hold_current", "hold_scale"]),
  hinted("fall_distance", "fall-after-power-loss", () => []),
  { ...judged("supply_load", "supply-power"), restsOn: () => [...CURRENT, ...TOP_SPEED] },
  { ...judged("cable_drop", "cable-drop"), restsOn: () => [...CURRENT, ...TOP_SPEED] },
  hinted("axis_resonance_hz", "axis-resonance", () => ["max_speed", "reference_run_speed"]),
  hinted("inertia_ratio", "inertia-ratio", () => []),
  explaining("move_time", () => [...TOP_SPEED, "jerk"]),
  explaining("torque_required_rms", () => TOP_SPEED),
  explaining("driver_current_limit", () => []),
];

/** The text's own scale beats the geometry; pulse width and highest rate move the limit. */
function stepRateParameters(stated: Stated): ParameterName[] {
  const scale = stated("steps_per_mm") ? "steps_per_mm" : "microsteps";
  return ["max_speed", scale, "pulse_width", "max_step_rate"];
}

/** A hold current in per cent moves with the run current. */
function holdParameters(stated: Stated): ParameterName[] {
  const own: ParameterName[] = ["hold_current", "hold_scale"];
  return stated("hold_current")?.unit === "%" ? [...own, ...CURRENT] : own;
}

function judged(quantity: QuantityName, ...ruleIds: readonly string[]): QuantityChecks {
  return { quantity, ruleIds, limit: "own", restsOn: "findings" };
}

function hinted(quantity: QuantityName, ruleId: string, restsOn: QuantityChecks["restsOn"]): QuantityChecks {
  return { quantity, ruleIds: [ruleId], limit: "none", restsOn };
}

function explaining(quantity: QuantityName, restsOn: QuantityChecks["restsOn"]): QuantityChecks {
  return { quantity, ruleIds: [], limit: "none", restsOn };
}
