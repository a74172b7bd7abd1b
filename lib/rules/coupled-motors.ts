import { judged, judgeLower, lowerSign } from "./assessment";
import type { Assessment } from "./assessment";
import { lower } from "./candidates";
import { machineRule } from "./check";
import { weakestPair } from "./quantities/coupled";
import { coupledPairs } from "./quantities/shared-motors";
import { readsOf } from "./quantities/table";
import { plain, show, showPercent } from "./show";
import type { RuleContext } from "./types";

const NEAR = 1.2;

function assess(context: RuleContext): Assessment {
  const pair = weakestPair(context);
  if (pair === null) return null;
  if (!pair.ok) return pair;
  const { margin, available, required, speed, limitSpeed, assumed } = pair;
  const [one, other] = pair.axes;
  const { policy } = one;
  const wanted =
    speed > limitSpeed * (1 + 1e-9)
      ? policy.torque_margin_above_limit_speed
      : policy.torque_margin_below_limit_speed;
  const verdict = judgeLower({ value: margin, limit: wanted, near: NEAR * wanted, unit: "" });
  return judged(verdict, {
    assumed,
    sentence: () =>
      `When axes ${one.axis} and ${other.axis} accelerate together, one of their shared motors turns at ${plain(speed)} rad/s, can give ${show(available, "N·m")} and needs ${show(required, "N·m")}: a margin of ${showPercent(margin)}, where ${showPercent(wanted)} are wanted.`,
    formula: () =>
      `${show(available, "N·m")} / ${show(required, "N·m")} − 1 = ${plain(margin)} ${lowerSign(verdict)} ${plain(wanted)}`,
  });
}

export const COUPLED_MOTORS = machineRule({
  id: "coupled-motors",
  title: "Motors shared by two axes",
  compares:
    "The torque of the busier of two shared motors, when both axes move at once, with what that move asks of it.",
  formula:
    "T_pull-out((v1 + v2)/r) / ((F1 + F2)·r/(n·η) + Jm·(a1 + a2)/r) − 1 ≥ policy; F = friction + |load| + m·a, n shared motors",
  source: "Kinematics of crossed belts and virtual work; pull-out as for the single axis",
  needs: readsOf("coupled_torque_margin"),
  margin:
    "over below the policy's margin (0.5 up to the voltage-limit speed, 1.0 above it), near below 1.2 times that",
  caution: null,
  parameters: ["acceleration", "max_speed", "run_current", "reference_voltage", "current_scale"],
  candidates: (context) =>
    coupledPairs(context)
      .flat()
      .flatMap((axis) => lower(axis, "acceleration", "max_speed")),
  assess,
});
