import { BESIDE, judged, judgeUpper, upperSign } from "./assessment";
import { currentParameters, lowerCurrent } from "./candidates";
import { axisRule } from "./check";
import { gather, setPoint } from "./data";
import { readsOf } from "./quantities/table";
import { show } from "./show";

const OVER = 0.6;
const NEAR = 0.5;

/**
 * A driver that is told its current directly has a sense resistor all the same, or its bridge would not know when to
 * stop: the check stays, and says what is missing where nobody has recorded the resistor. Only a resistance recorded as
 * 0 says that there is none (the driver measures in its own bridge), and then there is nothing to heat.
 */
export const SENSE_RESISTOR = axisRule({
  id: "sense-resistor",
  title: "Heat of the sense resistor",
  compares: "The heat of the sense resistor at standstill on full current with 60 % of its rating.",
  formula: "I_pk²·Rs ≤ 0.6·P_rated",
  source:
    "Joule's law at standstill on a position of full current, the worst case; 0.6 is the product's choice",
  needs: [...readsOf("sense_resistor_power"), "driver.set_point.sense_resistor_rating_w"],
  margin: "near above 50 % of the rating, over above 60 %",
  caution: null,
  parameters: (axis) => currentParameters(axis, "run_current"),
  candidates: lowerCurrent,
  assess: (axis) => {
    const sense = setPoint(axis, "sense_resistance_ohm");
    if (sense.ok && sense.value === 0) return null;
    const parts = gather({
      power: axis.quantity("sense_resistor_power"),
      rating: setPoint(axis, "sense_resistor_rating_w"),
    });
    if (!parts.ok) return parts;
    const { power, rating } = parts.values;
    const limit = OVER * rating;
    const verdict = judgeUpper({ value: power, limit, near: NEAR * rating, unit: "W" });
    return judged(verdict, {
      assumed: parts.assumed,
      sentence: () =>
        `At standstill the sense resistor turns ${show(power, "W")} into heat, ${BESIDE[verdict.level]} the ${show(limit, "W")} that 60 % of its rating allow.`,
      formula: () =>
        `${parts.formula("power")} ${upperSign(verdict)} ${OVER} · ${show(rating, "W")} = ${show(limit, "W")}`,
    });
  },
});
