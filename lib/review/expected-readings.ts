import { parameterLabel } from "@/lib/domain/parameters";
import { HEAT_PLACE_WORDS } from "@/lib/domain/test-sheets";
import type { HeatPlan, LadderPlan, RunPlan, TestPlan } from "@/lib/domain/test-sheets";
import { formatNumber, showText } from "@/lib/domain/units";
import { missingSentence } from "@/lib/rules/missing-words";
import type { AxisView } from "@/lib/rules/types";

/** What the test is expected to read, with its tolerance, in sentences that are printed before it starts. */
export function expectedReadings(plan: Omit<TestPlan, "expected">, view: AxisView): string[] {
  if (plan.ladder) return [ladderReading(plan.ladder)];
  if (plan.run) return [runReading(plan.run, plan.repeatability), ...predictionOf(plan, view)];
  return plan.heat ? heatReadings(plan.heat, view) : [];
}

function ladderReading({ parameter, unit, basis, predicted, fails, set }: LadderPlan): string {
  const shown = (value: number) => `${showText(value, unit)}${basis === null ? "" : ` ${basis}`}`;
  const about = (value: number) => shown(Number(value.toPrecision(3)));
  const label = parameterLabel(parameter).toLowerCase();
  const now = set === null ? "" : ` The text sets ${shown(set)}.`;
  if (!predicted)
    return `No boundary is predicted for the ${label}; the ladder finds it from the start given by hand.${now}`;
  const { careful, farthest } = predicted;
  const until = farthest === null ? "" : `; the true boundary may lie as far as ${about(farthest)}`;
  const where = fails === "above" ? `from about ${about(careful)} on` : `below about ${about(careful)}`;
  return `Steps are lost ${where}, reckoned with care${until}.${now}`;
}

function runReading({ trials }: RunPlan, repeatability: number | null): string {
  const remainder =
    repeatability === null
      ? "a remainder that stays the same from trial to trial"
      : `a remainder of ${formatNumber(repeatability)} full steps at most`;
  return `0 full steps lost in each of ${trials} trials, with ${remainder}.`;
}

function predictionOf({ test }: Pick<TestPlan, "test">, view: AxisView): string[] {
  if (test === "corner_run") {
    const allowed = view.quantity("start_stop_speed");
    const corner = view.parameter("corner_speed");
    if (!allowed.ok)
      return [`The start-stop speed cannot be predicted. ${missingSentence(allowed, view.axis)}`];
    const set = corner ? ` The text sets ${showText(corner.value, corner.unit)}.` : "";
    return [`Predicted: the motor follows jumps up to ${showText(allowed.value, speedUnit(view))}.${set}`];
  }
  const name = test === "hold_run" ? "hold_torque_margin" : "torque_margin";
  const words = test === "hold_run" ? "hold torque margin" : "torque margin";
  const margin = view.quantity(name);
  if (!margin.ok) return [`The ${words} cannot be predicted. ${missingSentence(margin, view.axis)}`];
  return [`Predicted: a ${words} of ${formatNumber(margin.value * 100)} %.`];
}

function speedUnit({ kind }: AxisView): string {
  return kind === "rotary" ? "rad/s" : "m/s";
}

function heatReadings({ expected, ambientC }: HeatPlan, view: AxisView): string[] {
  if (expected.length === 0) {
    const found = view.quantity("winding_c");
    const why = found.ok ? "Not known: the ambient temperature." : missingSentence(found, view.axis);
    return [`No temperature can be predicted. ${why}`];
  }
  return expected.map(({ place, settledRise, riseAfter30, tolerance }) => {
    const at = (rise: number) =>
      ambientC === null
        ? ""
        : ` (${formatNumber(ambientC + rise)} °C in a room of ${formatNumber(ambientC)} °C)`;
    const early =
      riseAfter30 === null
        ? "after 30 min not known, since the motor's thermal time constant is missing"
        : `${formatNumber(riseAfter30)} K above ambient after 30 min`;
    const name = HEAT_PLACE_WORDS[place];
    return `${name.charAt(0).toUpperCase()}${name.slice(1)}: ${formatNumber(settledRise)} K above ambient once settled${at(settledRise)}, ${early}; within ${formatNumber(tolerance)} K.`;
  });
}
