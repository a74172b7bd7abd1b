import { jerkStoppingDistance, stoppingDistance } from "@/lib/physics/profiles";
import { judged, judgeUpper, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { lower } from "./candidates";
import { axisRule } from "./check";
import { fromText, gather, hardware } from "./data";
import { accelerationUnit, jerkUnit, lengthUnit, speedUnit } from "./quantities/geometry";
import { jerkLimit } from "./quantities/motion";
import { show } from "./show";
import type { AxisView } from "./types";

const NEAR = 0.8;

function assess(axis: AxisView): Assessment {
  // A text that seeks no reference, and an axis that turns: there is no stop to run against.
  if (!axis.parameter("reference_run_speed") || axis.kind === "rotary") return null;
  const jerk = jerkLimit(axis);
  const parts = gather({
    speed: fromText(axis, "reference_run_speed"),
    acceleration: fromText(axis, "acceleration", "positive"),
    free: hardware(axis, "load", "reference_overtravel_mm"),
    ...(jerk && { jerk }),
  });
  if (!parts.ok) return parts;
  const free = parts.values.free / 1000;
  const unit = lengthUnit(axis);
  const stop = stopping(axis, { ...parts.values, jerk: jerk?.ok === true ? jerk.value : null });
  const verdict = judgeUpper({ value: stop.way, limit: free, near: NEAR * free, unit });
  return judged(verdict, {
    assumed: parts.assumed,
    sentence: () =>
      `From ${show(parts.values.speed, speedUnit(axis))} the axis needs ${show(stop.way, unit)} to stop${jerk ? " with the jerk of the text" : ""}; ${show(free, unit)} are free behind the reference switch.`,
    formula: () => `${stop.formula()} = ${show(stop.way, unit)} ${upperSign(verdict)} ${show(free, unit)}`,
  });
}

interface Stopping {
  /** m */
  readonly way: number;
  readonly formula: () => string;
}

/** The way to stop, m, with the jerk of the text where it has one. */
function stopping(
  axis: AxisView,
  { speed, acceleration, jerk }: { speed: number; acceleration: number; jerk: number | null },
): Stopping {
  const v = () => show(speed, speedUnit(axis));
  const a = () => show(acceleration, accelerationUnit(axis));
  if (jerk === null)
    return { way: stoppingDistance(speed, acceleration), formula: () => `(${v()})² / (2 · ${a()})` };
  const j = () => show(jerk, jerkUnit(axis));
  const reached = speed >= acceleration ** 2 / jerk;
  const time = () => (reached ? `(${v()} / ${a()} + ${a()} / ${j()})` : `2 · √(${v()} / ${j()})`);
  return {
    way: jerkStoppingDistance({ speed, acceleration, jerk }),
    formula: () => `${v()} · ${time()} / 2`,
  };
}

export const REFERENCE_RUN = axisRule({
  id: "reference-run",
  title: "Stopping at the reference switch",
  compares: "The way to stop from the reference run speed with the free travel behind the switch.",
  formula:
    "v_ref²/(2·a) ≤ free travel; with a jerk j: v_ref·t/2, t = v_ref/a + a/j where v_ref ≥ a²/j, else 2·√(v_ref/j)",
  source: "Kinematics, with a jerk of the S-curve; the delay of switch and controller comes on top",
  needs: ["reference_run_speed", "acceleration", "jerk", "load.reference_overtravel_mm", "drive_train.kind"],
  margin: "near above 80 % of the free travel, over above it",
  caution:
    "Beyond the free travel the axis runs against its stop: keep hands away while the reference is sought.",
  parameters: () => ["reference_run_speed", "acceleration", "jerk"],
  candidates: (axis) => lower(axis, "reference_run_speed"),
  assess,
});
