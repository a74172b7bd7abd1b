import { judged, judgeUpper, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { axisRule } from "./check";
import type { Candidate } from "./clearing";
import { axisPath, gather, given, missing, unusable } from "./data";
import { lengthUnit } from "./quantities/geometry";
import { show } from "./show";
import type { AxisView, Datum } from "./types";

/** Between the software ends, m (rad). */
function softTravel(axis: AxisView): Datum {
  const [least, most] = [axis.parameter("travel_min"), axis.parameter("travel_max")];
  if (!least || !most)
    return missing(
      ...(least ? [] : [axisPath(axis, "travel_min")]),
      ...(most ? [] : [axisPath(axis, "travel_max")]),
    );
  if (most.value > least.value) return given(most.value - least.value);
  return unusable(
    "The upper end of the software travel does not lie above the lower one.",
    axisPath(axis, "travel_max"),
  );
}

/** Between the hard stops, m (rad). */
function hardTravel({ axis, kind, hardware: { travel_mm, travel_deg } }: AxisView): Datum {
  if (kind === "rotary")
    return travel_deg === undefined
      ? missing(`axes.${axis}.travel_deg`)
      : given((travel_deg * Math.PI) / 180);
  return travel_mm === undefined ? missing(`axes.${axis}.travel_mm`) : given(travel_mm / 1000);
}

function assess(axis: AxisView): Assessment {
  // Without software ends there is nothing to compare: the travel is the machine's own.
  if (!axis.parameter("travel_min") && !axis.parameter("travel_max")) return null;
  const parts = gather({ soft: softTravel(axis), hard: hardTravel(axis) });
  if (!parts.ok) return parts;
  const { soft, hard } = parts.values;
  const unit = lengthUnit(axis);
  const verdict = judgeUpper({ value: soft, limit: hard, near: hard, unit });
  return judged(verdict, {
    assumed: parts.assumed,
    sentence: () =>
      verdict.level === "over"
        ? `The software lets the axis travel ${show(soft, unit)}, and it has only ${show(hard, unit)}: it can run against its stop.`
        : `The software lets the axis travel ${show(soft, unit)} of its ${show(hard, unit)}.`,
    formula: () => `${show(soft, unit)} ${upperSign(verdict)} ${show(hard, unit)}`,
  });
}

/** Bringing the upper end as near to the lower one as the machine allows. */
function candidates(view: AxisView): Candidate[] {
  const [least, most] = [view.parameter("travel_min"), view.parameter("travel_max")];
  const hard = hardTravel(view);
  if (!least || !most || !hard.ok) return [];
  return [{ view, parameter: "travel_max", aim: { kind: "set", to: least.value + hard.value } }];
}

export const SOFT_TRAVEL = axisRule({
  id: "soft-travel",
  title: "Software travel inside the machine's",
  compares: "The travel between the software ends with the travel of the axis.",
  formula: "travel_max − travel_min ≤ travel of the axis",
  source: "Geometry; where the ends lie from the reference is not known here",
  needs: ["travel_min", "travel_max", "axis.travel_mm", "axis.travel_deg", "drive_train.kind"],
  margin: "over above the travel of the axis; there is nothing near it",
  caution: "An axis that runs against its stop can break what is in its way: keep hands away.",
  parameters: () => ["travel_max", "travel_min"],
  candidates,
  assess,
});
