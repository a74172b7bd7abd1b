import { plural } from "@/lib/domain/sentences";
import type { RunPlan } from "@/lib/domain/test-sheets";
import { formatNumber } from "@/lib/domain/units";
import { clopperPearson } from "@/lib/physics/evidence/proportion";
import {
  reliabilityShown,
  reliabilityWithUniformPrior,
  trialsNeeded,
} from "@/lib/physics/evidence/success-run";

export interface RunResult {
  readonly trials: number;
  readonly failures: number;
  /** Trials that the demand takes with the failures so far; null where no bench meets it. */
  readonly needed: number | null;
  /** Share of 1; 0 before the first trial. */
  readonly shown: number;
  readonly met: boolean;
  readonly sentences: readonly string[];
}

/** What trials at one setting show: the bound only, at the plan's confidence. Shares of 1. */
export function runResult(plan: RunPlan, outcomes: readonly ("pass" | "fail")[]): RunResult {
  const { reliability, confidence } = plan;
  const trials = outcomes.length;
  const failures = outcomes.filter((outcome) => outcome === "fail").length;
  const needed = trialsNeeded({ reliability, confidence, failures });
  const shown = trials === 0 ? 0 : reliabilityShown({ trials, failures, confidence });
  const met = needed !== null && trials >= needed;
  const sentences =
    trials === 0
      ? [`No trial is entered yet; ${plural(plan.trials, "trial")} without a loss show what is demanded.`]
      : [bound({ trials, failures, confidence, shown }), ...demand({ plan, trials, failures, needed, met })];
  return { trials, failures, needed, shown, met, sentences };
}

/** A share as a percentage, rounded down: no more is claimed than was shown. */
function percent(share: number): string {
  return formatNumber(Math.floor(share * 1000 + 1e-9) / 10);
}

interface Shown {
  readonly trials: number;
  readonly failures: number;
  readonly confidence: number;
  readonly shown: number;
}

function bound({ trials, failures, confidence, shown }: Shown): string {
  const sure = `${formatNumber(confidence * 100)} % confidence`;
  const prior = percent(reliabilityWithUniformPrior({ trials, failures, confidence }));
  const head = `Steps lost in ${failures} of ${plural(trials, "trial")}: at least ${percent(shown)} % of such trials succeed, at ${sure} (${prior} % with a uniform prior, n + 1).`;
  if (failures === 0) return head;
  const { low, high } = clopperPearson(failures, trials, 0.95);
  return `${head} The share that fails lies between ${formatNumber(low * 100)} and ${formatNumber(high * 100)} %, at 95 % (exact interval).`;
}

interface Demanded {
  readonly plan: RunPlan;
  readonly trials: number;
  readonly failures: number;
  readonly needed: number | null;
  readonly met: boolean;
}

function demand({ plan, trials, failures, needed, met }: Demanded): string[] {
  const demanded = `${formatNumber(plan.reliability * 100)} %`;
  const independent =
    "Moves of one job hang together: a trial is one reference run with its move, not one move.";
  if (met) return [`The demanded ${demanded} is shown.`, independent];
  if (needed === null) return [`The demanded ${demanded} cannot be shown any more on a bench.`, independent];
  const lost = failures === 0 ? "" : ` after ${plural(failures, "loss", "losses")}`;
  return [
    `${plural(needed - trials, "more trial without a loss is", "more trials without a loss are")} wanted for the demanded ${demanded}${lost}.`,
    independent,
  ];
}
