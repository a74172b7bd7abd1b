import type { LadderShape, RungTrial } from "./ladder";
import { levelOf } from "./ladder";

interface Block {
  /** Mean rung, weighted by the trials. */
  readonly rung: number;
  readonly failing: number;
  readonly trials: number;
}

/** Trials and failures by rung, the rungs ordered towards failing. */
function byRung({ fails }: LadderShape, trials: readonly RungTrial[]): Block[] {
  const counts = new Map<number, { trials: number; failures: number }>();
  for (const { rung, failed } of trials) {
    const found = counts.get(rung) ?? { trials: 0, failures: 0 };
    counts.set(rung, { trials: found.trials + 1, failures: found.failures + (failed ? 1 : 0) });
  }
  const sign = fails === "above" ? 1 : -1;
  return [...counts]
    .sort(([one], [other]) => sign * (one - other))
    .map(([rung, count]) => ({ rung, failing: count.failures / count.trials, trials: count.trials }));
}

function merge(one: Block, other: Block): Block {
  const trials = one.trials + other.trials;
  const mean = (a: number, b: number) => (a * one.trials + b * other.trials) / trials;
  return { trials, rung: mean(one.rung, other.rung), failing: mean(one.failing, other.failing) };
}

/** Equal shares count as rising only at 0 and 1, where the true curve may be flat. */
function rises({ failing }: Block, next: Block): boolean {
  return failing < next.failing || (failing === next.failing && (failing === 0 || failing === 1));
}

/** Neighbours that do not rise are pooled at their mean rung, so that the curve rises strictly. */
function pooled(blocks: readonly Block[]): Block[] {
  const stack: Block[] = [];
  for (const block of blocks) {
    let current = block;
    for (let last = stack[stack.length - 1]; last && !rises(last, current); last = stack.at(-1)) {
      stack.pop();
      current = merge(last, current);
    }
    stack.push(current);
  }
  return stack;
}

/**
 * Level at which half of the trials fail, in the unit of the setting, by centred isotonic regression: shares of
 * failures that do not rise from rung to rung are pooled at their mean rung, and the curve between is straight. Assumes
 * only that more never fails less. Null where the curve does not pass one half.
 * Source: Oron & Flournoy, Stat. Biopharm. Res. 9 (2017) 258; its formula from memory.
 */
export function isotonicMedian(shape: LadderShape, trials: readonly RungTrial[]): number | null {
  const curve = pooled(byRung(shape, trials));
  const after = curve.findIndex(({ failing }) => failing >= 0.5);
  const high = curve[after];
  if (!high) return null;
  if (high.failing === 0.5) return levelOf(shape, high.rung);
  const low = curve[after - 1];
  if (!low) return null;
  const share = (0.5 - low.failing) / (high.failing - low.failing);
  return levelOf(shape, low.rung + share * (high.rung - low.rung));
}
