import type { TestPlan, Trial } from "@/lib/domain/test-sheets";
import { inFullSteps } from "@/lib/domain/test-sheets";
import { plural } from "@/lib/domain/sentences";
import type { RungTrial } from "@/lib/physics/evidence/ladder";
import { lostSteps, type LostSteps } from "@/lib/physics/evidence/lost-steps";
import { heatSentences } from "./heat-result";
import { ladderResult, type LadderResult } from "./ladder-result";
import { runResult, type RunResult } from "./run-result";

/** What the entries of a test sheet say so far. */
export interface SheetResult {
  readonly ladder: LadderResult | null;
  readonly run: RunResult | null;
  /** In the order of reading. */
  readonly sentences: readonly string[];
}

/** The result of a sheet from its plan and the entries that stand, oldest first. Values in the units of the plan. */
export function sheetResult(plan: TestPlan, trials: readonly Trial[]): SheetResult {
  const ladder = plan.ladder && ladderResult(plan.ladder, rungTrials(trials));
  const run =
    plan.run &&
    runResult(
      plan.run,
      trials.flatMap(({ result }) => result ?? []),
    );
  const sentences = [
    ...(ladder?.sentences ?? []),
    ...(run?.sentences ?? []),
    ...(plan.heat ? heatSentences(plan.heat, trials) : []),
    ...lostStepSentences(plan, trials),
  ];
  return { ladder, run, sentences };
}

/** The trials of a ladder among the entries, oldest first. */
export function rungTrials(trials: readonly Trial[]): RungTrial[] {
  return trials.flatMap(({ rung, result }) =>
    rung === null || result === null ? [] : [{ rung, failed: result === "fail" }],
  );
}

/** Lost-step arithmetic of one entry; null where no deviation was typed or it cannot be put into full steps. */
export function lostStepsOf(plan: TestPlan, { deviation }: Pick<Trial, "deviation">): LostSteps | null {
  if (!deviation) return null;
  const fullSteps = inFullSteps(deviation, plan.fullStep);
  if (fullSteps === null) return null;
  const { repeatability, toothSteps } = plan;
  return lostSteps({ fullSteps, repeatability, toothSteps });
}

function lostStepSentences(plan: TestPlan, trials: readonly Trial[]): string[] {
  const found = trials.flatMap((trial) => lostStepsOf(plan, trial) ?? []);
  const unexplained = found.filter(({ verdict }) => verdict === "unexplained").length;
  const teeth = found.filter((one) => one.teeth !== null).length;
  const passedOff = trials.filter(
    (trial) => trial.result === "pass" && lostStepsOf(plan, trial)?.verdict === "lost",
  ).length;
  return [
    ...(unexplained === 0
      ? []
      : [
          `${entries(unexplained)} a remainder that lost steps do not explain: look at the reference, backlash, the coupling and the belt.`,
        ]),
    ...(teeth === 0
      ? []
      : [`${entries(teeth)} just what slipped belt teeth would give as well: look at the belt's tension.`]),
    ...(passedOff === 0
      ? []
      : [`${plural(passedOff, "entry is", "entries are")} marked as passed although whole slips were read.`]),
  ];
}

function entries(count: number): string {
  return plural(count, "entry shows", "entries show");
}
