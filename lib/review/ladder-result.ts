import { parameterLabel } from "@/lib/domain/parameters";
import { plural } from "@/lib/domain/sentences";
import type { LadderPlan } from "@/lib/domain/test-sheets";
import { formatNumber, showText, shownUnit } from "@/lib/domain/units";
import {
  countedTrials,
  LEAST_TRIALS,
  levelOf,
  nextRung,
  type RungTrial,
} from "@/lib/physics/evidence/ladder";
import {
  INTERVAL_CONFIDENCE,
  ladderEstimate,
  type LadderEstimate,
} from "@/lib/physics/evidence/ladder-estimate";
import {
  recommendedAcceleration,
  recommendedCurrent,
  recommendedJump,
} from "@/lib/physics/evidence/recommended";

export interface LadderResult {
  readonly next: { readonly rung: number; readonly level: number };
  readonly counted: number;
  readonly estimate: LadderEstimate | null;
  /** On the safe side to two digits, unit of the setting; null without an estimate or where nothing is left. */
  readonly recommended: number | null;
  readonly sentences: readonly string[];
}

/** What a ladder says so far: the next level, the estimate, the recommended setting. Unit of the plan. */
export function ladderResult(plan: LadderPlan, trials: readonly RungTrial[]): LadderResult {
  const rung = nextRung(plan, trials);
  const counted = countedTrials(trials).length;
  const estimate = ladderEstimate(plan, trials);
  const recommended = estimate && recommendedLevel(plan, estimate.mean);
  return {
    next: { rung, level: levelOf(plan, rung) },
    counted,
    estimate,
    recommended,
    sentences: [
      ...(estimate ? estimateSentences(plan, estimate, trials.length) : [tooEarly(trials)]),
      ...(estimate ? [recommendation(plan, recommended)] : []),
    ],
  };
}

const shownIn =
  ({ unit, basis }: LadderPlan) =>
  (value: number) =>
    `${showText(value, unit)}${basis === null ? "" : ` ${basis}`}`;

/** An estimate to three digits: more would only look exact. */
const about =
  (plan: LadderPlan) =>
  (value: number): string =>
    shownIn(plan)(Number(value.toPrecision(3)));

function tooEarly(trials: readonly RungTrial[]): string {
  if (trials.length === 0) return "No trial is entered yet.";
  const turned = countedTrials(trials).length > 0;
  return turned || trials.some(({ failed }) => failed !== trials[0]?.failed)
    ? "The outcome has turned; both outcomes on single steps are still to come before there is an estimate."
    : `${plural(trials.length, "trial")} made, all with the same outcome: the ladder goes on by four steps at once until it turns.`;
}

function estimateSentences(plan: LadderPlan, estimate: LadderEstimate, trials: number): string[] {
  const shown = about(plan);
  const { mean, interval, counted, deviation, deviationReliable, isotonic, longEnough } = estimate;
  const percent = formatNumber(INTERVAL_CONFIDENCE * 100);
  return [
    `Half of the trials lose steps at ${shown(mean)} (${percent} % interval ${shown(interval.low)} to ${shown(interval.high)}), by Dixon and Mood from ${counted} counted of ${plural(trials, "trial")}.`,
    deviationReliable
      ? `The boundary scatters by ${shown(deviation)} from trial to trial.`
      : `The step is too coarse for the scatter: ${shown(deviation)} is a guess, and the boundary is at least as sharp as the step.`,
    ...(isotonic === null
      ? []
      : [
          `Without taking the scatter for normal: ${shown(isotonic)}, by centred isotonic regression of all trials.`,
        ]),
    ...(longEnough
      ? []
      : [
          `${plural(LEAST_TRIALS - counted, "more trial on single steps is", "more trials on single steps are")} wanted for an estimate to stand on.`,
        ]),
  ];
}

function recommendedLevel(plan: LadderPlan, failing: number): number | null {
  const { parameter, margin, load, most, fails } = plan;
  const exact =
    parameter === "acceleration"
      ? recommendedAcceleration({ failing, margin, load })
      : parameter === "run_current"
        ? recommendedCurrent(failing, margin)
        : recommendedJump(failing, margin);
  if (exact <= 0 || (most !== null && exact > most)) return null;
  const rounded = roundSafely(exact, plan.unit, fails);
  // Rounding a current up may pass the limit that the exact one keeps.
  return most === null ? rounded : Math.min(rounded, most);
}

/** Two digits in the unit that the floor reads, away from the boundary. */
function roundSafely(value: number, unit: string, fails: LadderPlan["fails"]): number {
  const { factor } = shownUnit(unit);
  const shown = value * factor;
  const digit = 10 ** (Math.floor(Math.log10(shown)) - 1);
  const steps = fails === "above" ? Math.floor(shown / digit + 1e-9) : Math.ceil(shown / digit - 1e-9);
  return (steps * digit) / factor;
}

function recommendation(plan: LadderPlan, recommended: number | null): string {
  const { parameter, margin, load, most, fails } = plan;
  const shown = shownIn(plan);
  const label = parameterLabel(parameter).toLowerCase();
  const wanted = `the policy's torque margin of ${formatNumber(margin * 100)} %`;
  if (recommended === null)
    return most !== null
      ? `No current up to the rated ${shown(most)} keeps ${wanted}: lower the speed or the acceleration.`
      : `No ${label} keeps ${wanted} here: the load alone takes up what may be used. Lower the speed or raise the current.`;
  const loadless =
    parameter === "acceleration" && load === null
      ? " The load torque is not known, so the margin was taken on the acceleration alone; it leaves less on the torque."
      : "";
  return `Recommended ${label}: ${fails === "above" ? "at most" : "at least"} ${shown(recommended)}, the estimate with ${wanted} kept.${loadless}`;
}
