import { BESIDE, judged, judgeUpper, upperSign } from "./assessment";
import { currentParameters, lowerCurrent } from "./candidates";
import { axisRule } from "./check";
import { gather } from "./data";
import { RATED_READS, ratingRms } from "./quantities/current";
import { readsOf } from "./quantities/table";
import { showRms } from "./show";

export const RUN_CURRENT_MOTOR = axisRule({
  id: "run-current-motor",
  title: "Run current against the motor",
  compares: "The current in each winding with the rated current of the motor, both as rms.",
  formula: "I ≤ I_r",
  source: "Motor data sheet: rated current of each winding, both phases on",
  needs: [...readsOf("winding_current_rms"), ...RATED_READS],
  margin: "near above 90 % of the rating, over above the rating",
  caution: null,
  parameters: (axis) => currentParameters(axis, "run_current"),
  candidates: lowerCurrent,
  assess: (axis) => {
    const parts = gather({ current: axis.quantity("winding_current_rms"), rated: ratingRms(axis, "motor") });
    if (!parts.ok) return parts;
    const { current, rated } = parts.values;
    const verdict = judgeUpper({ value: current, limit: rated, near: 0.9 * rated, unit: "A" });
    return judged(verdict, {
      assumed: parts.assumed,
      sentence: () =>
        `Each winding carries ${showRms(current)}, ${BESIDE[verdict.level]} the motor's rating of ${showRms(rated)}.`,
      formula: () => `${parts.formula("current")} ${upperSign(verdict)} ${parts.formula("rated")}`,
    });
  },
});
