import { exceeds, judged, judgeTemperature, unbounded, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { currentParameters, lowerCurrent } from "./candidates";
import { axisRule } from "./check";
import { gather } from "./data";
import { junctionLimit } from "./quantities/driver";
import { readsOf } from "./quantities/table";
import { show } from "./show";
import type { AxisView } from "./types";

const NEAR = 15;

/**
 * Without the junction's own limit only the policy's can be held against, which is enough to say `over` and not enough
 * to say anything better.
 */
function assess(axis: AxisView): Assessment {
  const junction = axis.quantity("driver_junction_c");
  const limit = junctionLimit(axis);
  const overAnyway = junction.ok
    ? exceeds(junction.value, axis.policy.junction_limit_c)
    : junction.runaway === true && junction.needs.length === 0;
  const most = limit.ok ? limit.value : axis.policy.junction_limit_c;
  if (!limit.ok && !overAnyway) {
    const lack = gather({ junction, limit });
    return lack.ok ? null : lack;
  }
  if (!junction.ok) return overAnyway ? runaway(junction.reason, most) : junction;
  const verdict = judgeTemperature({ value: junction.value, limit: most, near: most - NEAR });
  return judged(verdict, {
    assumed: junction.assumed,
    sentence: () =>
      `The driver's junction settles at ${show(junction.value, "°C")}; at most ${show(most, "°C")} are allowed.`,
    formula: () => `${junction.formula()} ${upperSign(verdict)} ${show(most, "°C")}`,
  });
}

function runaway(reason: string, limit: number): Assessment {
  return judged(unbounded(limit, limit - NEAR), {
    assumed: [],
    sentence: () => reason,
    formula: () => "R_th·P0·0.005/K ≥ 1",
  });
}

export const DRIVER_JUNCTION = axisRule({
  id: "driver-junction",
  title: "Driver junction temperature",
  compares:
    "The settled junction temperature of the driver with the policy's limit and with its own limit less 25 K.",
  formula: "Tj = Ta + R_th·(2·I²·R_on·(1 + 0.005/K·(Tj − T0)) + P_q + P_sw) ≤ min(policy, Tj,max − 25 K)",
  source: "Driver data sheet; on-resistance grows by 0.5 % for each kelvin",
  needs: [...readsOf("driver_junction_c"), "driver.junction_limit_c"],
  margin: "near less than 15 K below the limit, over above it, or where the temperature never settles",
  caution: null,
  parameters: (axis) => currentParameters(axis, "run_current"),
  candidates: lowerCurrent,
  assess,
});
