import type { HeatPlan } from "@/lib/domain/test-sheets";
import type { QuantityName } from "@/lib/domain/quantities";
import { temperatureAfter } from "@/lib/physics/evidence/heating";
import type { AxisView } from "@/lib/rules/types";

/**
 * What a measured rise may differ from the predicted one before it says something: a fifth, and 5 K at least. Common
 * practice, no source: thermal resistances of catalogs are rarely better known.
 */
const TOLERANCE_SHARE = 0.2;
const LEAST_TOLERANCE = 5;

const HALF_AN_HOUR = 30 * 60;

const PLACES = [
  ["case", "case_c"],
  ["winding", "winding_c"],
] as const satisfies readonly (readonly [HeatPlan["expected"][number]["place"], QuantityName])[];

/** Expected rises above ambient, K, settled and after 30 min; places whose temperature cannot be predicted are left out. */
export function heatPlan(view: AxisView): HeatPlan {
  const { motor_ambient_c, ambient_c } = view.assembly;
  const ambient = motor_ambient_c ?? ambient_c ?? null;
  const timeConstant = view.hardware.motor?.thermal_time_constant_s;
  const expected = PLACES.flatMap(([place, quantity]) => {
    const settled = view.quantity(quantity);
    if (!settled.ok || ambient === null) return [];
    const settledRise = settled.value - ambient;
    const riseAfter30 = timeConstant
      ? temperatureAfter({ start: 0, settled: settledRise, time: HALF_AN_HOUR, timeConstant })
      : null;
    const tolerance = Math.max(LEAST_TOLERANCE, TOLERANCE_SHARE * Math.abs(settledRise));
    return [{ place, settledRise, riseAfter30, tolerance }];
  });
  return { expected, ambientC: ambient };
}
