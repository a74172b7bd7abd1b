import { busierMotor, busierMotorTorque } from "@/lib/physics/coupled";
import { conservativePullOut, voltageLimitSpeed } from "@/lib/physics/pull-out";
import { bothMissing, computed, fromText, gather, hardware, merged } from "../data";
import { plain, show } from "../show";
import type { AxisView, Missing, RuleContext } from "../types";
import type { MachineQuantityDefinition } from "./definition";
import { force, FORCE_READS, INERTIA_READS, moved, shaftInertia } from "./load";
import { driven, DRIVEN_READS } from "./torque";

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

type Pair = readonly [AxisView, AxisView];

/** Axes that name each other, or one the other, in the order of the machine. */
export function coupledPairs({ axes }: RuleContext): Pair[] {
  return axes.flatMap((one, index) =>
    axes.slice(index + 1).flatMap((other): Pair[] => (isCoupled(one, other) ? [[one, other]] : [])),
  );
}

function isCoupled(one: AxisView, other: AxisView): boolean {
  return names(one, other) || names(other, one);
}

function names(one: AxisView, other: AxisView): boolean {
  const { coupled_with = [] } = one.hardware;
  return coupled_with.some((name) => name.toLowerCase() === other.axis.toLowerCase());
}

function side(axis: AxisView) {
  return {
    force: force(axis),
    mass: moved(axis),
    acceleration: fromText(axis, "acceleration"),
    speed: axis.quantity("peak_speed"),
  };
}

/** Torque of the busier motor; the first axis' motor and drive train stand for both, which such machines share. */
export function coupledLoad([one, other]: Pair): CoupledLoad | Missing {
  const motor = driven(one);
  const first = gather({
    ...side(one),
    efficiency: hardware(one, "drive_train", "efficiency"),
    shaft: shaftInertia(one),
  });
  const second = gather(side(other));
  const lacks = [motor, first, second].flatMap((part) => (part.ok ? [] : [part]));
  if (!motor.ok || !first.ok || !second.ok) return lacks.reduce(bothMissing);
  const [x, y] = [first.values, second.values];
  const required = busierMotorTorque({
    forces: [x.force + x.mass * x.acceleration, y.force + y.mass * y.acceleration],
    accelerations: [x.acceleration, y.acceleration],
    radius: motor.radius,
    efficiency: x.efficiency,
    motorInertia: x.shaft,
  });
  const speed = busierMotor(x.speed, y.speed, motor.radius);
  const available = conservativePullOut(motor.motor, speed);
  return {
    ok: true,
    axes: [one, other],
    available,
    required,
    margin: available / required - 1,
    speed,
    limitSpeed: voltageLimitSpeed(motor.motor),
    assumed: [motor.assumed, first.assumed, second.assumed].reduce(merged),
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
  reads: [
    ...DRIVEN_READS,
    ...FORCE_READS,
    ...INERTIA_READS,
    "drive_train.efficiency",
    "axis.coupled_with",
    "acceleration",
    "driver.feedback",
  ],
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
