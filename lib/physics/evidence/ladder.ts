/** One trial of a ladder: the rung on which it was made and whether steps were lost there. */
export interface RungTrial {
  /** Whole steps above the start level, may be negative. */
  readonly rung: number;
  readonly failed: boolean;
}

/** Levels x0 + i·d. On a ladder of currents the motor fails below, on the others above. */
export interface LadderShape {
  /** x0, in the unit of the setting. */
  readonly start: number;
  /** d > 0, same unit. */
  readonly step: number;
  readonly fails: "above" | "below";
}

/**
 * Steps taken at once until the outcome turns for the first time; these trials find the neighbourhood in a quarter of
 * the trials that single steps take, and do not count in the estimate. Common practice, no source.
 */
export const APPROACH_STEPS = 4;

/** Trials after the approach that an estimate asks for. Source: ISO 12107:2012, exploratory tests, from memory. */
export const LEAST_TRIALS = 15;

/** Level of a rung, in the unit of the setting: x0 + i·d. */
export function levelOf({ start, step }: LadderShape, rung: number): number {
  return start + rung * step;
}

/** Position of the first trial whose outcome differs from the one before it; −1 where none does. */
function firstTurn(trials: readonly RungTrial[]): number {
  return trials.findIndex((trial, index) => index > 0 && trial.failed !== trials[index - 1]?.failed);
}

/** The trials that count for the estimate: those after the outcome has turned for the first time. */
export function countedTrials(trials: readonly RungTrial[]): readonly RungTrial[] {
  const turn = firstTurn(trials);
  return turn < 0 ? [] : trials.slice(turn + 1);
}

/**
 * The rung of the next trial: the start; then APPROACH_STEPS on as long as the outcome stays the same; between the two
 * rungs where it turned; from there one step up after a pass and one down after a failure (the other way round where
 * the motor fails below). Never at or below level 0. Source: Dixon & Mood, JASA 43 (1948) 109.
 */
export function nextRung(shape: LadderShape, trials: readonly RungTrial[]): number {
  const last = trials[trials.length - 1];
  if (!last) return 0;
  const turn = firstTurn(trials);
  const harder = shape.fails === "above" ? 1 : -1;
  const way = last.failed ? -harder : harder;
  const before = trials[turn - 1];
  const sought =
    turn < 0
      ? last.rung + way * APPROACH_STEPS
      : turn === trials.length - 1 && before
        ? Math.round((last.rung + before.rung) / 2)
        : last.rung + way;
  return Math.max(sought, lowestRung(shape));
}

/** The lowest rung whose level is above 0. */
function lowestRung({ start, step }: LadderShape): number {
  return Math.floor(-start / step + 1e-9) + 1;
}

/** Whether the ladder has what an estimate asks for: LEAST_TRIALS counted ones with both outcomes among them. */
export function isLongEnough(trials: readonly RungTrial[]): boolean {
  const counted = countedTrials(trials);
  return (
    counted.length >= LEAST_TRIALS &&
    counted.some(({ failed }) => failed) &&
    counted.some(({ failed }) => !failed)
  );
}
