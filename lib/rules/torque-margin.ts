import { exceeds, judged, judgeLower, lowerSign } from "./assessment";
import type { Assessment } from "./assessment";
import { currentParameters, lower, raiseCurrent } from "./candidates";
import { axisRule } from "./check";
import { gather } from "./data";
import { speedUnit } from "./quantities/geometry";
import { readsOf } from "./quantities/table";
import { plain, show, showPercent } from "./show";
import type { AxisView } from "./types";

const NEAR = 1.2;

/** The margin that the policy wants: more above the voltage-limit speed, where resonance and ramps cost torque. */
function wanted(axis: AxisView, peak: number, limitSpeed: number) {
  const above = exceeds(peak, limitSpeed);
  const { policy } = axis;
  return above
    ? { above, limit: policy.torque_margin_above_limit_speed }
    : { above, limit: policy.torque_margin_below_limit_speed };
}

function assess(axis: AxisView): Assessment {
  const parts = gather({
    available: axis.quantity("torque_available"),
    required: axis.quantity("torque_required"),
    peak: axis.quantity("peak_speed"),
    limitSpeed: axis.quantity("voltage_limit_speed"),
  });
  if (!parts.ok) return parts;
  const { available, required, peak, limitSpeed } = parts.values;
  const { above, limit } = wanted(axis, peak, limitSpeed);
  const margin = axis.quantity("torque_margin");
  const unit = speedUnit(axis);
  if (!margin.ok) return required === 0 ? nothingRequired(limit, parts.assumed) : margin;
  const verdict = judgeLower({ value: margin.value, limit, near: NEAR * limit, unit: "" });
  return judged(verdict, {
    assumed: parts.assumed,
    sentence: () =>
      `At ${show(peak, unit)} each motor can give ${show(available, "N·m")} and needs ${show(required, "N·m")}: a margin of ${showPercent(margin.value)}, where ${showPercent(limit)} are wanted ${above ? "above" : "up to"} the voltage-limit speed of ${show(limitSpeed, unit)}.`,
    formula: () =>
      `${margin.formula()} ${lowerSign(verdict)} ${plain(limit)}; ${parts.formula("available")}; ${parts.formula("required")}`,
  });
}

/** No mass, no friction and no acceleration: any torque is enough. */
function nothingRequired(limit: number, assumed: readonly string[]): Assessment {
  return {
    ok: true,
    level: "within",
    value: null,
    limit,
    nearLimit: NEAR * limit,
    limitSense: "lower",
    margin: null,
    unit: "",
    assumed,
    sentence: () => "Nothing is required of the motor.",
    formula: () => "0 N·m required",
  };
}

export const TORQUE_MARGIN = axisRule({
  id: "torque-margin",
  title: "Torque margin at speed",
  compares:
    "The torque that each motor can give at the highest speed reached with the torque that the move needs there.",
  formula: "T_available/T_required − 1 ≥ policy",
  source:
    "Conservative pull-out (Acarnley, Stepping Motors; Kenjo & Sugawara) and load torque from mechanics; margins are the team's policy",
  needs: readsOf("torque_margin", "voltage_limit_speed", "peak_speed"),
  margin:
    "over below the policy's margin (0.5 up to the voltage-limit speed, 1.0 above it), near below 1.2 times that",
  caution: null,
  coupled: true,
  parameters: (axis) => [
    "acceleration",
    "max_speed",
    ...currentParameters(axis, "run_current"),
    "travel_min",
    "travel_max",
  ],
  candidates: (axis) => [...lower(axis, "acceleration", "max_speed"), ...raiseCurrent(axis, "run_current")],
  assess,
});
