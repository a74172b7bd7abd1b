import { allowedJump } from "@/lib/physics/start-stop";
import { busierMotor, crossedInertia } from "@/lib/physics/coupled";
import { judged, judgeUpper, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { lower } from "./candidates";
import { machineRule } from "./check";
import { bothMissing, fromText, gather, hardware, merged } from "./data";
import { coupledPairs } from "./quantities/coupled";
import { force, FORCE_READS, INERTIA_READS, moved, shaftInertia } from "./quantities/load";
import { readsOf } from "./quantities/table";
import { driven, DRIVEN_READS, holdingTorque } from "./quantities/torque";
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
  const motor = driven(one);
  const first = gather({
    corner: fromText(one, "corner_speed"),
    holding: holdingTorque(one, one.quantity("winding_current_rms")),
    force: force(one),
    mass: moved(one),
    shaft: shaftInertia(one),
    efficiency: hardware(one, "drive_train", "efficiency"),
  });
  const second = gather({ corner: fromText(other, "corner_speed"), force: force(other), mass: moved(other) });
  const lacks = [motor, first, second].flatMap((part) => (part.ok ? [] : [part]));
  if (!motor.ok || !first.ok || !second.ok) return lacks.reduce(bothMissing);
  const [x, y] = [first.values, second.values];
  const { radius } = motor;
  const allowed = allowedJump({
    motor: motor.motor,
    holdingTorque: x.holding,
    loadTorque: ((x.force + y.force) * radius) / (2 * x.efficiency),
    inertia: crossedInertia({ masses: [x.mass, y.mass], radius, motorInertia: x.shaft }),
  });
  return {
    ok: true,
    axes: [one, other],
    jump: busierMotor(x.corner, y.corner, radius),
    allowed: allowed.jump,
    assumed: [motor.assumed, first.assumed, second.assumed].reduce(merged),
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
  formula:
    "(v1 + v2)/r ≤ 0.5·Δω with J = Jm + (m1 + m2)·r²/4, T_L = (F1 + F2)·r/(2·η), and the pull-out torque in place of Th(I) above the voltage-limit speed",
  source:
    "Kinematics of crossed belts; equal-area criterion and conservative pull-out, half of the bound is the product's choice",
  needs: [
    ...readsOf("winding_current_rms", "winding_c"),
    ...DRIVEN_READS,
    ...FORCE_READS,
    ...INERTIA_READS,
    "corner_speed",
    "drive_train.efficiency",
    "axis.coupled_with",
    "driver.feedback",
  ],
  margin: "near above 80 % of the allowed jump, over above it",
  caution: null,
  parameters: ["corner_speed", "run_current", "reference_voltage", "current_scale"],
  candidates: (context) =>
    coupledPairs(context)
      .flat()
      .flatMap((axis) => lower(axis, "corner_speed")),
  assess,
});
