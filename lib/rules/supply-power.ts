import { judged, judgeUpper, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { lower } from "./candidates";
import { machineRule } from "./check";
import { bothMissing, gather, given, missing } from "./data";
import { readsOf } from "./quantities/table";
import { show } from "./show";
import type { RuleContext } from "./types";

const NEAR = 0.8;

function assess(context: RuleContext): Assessment {
  if (context.axes.length === 0) return null;
  const stated = context.input.assembly.supply?.rated_power_w;
  const rating = stated === undefined ? missing("supply.rated_power_w") : given(stated);
  const load = context.quantity("supply_load");
  if (!load.ok) return rating.ok ? load : bothMissing(load, rating);
  const parts = gather({ load, rating });
  if (!parts.ok) return parts;
  const { load: value, rating: most } = parts.values;
  const verdict = judgeUpper({ value, limit: most, near: NEAR * most, unit: "W" });
  return judged(verdict, {
    assumed: parts.assumed,
    sentence: () =>
      `With all axes accelerating at their highest speed the supply gives ${show(value, "W")} of its ${show(most, "W")}.`,
    formula: () => `${parts.formula("load")} ${upperSign(verdict)} ${show(most, "W")}`,
  });
}

export const SUPPLY_POWER = machineRule({
  id: "supply-power",
  title: "Power of the supply",
  compares: "The power that all axes take together at their highest speed with the supply's rating.",
  formula: "(Σ n·(2·I²·R(T) + P_driver + T_required·ω) + P_other)/0.85 ≤ P_rated; shared motors count once",
  source:
    "Balance of power; 0.85 for iron and wiring is the product's choice, load up to 80 % of the rating common practice, no source",
  needs: [...readsOf("supply_load"), "supply.rated_power_w"],
  margin: "near above 80 % of the rating, over above it",
  caution: null,
  parameters: ["run_current", "max_speed", "acceleration"],
  candidates: ({ axes }) => axes.flatMap((axis) => lower(axis, "max_speed")),
  assess,
});
