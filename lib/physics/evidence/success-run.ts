import { betaQuantile, binomialShare } from "./distributions";

/** No run of trials on a machine is longer; a demand beyond it is none that a bench can meet. */
export const MOST_TRIALS = 100_000;

export interface SuccessRunDemand {
  /** Share of 1 of all such trials that succeed, more than 0 and less than 1. */
  readonly reliability: number;
  /** Share of 1, more than 0 and less than 1. */
  readonly confidence: number;
  /** Failures that are let pass, a whole number; 0 for the plain success run. */
  readonly failures?: number;
}

/**
 * Trials that show a reliability at a confidence: the smallest n for which at most `failures` failures are no more
 * likely than 1 − C if only R succeed; without failures ln(1−C)/ln R. Null above MOST_TRIALS. Trials have to be
 * independent: the reference is run before each. Source: binomial test; codingace.net sample size table.
 */
export function trialsNeeded({ reliability, confidence, failures = 0 }: SuccessRunDemand): number | null {
  const allowed = (1 - confidence) * (1 + 1e-12);
  const enough = (n: number) => binomialShare(failures, n, 1 - reliability) <= allowed;
  let high = failures + 1;
  while (!enough(high)) {
    if (high > MOST_TRIALS) return null;
    high *= 2;
  }
  let low = failures;
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (enough(middle)) high = middle;
    else low = middle;
  }
  return high;
}

export interface SuccessRun {
  /** Trials made, a whole number from 1. */
  readonly trials: number;
  readonly failures: number;
  /** Share of 1. */
  readonly confidence: number;
}

/**
 * Reliability shown, share of 1: the one-sided lower bound of the share of such trials that succeed; without failures
 * (1−C)^(1/n). 0 where all have failed. Source: Clopper & Pearson (1934), one-sided.
 */
export function reliabilityShown({ trials, failures, confidence }: SuccessRun): number {
  if (failures >= trials) return 0;
  if (failures === 0) return (1 - confidence) ** (1 / trials);
  return betaQuantile(1 - confidence, trials - failures, failures + 1);
}

/**
 * The same with a uniform prior (n + 1 in place of n), share of 1; it says a little more than the trials alone, so the
 * form is always named. Source: codingace.net success run page.
 */
export function reliabilityWithUniformPrior({ trials, failures, confidence }: SuccessRun): number {
  return betaQuantile(1 - confidence, trials - failures + 1, failures + 1);
}
