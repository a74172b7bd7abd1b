import { judged, judgeUpper, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { currentParameters, lower, raiseCurrent } from "./candidates";
import { axisRule } from "./check";
import { axisPath, fromText, gather, missing } from "./data";
import { speedUnit } from "./quantities/geometry";
import { readsOf } from "./quantities/table";
import { show } from "./show";
import type { AxisView, Datum } from "./types";

const NEAR = 0.8;

/** From a corner deviation alone the jump of one axis does not follow: it depends on the path. */
function cornerSpeed(axis: AxisView): Datum {
  const found = fromText(axis, "corner_speed");
  if (found.ok || axis.parameter("corner_speed") || !axis.parameter("corner_deviation")) return found;
  return {
    ...missing(axisPath(axis, "corner_speed")),
    reason: "From a corner deviation alone the speed jump of this axis does not follow.",
  };
}

function assess(axis: AxisView): Assessment {
  const parts = gather({ corner: cornerSpeed(axis), allowed: axis.quantity("start_stop_speed") });
  if (!parts.ok) return parts;
  const { corner, allowed } = parts.values;
  const unit = speedUnit(axis);
  const verdict = judgeUpper({ value: corner, limit: allowed, near: NEAR * allowed, unit });
  return judged(verdict, {
    assumed: parts.assumed,
    sentence: () =>
      `At a corner the speed may jump by ${show(corner, unit)}; the motor is sure to follow a jump of ${show(allowed, unit)}.`,
    formula: () => `${show(corner, unit)} ${upperSign(verdict)} ${parts.formula("allowed")}`,
  });
}

export const CORNER_SPEED = axisRule({
  id: "corner-speed",
  title: "Corner speed",
  compares: "The largest jump of the axis's speed at a corner with its start-stop speed.",
  formula: "v_corner ≤ 0.5·Δω·r, ½·J·Δω² = (T/Nr)·(2·cos δ − (π − 2·δ)·sin δ), sin δ = T_L/T",
  source: "Equal-area criterion; half of the bound is the product's choice, since a rotor may still ring",
  needs: ["corner_speed", "corner_deviation", ...readsOf("start_stop_speed")],
  margin: "near above 80 % of the start-stop speed, over above it",
  caution: null,
  coupled: true,
  parameters: (axis) => ["corner_speed", ...currentParameters(axis, "run_current")],
  candidates: (axis) => [...lower(axis, "corner_speed"), ...raiseCurrent(axis, "run_current")],
  assess,
});
