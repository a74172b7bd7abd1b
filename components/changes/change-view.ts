import type { CheckReport, Effect, FindingComparison, ParameterChange } from "@/lib/review/types";
import type { ChangeViewData } from "@/lib/schemas/changes";

/** A change as the API gives it, its evaluation in the core's own types. */
export interface ChangeView extends Omit<ChangeViewData, "evaluation"> {
  readonly evaluation: Omit<
    ChangeViewData["evaluation"],
    "report" | "baseReport" | "changes" | "effects" | "comparison"
  > & {
    readonly report: CheckReport;
    readonly baseReport: CheckReport;
    readonly changes: readonly ParameterChange[];
    readonly effects: readonly Effect[];
    readonly comparison: FindingComparison;
  };
}

/** The head of a change: what its acts need to know. */
export type ChangeHead = Pick<
  ChangeView,
  "id" | "label" | "title" | "state" | "lockVersion" | "machine" | "stale" | "effectivityWords"
>;
