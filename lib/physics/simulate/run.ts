import { shaftModel, type ShaftModel, type SimulatedAxis } from "./axis";
import { at, integrate, SAMPLE, SAMPLE_EVERY, SAMPLE_IN, SAMPLES_TAKEN, STEPS_DONE } from "./integrate";
import { enterStretch, memoryOf, putAtRest } from "./memory";
import { outcomeOf, type MoveOutcome } from "./outcome";
import type { MoveProfile } from "./profile";
import { recordingOf, type Recording } from "./recording";
import { chosenStep } from "./step-size";
import { settleTime, stretchesOf, type Stretch } from "./stretches";

export interface MoveInput {
  readonly axis: SimulatedAxis;
  readonly profile: MoveProfile;
  /** Longest integration step, s; left out: `chosenStep`. */
  readonly step?: number | undefined;
  /** s after the end of the move; left out: `settleTime`. */
  readonly settle?: number | undefined;
}

/** A simulation under way. */
export interface MoveRun {
  readonly shaft: ShaftModel;
  /** Integration steps in all, and the longest of them, s. */
  readonly steps: number;
  readonly step: number;
  readonly stepsDone: () => number;
  /** Does up to `count` steps more; true as long as some are left. */
  readonly advance: (count: number) => boolean;
  /** Null until all steps are done. */
  readonly outcome: () => MoveOutcome | null;
  readonly recording: () => Recording;
}

/** Samples kept of one run, and of one electrical turn at the highest speed. */
const MOST_SAMPLES = 100_000;
const SAMPLES_PER_TURN = 24;
/** Steps at once: short calls are compiled as a whole, a long loop only from its middle. */
const PART = 500;
/** Some minutes of computing. */
const MOST_STEPS = 5e8;

/**
 * Starts the simulation of a move of one axis from rest, to be advanced part by part. Null where the numbers are out of
 * the range that can be reckoned with: not finite, not more than 0 where they must be, or more than 5·10⁸ steps.
 */
export function startMove({ axis, profile, step, settle }: MoveInput): MoveRun | null {
  const shaft = shaftModel(axis);
  if (!isUsable(shaft)) return null;
  const highest = profile.peakSpeed / axis.radius;
  const size = step ?? chosenStep(shaft, highest);
  const stretches = stretchesOf({ profile, size, settle: settle ?? settleTime(shaft) });
  const steps = stretches.reduce((sum, stretch) => sum + stretch.steps, 0);
  // Not a number is none of both.
  if (!(steps > 0 && steps <= MOST_STEPS)) return null;
  const perTurn = (2 * Math.PI) / (shaft.rotorTeeth * highest) / size;
  const every = Math.max(Math.ceil(steps / MOST_SAMPLES), Math.floor(perTurn / SAMPLES_PER_TURN));
  return running({ shaft, stretches, steps, every, radius: axis.radius, profile });
}

/** The whole simulation at once; null as in `startMove`. */
export function simulateMove(input: MoveInput): { outcome: MoveOutcome; run: MoveRun } | null {
  const run = startMove(input);
  run?.advance(run.steps);
  const outcome = run?.outcome();
  return run && outcome ? { outcome, run } : null;
}

interface Prepared {
  readonly shaft: ShaftModel;
  readonly stretches: readonly Stretch[];
  readonly steps: number;
  /** Steps between two samples. */
  readonly every: number;
  readonly radius: number;
  readonly profile: MoveProfile;
}

function running({ shaft, stretches, steps, every, radius, profile }: Prepared): MoveRun {
  const memory = memoryOf(shaft);
  const samples = new Float32Array(Math.ceil(steps / every) * SAMPLE);
  memory[SAMPLE_EVERY] = every;
  memory[SAMPLE_IN] = every;
  let index = 0;
  let done = 0;
  const enter = (): void => {
    const stretch = stretches[index];
    if (stretch) enterStretch(memory, stretch, radius);
  };
  const advancePart = (stretch: Stretch, most: number): number => {
    const count = Math.min(most, PART, stretch.steps - at(memory, STEPS_DONE));
    integrate(memory, count, samples);
    done += count;
    if (at(memory, STEPS_DONE) >= stretch.steps) {
      index += 1;
      enter();
    }
    return count;
  };
  enter();
  putAtRest(memory, shaft);
  return {
    shaft,
    steps,
    step: Math.max(...stretches.map((stretch) => stretch.step)),
    stepsDone: () => done,
    advance: (count) => {
      let left = count;
      for (let now = stretches[index]; left > 0 && now; now = stretches[index])
        left -= advancePart(now, left);
      return done < steps;
    },
    outcome: () => (done < steps ? null : outcomeOf(memory, profile)),
    recording: () => recordingOf(samples, at(memory, SAMPLES_TAKEN)),
  };
}

/** Whether all numbers are finite, and those that stand under a fraction are more than 0. */
function isUsable(shaft: ShaftModel): boolean {
  const { couplingStiffness, loadInertia } = shaft;
  const divisors = [
    shaft.inductance,
    shaft.voltageConstant,
    shaft.torque,
    shaft.rotorInertia,
    shaft.frictionSpeed,
  ];
  if (loadInertia > 0) divisors.push(couplingStiffness);
  const all: readonly number[] = Object.values(shaft);
  return all.every(Number.isFinite) && divisors.every((value) => value > 0);
}
