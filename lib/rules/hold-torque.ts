import { judged, judgeLower, lowerSign } from "./assessment";
import type { Assessment } from "./assessment";
import { currentParameters, raiseCurrent } from "./candidates";
import { axisRule } from "./check";
import { gather, given } from "./data";
import { weight } from "./quantities/load";
import { readsOf } from "./quantities/table";
import { plain, showPercent } from "./show";
import type { AxisView } from "./types";

const OVER = 1;
const NEAR = 1.5;

function assess(axis: AxisView): Assessment {
  const along = weight(axis);
  // A level axis, or one in perfect balance: there is nothing to hold, and the check has no meaning.
  if (along.ok && along.value === 0) return null;
  const margin = axis.quantity("hold_torque_margin");
  // The weight is named first where it is missing: without it nobody knows whether there is anything to hold.
  const parts = gather({ along: along.ok ? given(along.value) : along, margin });
  if (!parts.ok) return parts;
  const { margin: value } = parts.values;
  const verdict = judgeLower({ value, limit: OVER, near: NEAR, unit: "" });
  const braked = axis.hardware.load?.holding_brake === true && verdict.level === "over";
  return judged(
    { ...verdict, level: braked ? "near" : verdict.level },
    {
      assumed: parts.assumed,
      sentence: () => holdSentence(value, braked),
      formula: () => `${parts.formula("margin")} ${lowerSign(verdict)} ${plain(OVER)}`,
    },
  );
}

function holdSentence(margin: number, braked: boolean): string {
  const brake = braked ? " A holding brake carries it." : "";
  if (margin < 0)
    return `On hold current the load falls: the torque is ${showPercent(-margin)} short of its weight.${brake}`;
  return `On hold current the torque is ${showPercent(margin)} above what the weight of the load asks; 100 % are wanted.${brake}`;
}

export const HOLD_TORQUE = axisRule({
  id: "hold-torque",
  title: "Hold torque of a raised load",
  compares:
    "The holding torque at hold current with the torque that the weight along the axis asks of each motor.",
  formula: "Th(I_hold)/(|W|/n·r) − 1 ≥ 1",
  source:
    "Weight resolved along the axis; torque in proportion to current (Acarnley, Stepping Motors); factor 2 is the product's choice",
  needs: [...readsOf("hold_torque_margin"), "load.holding_brake"],
  margin: "over below 1.0 (near with a holding brake), near below 1.5; below 0 the load falls",
  caution:
    "A raised load can fall when its current is cut, reduced or lost. Block it or brake it before hands go under it; this check judges numbers, not safety.",
  cautionAlways: true,
  coupled: true,
  parameters: (axis) => [
    ...currentParameters(axis, "hold_current"),
    ...(axis.parameter("hold_current")?.unit === "%" ? currentParameters(axis, "run_current") : []),
  ],
  candidates: (axis) => [
    ...raiseCurrent(axis, "hold_current"),
    ...(axis.parameter("hold_current")?.unit === "%" ? raiseCurrent(axis, "run_current") : []),
  ],
  assess,
});
