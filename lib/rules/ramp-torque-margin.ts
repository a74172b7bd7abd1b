import { judged, judgeLower, lowerSign } from "./assessment";
import type { Assessment } from "./assessment";
import { currentParameters, lower, raiseCurrent } from "./candidates";
import { axisRule } from "./check";
import { accelerationUnit, speedUnit } from "./quantities/geometry";
import { weakestPlace } from "./quantities/ramp";
import type { WeakestPlace } from "./quantities/ramp";
import { readsOf } from "./quantities/table";
import { plain, show, showPercent } from "./show";
import type { AxisView } from "./types";

const NEAR = 1.2;

function assess(axis: AxisView): Assessment {
  const place = weakestPlace(axis);
  if (place === null) return null;
  if (!place.ok) return place;
  const { margin, wanted, assumed } = place;
  const verdict = judgeLower({ value: margin, limit: wanted, near: NEAR * wanted, unit: "" });
  return judged(verdict, {
    assumed,
    sentence: () => rampSentence(axis, place),
    formula: () =>
      `${show(place.available, "N·m")} / ${show(place.required, "N·m")} − 1 = ${plain(margin)} ${lowerSign(verdict)} ${plain(wanted)}`,
  });
}

function rampSentence(axis: AxisView, place: WeakestPlace): string {
  const { speed, peak, margin, wanted, acceleration, limitSpeed } = place;
  const unit = speedUnit(axis);
  const where = speed > limitSpeed ? "above" : "up to";
  return `From rest to ${show(peak, unit)} each motor has least to spare at ${show(speed, unit)}, still accelerating with ${show(acceleration, accelerationUnit(axis))}: a margin of ${showPercent(margin)}, where ${showPercent(wanted)} are wanted ${where} the voltage-limit speed of ${show(limitSpeed, unit)}.`;
}

export const RAMP_TORQUE_MARGIN = axisRule({
  id: "ramp-torque-margin",
  title: "Torque margin along the ramp",
  compares:
    "The torque that each motor can give at every speed of the ramp with what the ramp asks there, with the jerk of the text.",
  formula:
    "min over v of T_available(v)/T_required(a(v)) − 1 ≥ policy(v); a(v) = min(a, √(2·j·v), √(2·j·(v_p − v)))",
  source:
    "Conservative pull-out (Acarnley, Stepping Motors; Kenjo & Sugawara) and kinematics of the S-curve; margins are the team's policy",
  needs: readsOf("ramp_torque_margin"),
  margin:
    "over below the policy's margin (0.5 up to the voltage-limit speed, 1.0 above it), near below 1.2 times that",
  caution: null,
  coupled: true,
  parameters: (axis) => [
    "acceleration",
    "max_speed",
    "jerk",
    ...currentParameters(axis, "run_current"),
    "travel_min",
    "travel_max",
  ],
  candidates: (axis) => [...lower(axis, "acceleration", "max_speed"), ...raiseCurrent(axis, "run_current")],
  assess,
});
