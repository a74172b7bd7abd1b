import { busierMotor, busierMotorTorque } from "@/lib/physics/coupled";
import { conservativePullOut, voltageLimitSpeed } from "@/lib/physics/pull-out";
import { bothMissing, computed, fromText, gather, merged } from "../data";
import { plain, show } from "../show";
import type { AxisView, Missing, RuleContext } from "../types";
import type { MachineQuantityDefinition } from "./definition";
import { force, FORCE_READS, moved } from "./load";
import { coupledPairs, SHARED_READS, sharedDrive } from "./shared-motors";
import type { Pair } from "./shared-motors";

/** The busier motor of a pair of coupled axes when both move at once, as hard as each alone may. */
export interface CoupledLoad {
  readonly ok: true;
  readonly axes: readonly [AxisView, AxisView];
  /** N·m of one motor. */
  readonly available: number;
  readonly required: number;
  readonly margin: number;
  /** rad/s of the motor, and where the supply begins to limit it. */
  readonly speed: number;
  readonly limitSpeed: number;
  readonly assumed: readonly string[];
}

function side(axis: AxisView) {
  return {
    force: force(axis),
    mass: moved(axis),
    acceleration: fromText(axis, "acceleration"),
    speed: axis.quantity("peak_speed"),
  };
}

/** Torque of the busier motor, with what the weaker of both axes' settings leaves it. */
export function coupledLoad(pair: Pair): CoupledLoad | Missing {
  const drive = sharedDrive(pair);
  const first = gather(side(pair[0]));
  const second = gather(side(pair[1]));
  const lacks = [drive, first, second].flatMap((part) => (part.ok ? [] : [part]));
  if (!drive.ok || !first.ok || !second.ok) return lacks.reduce(bothMissing);
  const [x, y] = [first.values, second.values];
  const required = busierMotorTorque({
    forces: [x.force + x.mass * x.acceleration, y.force + y.mass * y.acceleration],
    accelerations: [x.acceleration, y.acceleration],
    motors: drive.count,
    radius: drive.radius,
    efficiency: drive.efficiency,
    motorInertia: drive.shaft,
  });
  const speed = busierMotor(x.speed, y.speed, drive.radius);
  const motors = drive.motors.map(({ motor }) => motor);
  const available = Math.min(...motors.map((motor) => conservativePullOut(motor, speed)));
  return {
    ok: true,
    axes: pair,
    available,
    required,
    margin: available / required - 1,
    speed,
    limitSpeed: Math.min(...motors.map(voltageLimitSpeed)),
    assumed: [drive.assumed, first.assumed, second.assumed].reduce(merged),
  };
}

/** The pair with the least margin, or all that is missing; null where no axes are coupled or nothing is required. */
export function weakestPair(context: RuleContext): CoupledLoad | Missing | null {
  const loads = coupledPairs(context).map(coupledLoad);
  const lacks = loads.flatMap((load) => (load.ok ? [] : [load]));
  if (lacks.length > 0) return lacks.reduce(bothMissing);
  return loads.reduce<CoupledLoad | null>(
    (weakest, load) =>
      load.ok && load.required > 0 && (weakest === null || load.margin < weakest.margin) ? load : weakest,
    null,
  );
}

export const COUPLED_TORQUE_MARGIN: MachineQuantityDefinition = {
  reads: [...SHARED_READS, ...FORCE_READS, "acceleration"],
  from: ["winding_current_rms", "winding_c", "peak_speed"],
  compute: (context) => {
    const pair = weakestPair(context);
    if (pair === null) return { ok: false, needs: [], reason: "No two axes share their motors." };
    if (!pair.ok) return pair;
    const { available, required, margin, speed, assumed } = pair;
    return computed(
      margin,
      assumed,
      () =>
        `at ${plain(speed)} rad/s: ${show(available, "N·m")} / ${show(required, "N·m")} − 1 = ${plain(margin)}`,
    );
  },
};
