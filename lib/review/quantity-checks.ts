import type { ParameterName } from "@/lib/domain/parameters";
import type { QuantityName } from "@/lib/domain/quantities";

/** How the limit of a check relates to the quantity in its row. */
type LimitKind =
  /** The check compares this quantity with its limit. */
  | "own"
  /** The quantity is itself the limit, and the check's value must stay below it. */
  | "is_limit"
  /** The check has no limit in the unit of this quantity. */
  | "none";

export interface QuantityChecks {
  readonly quantity: QuantityName;
  /** Checks that judge the quantity, the leading one first. */
  readonly ruleIds: readonly string[];
  readonly limit: LimitKind;
  /** Only where no check names them: the parameters that the quantity rests on (CHECK.md's definitions). */
  readonly restsOn: readonly ParameterName[];
}

const CURRENT = ["run_current", "reference_voltage", "current_scale"] as const;
const HOLD = ["hold_current", "hold_scale", ...CURRENT] as const;
const TOP_SPEED = ["max_speed", "acceleration", "travel_min", "travel_max"] as const;

/** Every quantity in the order of the effects table: what loses steps or gets hot first, then what explains it. */
export const QUANTITY_CHECKS: readonly QuantityChecks[] = [
  judged("torque_margin", ["torque-margin"]),
  judged("case_c", ["mount-temperature", "touch-temperature"]),
  judged("winding_c", ["winding-temperature"]),
  judged("driver_junction_c", ["driver-junction"]),
  judged("step_rate", ["step-rate"]),
  { quantity: "start_stop_speed", ruleIds: ["corner-speed"], limit: "is_limit", restsOn: [] },
  judged("hold_torque_margin", ["hold-torque"]),
  hinted("resonance_hz", ["resonance"]),
  judged("sense_resistor_power", ["sense-resistor"]),
  judged("bus_voltage_after_braking", ["braking-voltage"]),
  judged("winding_current_rms", ["run-current-motor", "run-current-driver"]),
  explaining("hold_current_rms", HOLD),
  hinted("peak_speed", ["speed-reached"]),
  hinted("steps_per_mm_expected", ["steps-per-mm"]),
  explaining("voltage_limit_speed", CURRENT),
  explaining("torque_available", [...CURRENT, ...TOP_SPEED]),
  explaining("torque_required", ["acceleration"]),
  explaining("driver_power", CURRENT),
  hinted("full_step_rate", ["resonance"]),
  hinted("minimum_current_peak", ["microstep-current"]),
];

function judged(quantity: QuantityName, ruleIds: readonly string[]): QuantityChecks {
  return { quantity, ruleIds, limit: "own", restsOn: [] };
}

function hinted(quantity: QuantityName, ruleIds: readonly string[]): QuantityChecks {
  return { quantity, ruleIds, limit: "none", restsOn: [] };
}

function explaining(quantity: QuantityName, restsOn: readonly ParameterName[]): QuantityChecks {
  return { quantity, ruleIds: [], limit: "none", restsOn };
}
