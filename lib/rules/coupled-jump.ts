import { ALLOWED_SHARE_OF_JUMP, speedJumpBound } from "@/lib/physics/start-stop";
import { rotorTeeth } from "@/lib/physics/drive-train";
import { busierMotor, crossedInertia } from "@/lib/physics/coupled";
import { judged, judgeUpper, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { lower } from "./candidates";
import { machineRule } from "./check";
import { bothMissing, fromText, gather, hardware, merged } from "./data";
import { coupledPairs } from "./quantities/coupled";
import { force, FORCE_READS, INERTIA_READS, moved, shaftInertia } from "./quantities/load";
import { GEOMETRY_READS, radius } from "./quantities/geometry";
import { readsOf } from "./quantities/table";
import { HOLDING_READS, holdingTorque } from "./quantities/torque";
import { isClosedLoop, notCovered } from "./quantities/open-loop";
import { plain } from "./show";
import type { AxisView, Missing, RuleContext } from "./types";

const NEAR = 0.8;

interface Jump {
  readonly ok: true;
  readonly axes: readonly [AxisView, AxisView];
  /** rad/s of the busier motor, and what it follows. */
  readonly jump: number;
  readonly allowed: number;
  readonly assumed: readonly string[];
}

/** The jump of the busier motor at a corner where both axes jump; the first axis' motor stands for both. */
function jumpOf([one, other]: readonly [AxisView, AxisView]): Jump | Missing {
  if (isClosedLoop(one.hardware)) return notCovered(one.axis);
  const first = gather({
    corner: fromText(one, "corner_speed"),
    holding: holdingTorque(one, one.quantity("winding_current_rms")),
    force: force(one),
    mass: moved(one),
    shaft: shaftInertia(one),
    radius: radius(one),
    efficiency: hardware(one, "drive_train", "efficiency"),
    stepAngle: hardware(one, "motor", "step_angle_deg"),
  });
  const second = gather({ corner: fromText(other, "corner_speed"), force: force(other), mass: moved(other) });
  if (!first.ok) return second.ok ? first : bothMissing(first, second);
  if (!second.ok) return second;
  const [x, y] = [first.values, second.values];
  const bound = speedJumpBound({
    torque: x.holding,
    loadTorque: ((x.force + y.force) * x.radius) / (2 * x.efficiency),
    inertia: crossedInertia({ masses: [x.mass, y.mass], radius: x.radius, motorInertia: x.shaft }),
    rotorTeeth: rotorTeeth(x.stepAngle),
  });
  return {
    ok: true,
    axes: [one, other],
    jump: busierMotor(x.corner, y.corner, x.radius),
    allowed: ALLOWED_SHARE_OF_JUMP * bound,
    assumed: merged(first.assumed, second.assumed),
  };
}

function assess(context: RuleContext): Assessment {
  const jumps = coupledPairs(context).map(jumpOf);
  const lacks = jumps.flatMap((jump) => (jump.ok ? [] : [jump]));
  if (lacks.length > 0) return lacks.reduce(bothMissing);
  const [worst] = jumps
    .flatMap((jump) => (jump.ok ? [jump] : []))
    .sort((a, b) => a.allowed - a.jump - (b.allowed - b.jump));
  if (worst === undefined) return null;
  const { jump: value, allowed, assumed, axes } = worst;
  const verdict = judgeUpper({ value, limit: allowed, near: NEAR * allowed, unit: "rad/s" });
  return judged(verdict, {
    assumed,
    sentence: () =>
      `At a corner where axes ${axes[0].axis} and ${axes[1].axis} both jump, one of their shared motors jumps by ${plain(value)} rad/s; it is sure to follow ${plain(allowed)} rad/s.`,
    formula: () => `(v1 + v2)/r = ${plain(value)} rad/s ${upperSign(verdict)} ${plain(allowed)} rad/s`,
  });
}

export const COUPLED_JUMP = machineRule({
  id: "coupled-jump",
  title: "Corner speed of shared motors",
  compares:
    "The jump of the busier of two shared motors, when both axes jump at a corner, with what it follows.",
  formula: "(v1 + v2)/r ≤ 0.5·Δω with J = Jm + (m1 + m2)·r²/4 and T_L = (F1 + F2)·r/(2·η)",
  source: "Kinematics of crossed belts; equal-area criterion, half of the bound is the product's choice",
  needs: [
    ...readsOf("winding_current_rms"),
    ...HOLDING_READS,
    ...FORCE_READS,
    ...INERTIA_READS,
    ...GEOMETRY_READS,
    "corner_speed",
    "drive_train.efficiency",
    "motor.step_angle_deg",
    "axis.coupled_with",
    "driver.feedback",
  ],
  margin: "near above 80 % of the allowed jump, over above it",
  caution: null,
  parameters: ["corner_speed"],
  candidates: (context) =>
    coupledPairs(context)
      .flat()
      .flatMap((axis) => lower(axis, "corner_speed")),
  assess,
});
