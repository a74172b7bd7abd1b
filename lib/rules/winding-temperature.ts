import { judged, judgeTemperature, unbounded, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { currentParameters, lowerCurrent } from "./candidates";
import { axisRule } from "./check";
import { gather, hardware } from "./data";
import { readsOf } from "./quantities/table";
import { show } from "./show";
import type { AxisView } from "./types";

const OVER = 10;
const NEAR = 20;

function assess(axis: AxisView): Assessment {
  const winding = axis.quantity("winding_c");
  const insulation = hardware(axis, "motor", "winding_limit_c");
  if (insulation.ok && !winding.ok && winding.runaway === true && winding.needs.length === 0)
    return judged(unbounded(insulation.value - OVER, insulation.value - NEAR), {
      assumed: insulation.assumed,
      sentence: () => winding.reason,
      formula: () => "R_th·2·I²·R ≥ 254.5 K",
    });
  const parts = gather({ winding, insulation });
  if (!parts.ok) return parts;
  const { winding: value } = parts.values;
  const limit = parts.values.insulation - OVER;
  const verdict = judgeTemperature({ value, limit, near: parts.values.insulation - NEAR });
  return judged(verdict, {
    assumed: parts.assumed,
    sentence: () =>
      `Standing on run current the winding settles at ${show(value, "°C")}; at most ${show(limit, "°C")} are allowed.`,
    formula: () => `${parts.formula("winding")} ${upperSign(verdict)} ${show(limit, "°C")}`,
  });
}

export const WINDING_TEMPERATURE = axisRule({
  id: "winding-temperature",
  title: "Winding temperature",
  compares:
    "The settled winding temperature at standstill on run current with the winding's limit less 10 K.",
  formula: "T = Ta + R_th·2·I²·R·(234.5 + T)/254.5 ≤ T_limit − 10 K",
  source:
    "Copper resistance after IEC 60034-1; limit after IEC 60085 class, less 10 K since the mean lies below the hot spot",
  needs: [...readsOf("winding_c"), "motor.winding_limit_c"],
  margin: "near less than 20 K below the winding's limit, over less than 10 K below it",
  caution: null,
  parameters: (axis) => currentParameters(axis, "run_current"),
  candidates: lowerCurrent,
  assess,
});
