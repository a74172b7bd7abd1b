import { formatNumber } from "@/lib/domain/units";
import { judged, judgeUpper, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { set } from "./candidates";
import { axisRule } from "./check";
import { gather } from "./data";
import { isScaleReversed, scaleUnit, textScale } from "./quantities/geometry";
import { readsOf } from "./quantities/table";
import { plain, showPercent, showScale } from "./show";
import type { AxisView } from "./types";

const OVER = 0.005;
const NEAR = 0.001;

/** Ratios of a scale to the right one that have a usual cause. */
const FACTORS: readonly (readonly [number, string, string])[] = [
  [2, "2", "twice the microsteps, or a motor of 0.9° taken for one of 1.8°"],
  [4, "4", "four times the microsteps"],
  [8, "8", "eight times the microsteps"],
  [16, "16", "sixteen times the microsteps"],
  [1 / 2, "½", "half the microsteps, or a motor of 1.8° taken for one of 0.9°"],
  [1 / 4, "¼", "a quarter of the microsteps"],
  [1 / 8, "⅛", "an eighth of the microsteps"],
  [1 / 16, "1/16", "a sixteenth of the microsteps"],
  [25.4, "25.4", "steps for an inch in place of a millimetre"],
  [1 / 25.4, "1/25.4", "steps for a millimetre taken as for an inch"],
];

/** "That is a factor of 2: …" where the deviation has a usual cause, else nothing. */
function likelyFactor(ratio: number): string {
  const found = FACTORS.find(([factor]) => Math.abs(ratio / factor - 1) <= OVER);
  return found ? ` That is a factor of ${found[1]}: ${found[2]}.` : "";
}

function assess(axis: AxisView): Assessment {
  const parts = gather({ stated: textScale(axis), expected: axis.quantity("steps_per_mm_expected") });
  if (!parts.ok) return parts;
  const { stated, expected } = parts.values;
  const deviation = Math.abs(stated / expected - 1);
  const verdict = judgeUpper({ value: deviation, limit: OVER, near: NEAR, unit: "" });
  const unit = scaleUnit(axis);
  const isReversed = isScaleReversed(axis);
  const shown = showScale(isReversed ? -stated : stated, unit);
  const direction = isReversed ? " Its sign is the direction and nothing else." : "";
  return judged(verdict, {
    assumed: parts.assumed,
    sentence: () =>
      verdict.level === "within"
        ? `The scale of ${shown} is what the geometry gives.${direction}`
        : `The scale of ${shown} is ${showPercent(deviation)} off the ${showScale(expected, unit)} that the geometry gives.${likelyFactor(stated / expected)}${direction}`,
    formula: () =>
      `|${isReversed ? `|${plain(-stated)}|` : plain(stated)} / (${parts.formula("expected")}) − 1| = ${formatNumber(deviation, 2)} ${upperSign(verdict)} ${OVER}`,
  });
}

/** The scale of the geometry, with the sign that the text gives the direction. */
function candidates(axis: AxisView) {
  const expected = axis.quantity("steps_per_mm_expected");
  const sign = isScaleReversed(axis) ? -1 : 1;
  return expected.ok ? set(axis, "steps_per_mm", sign * expected.value) : [];
}

export const STEPS_PER_MM = axisRule({
  id: "steps-per-mm",
  title: "Steps per mm against the geometry",
  compares: "The scale of the text with the one that step angle, microsteps and drive train give.",
  formula: "|scale / (360°/step angle·microsteps/travel of one turn) − 1| ≤ 0.5 %",
  source: "Geometry of the drive train",
  needs: ["steps_per_mm", ...readsOf("steps_per_mm_expected")],
  margin: "near above 0.1 %, over above 0.5 %",
  caution: null,
  parameters: () => ["steps_per_mm", "microsteps"],
  candidates,
  assess,
});
