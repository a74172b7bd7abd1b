import { pulseRateLimit } from "@/lib/physics/step-rate";
import { exceeds, judged, judgeLower, judgeUpper, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { lower, set, shortestPulse } from "./candidates";
import { axisRule } from "./check";
import { axisPath, hardware, missing } from "./data";
import { readsOf } from "./quantities/table";
import { show } from "./show";
import type { AxisView } from "./types";

const NEAR = 0.8;

interface RateLimit {
  readonly value: number;
  readonly words: string;
}

/** Length of the high part of a step pulse, s: the text's where it has one, else the driver's shortest. */
function pulseHigh(axis: AxisView): number | null {
  const stated = axis.parameter("pulse_width");
  return stated && stated.value > 0 ? stated.value : shortestPulse(axis);
}

/** The least of the limits that are known. A limit of 0 in the text means that the text sets none. */
function rateLimit(axis: AxisView): RateLimit | null {
  const limits: RateLimit[] = [];
  const board = axis.assembly.controller_board?.max_step_rate_hz;
  if (board !== undefined) limits.push({ value: board, words: "the controller board's highest rate" });
  const stated = axis.parameter("max_step_rate");
  if (stated && stated.value > 0) limits.push({ value: stated.value, words: "the text's highest rate" });
  const high = pulseHigh(axis);
  const low = hardware(axis, "driver", "min_pulse_low_us");
  if (high !== null && low.ok)
    limits.push({
      value: pulseRateLimit(high, low.value * 1e-6),
      words: "what the driver's pulse times leave",
    });
  return limits.reduce<RateLimit | null>(
    (least, limit) => (least === null || limit.value < least.value ? limit : least),
    null,
  );
}

const LIMIT_PATHS = ["driver.min_pulse_high_us", "driver.min_pulse_low_us"] as const;

function assess(axis: AxisView): Assessment {
  const short = shortPulse(axis);
  if (short) return short;
  const rate = axis.quantity("step_rate");
  const limit = rateLimit(axis);
  if (limit === null) return missing(...(rate.ok ? [] : rate.needs), ...unknownLimits(axis));
  if (!rate.ok) return rate;
  const verdict = judgeUpper({ value: rate.value, limit: limit.value, near: NEAR * limit.value, unit: "Hz" });
  return judged(verdict, {
    assumed: rate.assumed,
    sentence: () =>
      `At maximum speed the axis asks for ${show(rate.value, "Hz")} of step pulses; ${limit.words} is ${show(limit.value, "Hz")}.`,
    formula: () => `${rate.formula()} ${upperSign(verdict)} ${show(limit.value, "Hz")}`,
  });
}

/** Any one of these would do; the pulse times only together. */
function unknownLimits(axis: AxisView): string[] {
  const times = LIMIT_PATHS.filter((path) =>
    path === "driver.min_pulse_high_us"
      ? pulseHigh(axis) === null
      : !hardware(axis, "driver", "min_pulse_low_us").ok,
  );
  return ["controller_board.max_step_rate_hz", ...times.map((path) => axisPath(axis, path))];
}

/** A pulse shorter than the driver needs is not seen at any rate. */
function shortPulse(axis: AxisView): Assessment {
  const stated = axis.parameter("pulse_width");
  const least = shortestPulse(axis);
  if (!stated || least === null || !exceeds(least, stated.value)) return null;
  return judged(judgeLower({ value: stated.value, limit: least, near: least, unit: "s" }), {
    assumed: [],
    sentence: () =>
      `The step pulse of ${show(stated.value, "s")} is shorter than the ${show(least, "s")} that the driver needs to see it.`,
    formula: () => `${show(stated.value, "s")} < ${show(least, "s")}`,
  });
}

function candidates(axis: AxisView) {
  const least = shortestPulse(axis);
  return [...lower(axis, "max_speed"), ...(least === null ? [] : set(axis, "pulse_width", least))];
}

export const STEP_RATE = axisRule({
  id: "step-rate",
  title: "Step rate",
  compares:
    "The step rate at maximum speed with the least of the board's, the text's and the driver's pulse timing; and the text's pulse with the driver's shortest.",
  formula: "v·scale ≤ min(board, text, 1/(t_high + t_low)); t_pulse ≥ t_high",
  source: "Definition of the scale; AC timing of the driver's data sheet",
  needs: [
    ...readsOf("step_rate"),
    "controller_board.max_step_rate_hz",
    "max_step_rate",
    "pulse_width",
    ...LIMIT_PATHS,
  ],
  margin: "near above 80 % of the limit, over above it, or where the pulse is too short",
  caution: null,
  coupled: true,
  parameters: () => ["max_speed", "steps_per_mm", "microsteps", "pulse_width", "max_step_rate"],
  candidates,
  assess,
});
