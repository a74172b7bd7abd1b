import type { LadderShape, RungTrial } from "./ladder";
import { levelOf } from "./ladder";

export interface DixonMood {
  /** Level at which half of the trials fail, in the unit of the setting. */
  readonly mean: number;
  /** Scatter s of the threshold from trial to trial, same unit. */
  readonly deviation: number;
  /** False: q ≤ 0.3, the step is too coarse for the scatter, and s is a guess of 0.53·d. */
  readonly deviationReliable: boolean;
  /** N, events of the rarer kind. */
  readonly events: number;
  /** (N·B − A²)/N², in steps squared. */
  readonly q: number;
}

const RELIABLE_Q = 0.3;

/**
 * Dixon & Mood's estimate from counted trials of a ladder: with the rarer outcome counted n_i times on rung i,
 * A = Σ i·n_i, B = Σ i²·n_i: mean x0 + d·(A/N ∓ ½) (minus for failures where the motor fails above), q = (N·B − A²)/N²,
 * s = 1.62·d·(q + 0.029) for q > 0.3, else 0.53·d. Null where one outcome is wanting. The threshold is taken as normal.
 * Source: Dixon & Mood, JASA 43 (1948) 109; constants as in Ekaputra et al., Open Engineering 10 (2020) 394.
 */
export function dixonMood(shape: LadderShape, trials: readonly RungTrial[]): DixonMood | null {
  const failures = trials.filter(({ failed }) => failed);
  const passes = trials.filter(({ failed }) => !failed);
  const rarer = failures.length <= passes.length ? failures : passes;
  const n = rarer.length;
  if (n === 0) return null;
  const a = rarer.reduce((sum, { rung }) => sum + rung, 0);
  const b = rarer.reduce((sum, { rung }) => sum + rung ** 2, 0);
  const towards = (rarer === failures ? -0.5 : 0.5) * (shape.fails === "above" ? 1 : -1);
  const q = (n * b - a ** 2) / n ** 2;
  const reliable = q > RELIABLE_Q;
  return {
    mean: levelOf(shape, a / n + towards),
    deviation: shape.step * (reliable ? 1.62 * (q + 0.029) : 0.53),
    deviationReliable: reliable,
    events: n,
    q,
  };
}
