import { createRequire } from "node:module";
import type { SimulatedAxis } from "@/lib/physics/simulate/axis";
import { REGULATOR_RATE } from "@/lib/physics/simulate/integrate";
import type { MoveProfile, ProfileSegment } from "@/lib/physics/simulate/profile";

type Rates = (time: number, state: number[]) => number[];

interface Solver {
  maxSteps: number;
  relativeTolerance: number;
  absoluteTolerance: number;
  solve(
    rates: Rates,
    from: number,
    state: readonly number[],
    to: number,
    watch: (step: number, from: number, to: number, state: readonly number[]) => boolean,
  ): { y: number[]; outcome: number; nEval: number };
}

/** Loaded at run time: the package's own types do not bear strict settings. Gragg-Bulirsch-Stoer extrapolation after Hairer and Wanner. */
const { Solver } = createRequire(import.meta.url)("odex") as { Solver: new (states: number) => Solver };

const CONVERGED = 0;
const STOPPED = 2;

/** Current a and b (A), angle (rad) and speed (rad/s) of the rotor, then of the load where there is a compliance. */
export type MoveState = readonly number[];

export interface ReferenceRun {
  /** State at the end of each segment. */
  readonly states: readonly MoveState[];
  /** The rotor fell a whole electrical turn behind or ahead; the run ends there. */
  readonly slipped: boolean;
  readonly evaluations: number;
}

/**
 * A move by the independent integrator, from the same equations written once more and not from the product's arrays.
 * Each segment is solved by itself, from the state at rest given.
 */
export function referenceMove(input: {
  readonly axis: SimulatedAxis;
  readonly segments: readonly ProfileSegment[];
  readonly start: MoveState;
  readonly tolerance: number;
}): ReferenceRun {
  const { axis, segments, start, tolerance } = input;
  const states: MoveState[] = [];
  let state: MoveState = start;
  let evaluations = 0;
  for (const segment of segments) {
    const solver = new Solver(start.length);
    solver.maxSteps = 1e7;
    solver.relativeTolerance = tolerance;
    solver.absoluteTolerance = tolerance;
    const inStep = (
      _step: number,
      _from: number,
      time: number,
      [, , angle = NaN]: readonly number[],
    ): boolean => Math.abs(positionAt(segment, time) / axis.radius - angle) * axis.rotorTeeth < 2 * Math.PI;
    const solved = solver.solve(ratesOf(axis, segment), 0, state, segment.duration, inStep);
    evaluations += solved.nEval;
    if (solved.outcome === STOPPED) return { states, slipped: true, evaluations };
    if (solved.outcome !== CONVERGED) throw new Error("The independent integrator did not converge.");
    state = solved.y;
    states.push(state);
  }
  return { states, slipped: false, evaluations };
}

function positionAt({ position, speed, acceleration, jerk }: ProfileSegment, t: number): number {
  return position + speed * t + (acceleration * t ** 2) / 2 + (jerk * t ** 3) / 6;
}

function ratesOf(axis: SimulatedAxis, segment: ProfileSegment): Rates {
  const { rotorTeeth: nr, inductance: l, resistance: r, supplyVoltage: v, motorCount: n, efficiency } = axis;
  const ke = axis.holdingTorque / (Math.SQRT2 * axis.ratedCurrent);
  const peak = Math.SQRT2 * Math.min(axis.runCurrent, axis.ratedCurrent);
  const load = (axis.movingInertia * axis.radius ** 2) / (n * efficiency);
  const inertia = axis.motorInertia + load;
  const swing = Math.sqrt((nr * ke * peak) / inertia);
  const damping = 2 * axis.dampingRatio * swing * inertia;
  const frictionSpeed = 0.02 * swing * (Math.PI / (2 * nr));
  const against = (axis.steadyLoad * axis.radius) / (n * efficiency);
  const along = (axis.steadyLoad * axis.radius * efficiency) / n;
  const losses = (axis.friction * axis.radius) / (n * efficiency) + Math.abs(against - along) / 2;
  const resisting = (speed: number): number =>
    (against + along) / 2 + (losses * speed) / Math.hypot(speed, frictionSpeed);
  const spring = axis.compliance ? (axis.compliance.stiffness * axis.radius ** 2) / n : 0;
  const reduced = 1 / (1 / axis.motorInertia + 1 / load);
  const damper = axis.compliance ? 2 * axis.compliance.dampingRatio * Math.sqrt(spring * reduced) : 0;
  return (t, [ia = NaN, ib = NaN, angle = NaN, speed = NaN, loadAngle = NaN, loadSpeed = NaN]) => {
    const wanted = segment.speed + segment.acceleration * t + (segment.jerk * t ** 2) / 2;
    const travelled = positionAt(segment, t);
    const phase = (nr * travelled) / axis.radius;
    const rate = wanted / axis.radius;
    const phaseRate = (i: number, want: number, wantRate: number, emf: number): number => {
      const voltage = r * i + emf + l * (wantRate + REGULATOR_RATE * (want - i));
      return (Math.max(-v, Math.min(v, voltage)) - r * i - emf) / l;
    };
    const magnetic =
      ke * (ib * Math.cos(nr * angle) - ia * Math.sin(nr * angle)) -
      axis.detentTorque * Math.sin(4 * nr * angle) -
      damping * (speed - rate);
    const a = phaseRate(
      ia,
      peak * Math.cos(phase),
      -peak * nr * rate * Math.sin(phase),
      -ke * speed * Math.sin(nr * angle),
    );
    const b = phaseRate(
      ib,
      peak * Math.sin(phase),
      peak * nr * rate * Math.cos(phase),
      ke * speed * Math.cos(nr * angle),
    );
    if (!axis.compliance) return [a, b, speed, (magnetic - resisting(speed)) / inertia];
    const between = spring * (angle - loadAngle) + damper * (speed - loadSpeed);
    return [
      a,
      b,
      speed,
      (magnetic - between) / axis.motorInertia,
      loadSpeed,
      (between - resisting(loadSpeed)) / load,
    ];
  };
}

/** The same move in more segments: each cut into `parts` of equal duration. */
export function cutSegments({ segments }: MoveProfile, parts: number): ProfileSegment[] {
  return segments.flatMap((segment) =>
    Array.from({ length: parts }, (_, part) => {
      const t = (segment.duration * part) / parts;
      return {
        start: segment.start + t,
        duration: segment.duration / parts,
        position: positionAt(segment, t),
        speed: segment.speed + segment.acceleration * t + (segment.jerk * t ** 2) / 2,
        acceleration: segment.acceleration + segment.jerk * t,
        jerk: segment.jerk,
      };
    }),
  );
}
