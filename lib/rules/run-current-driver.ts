import { BESIDE, judged, judgeUpper, upperSign } from "./assessment";
import { currentParameters, lowerCurrent } from "./candidates";
import { axisRule } from "./check";
import { gather } from "./data";
import { ratingRms } from "./quantities/current";
import { readsOf } from "./quantities/table";
import { showRms } from "./show";

export const RUN_CURRENT_DRIVER = axisRule({
  id: "run-current-driver",
  title: "Run current against the driver",
  compares: "The current in each winding with the maximum current of the driver, both as rms.",
  formula: "I ≤ I_max of the driver",
  source: "Driver data sheet: maximum current",
  needs: [...readsOf("winding_current_rms"), "driver.max_current_a", "driver.max_current_basis"],
  margin: "near above 90 % of the maximum, over above the maximum",
  caution: null,
  parameters: (axis) => currentParameters(axis, "run_current"),
  candidates: lowerCurrent,
  assess: (axis) => {
    const parts = gather({ current: axis.quantity("winding_current_rms"), most: ratingRms(axis, "driver") });
    if (!parts.ok) return parts;
    const { current, most } = parts.values;
    const verdict = judgeUpper({ value: current, limit: most, near: 0.9 * most, unit: "A" });
    return judged(verdict, {
      assumed: parts.assumed,
      sentence: () =>
        `The driver gives ${showRms(current)}, ${BESIDE[verdict.level]} its maximum of ${showRms(most)}.`,
      formula: () => `${parts.formula("current")} ${upperSign(verdict)} ${parts.formula("most")}`,
    });
  },
});
