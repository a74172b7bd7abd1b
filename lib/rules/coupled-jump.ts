import { allowedJump } from "@/lib/physics/start-stop";
import { busierMotor, crossedInertia } from "@/lib/physics/coupled";
import { judged, judgeUpper, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { lower } from "./candidates";
import { machineRule } from "./check";
import { bothMissing, fromText, gather, merged } from "./data";
import { force, FORCE_READS, moved } from "./quantities/load";
import { coupledPairs, SHARED_READS, sharedDrive } from "./quantities/shared-motors";
import type { Pair } from "./quantities/shared-motors";
import { readsOf } from "./quantities/table";
import { holdingTorque } from "./quantities/torque";
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

function side(axis: AxisView) {
  return {
    corner: fromText(axis, "corner_speed"),
    holding: holdingTorque(axis, axis.quantity("winding_current_rms")),
    force: force(axis),
    mass: moved(axis),
  };
}

/** The jump of the busier motor at a corner where both axes jump, beside what the weaker of both settings allows. */
function jumpOf(pair: Pair): Jump | Missing {
  const drive = sharedDrive(pair);
  const [first, second] = [gather(side(pair[0])), gather(side(pair[1]))];
  const lacks = [drive, first, second].flatMap((part) => (part.ok ? [] : [part]));
  if (!drive.ok || !first.ok || !second.ok) return lacks.reduce(bothMissing);
  const [x, y] = [first.values, second.values];
  const { count: motors, radius, efficiency, shaft } = drive;
  const load = {
    loadTorque: ((x.force + y.force) * radius) / (motors * efficiency),
    inertia: crossedInertia({ masses: [x.mass, y.mass], motors, radius, motorInertia: shaft }),
  };
  const allowed = [x, y].map(({ holding }, index) => {
    const { motor } = drive.motors[index === 0 ? 0 : 1];
    return allowedJump({ motor, holdingTorque: holding, ...load }).jump;
  });
  return {
    ok: true,
    axes: pair,
    jump: busierMotor(x.corner, y.corner, radius),
    allowed: Math.min(...allowed),
    assumed: [drive.assumed, first.assumed, second.assumed].reduce(merged),
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
    "(v1 + v2)/r ≤ 0.5·Δω with J = Jm + (m1 + m2)·r²/(2·n), T_L = (F1 + F2)·r/(n·η), n shared motors, and the pull-out torque in place of Th(I) above the voltage-limit speed",
  source:
    "Kinematics of crossed belts; equal-area criterion and conservative pull-out, half of the bound is the product's choice",
  needs: [...readsOf("winding_current_rms", "winding_c"), ...SHARED_READS, ...FORCE_READS, "corner_speed"],
  margin: "near above 80 % of the allowed jump, over above it",
  caution: null,
  parameters: ["corner_speed", "run_current", "reference_voltage", "current_scale"],
  candidates: (context) =>
    coupledPairs(context)
      .flat()
      .flatMap((axis) => lower(axis, "corner_speed")),
  assess,
});
