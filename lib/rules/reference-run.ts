import { stoppingDistance } from "@/lib/physics/profiles";
import { judged, judgeUpper, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { lower } from "./candidates";
import { axisRule } from "./check";
import { fromText, gather, hardware } from "./data";
import { accelerationUnit, lengthUnit, speedUnit } from "./quantities/geometry";
import { show } from "./show";
import type { AxisView } from "./types";

const NEAR = 0.8;

function assess(axis: AxisView): Assessment {
  // A text that seeks no reference, and an axis that turns: there is no stop to run against.
  if (!axis.parameter("reference_run_speed") || axis.kind === "rotary") return null;
  const parts = gather({
    speed: fromText(axis, "reference_run_speed"),
    acceleration: fromText(axis, "acceleration", "positive"),
    free: hardware(axis, "load", "reference_overtravel_mm"),
  });
  if (!parts.ok) return parts;
  const { speed, acceleration } = parts.values;
  const free = parts.values.free / 1000;
  const unit = lengthUnit(axis);
  const value = stoppingDistance(speed, acceleration);
  const verdict = judgeUpper({ value, limit: free, near: NEAR * free, unit });
  return judged(verdict, {
    assumed: parts.assumed,
    sentence: () =>
      `From ${show(speed, speedUnit(axis))} the axis needs ${show(value, unit)} to stop; ${show(free, unit)} are free behind the reference switch.`,
    formula: () =>
      `(${show(speed, speedUnit(axis))})² / (2 · ${show(acceleration, accelerationUnit(axis))}) = ${show(value, unit)} ${upperSign(verdict)} ${show(free, unit)}`,
  });
}

export const REFERENCE_RUN = axisRule({
  id: "reference-run",
  title: "Stopping at the reference switch",
  compares: "The way to stop from the reference run speed with the free travel behind the switch.",
  formula: "v_ref²/(2·a) ≤ free travel",
  source: "Kinematics; the delay of switch and controller comes on top",
  needs: ["reference_run_speed", "acceleration", "load.reference_overtravel_mm", "drive_train.kind"],
  margin: "near above 80 % of the free travel, over above it",
  caution:
    "Beyond the free travel the axis runs against its stop: keep hands away while the reference is sought.",
  parameters: () => ["reference_run_speed", "acceleration"],
  candidates: (axis) => lower(axis, "reference_run_speed"),
  assess,
});
