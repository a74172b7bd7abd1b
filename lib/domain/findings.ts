import type { Level } from "./levels";
import type { ParameterName } from "./parameters";
import type { SourcePlace } from "./values";

/** Whether `over` lies above or below the limit; null for a check without a limit. */
export type LimitSense = "upper" | "lower" | null;

export interface ClearingValue {
  readonly axis: string | null;
  readonly parameter: ParameterName;
  /** SI, as in ParameterValue; a current has the basis that the text uses. */
  readonly value: number;
  readonly unit: string;
}

/** The result of one check on one axis (or the machine). */
export interface Finding {
  readonly ruleId: string;
  readonly level: Level;
  readonly axis: string | null;
  /** Parameters that the value rests on, the leading one first. */
  readonly parameters: readonly ParameterName[];
  /** One plain sentence with numbers and units, as a technician would say it. */
  readonly sentence: string;
  readonly value: number | null;
  /** Where `over` begins. */
  readonly limit: number | null;
  /** Where `near` begins, for the gauge. */
  readonly nearLimit: number | null;
  readonly limitSense: LimitSense;
  /** As a share, or in K for temperatures; positive is the good side. */
  readonly margin: number | null;
  readonly unit: string;
  /** The formula with the numbers put in. */
  readonly formula: string;
  readonly source: string;
  readonly caution: string | null;
  readonly spans: readonly SourcePlace[];
  readonly clearingValue: ClearingValue | null;
  /** Paths of the missing data, e.g. "axes.x.motor.inductance_mh" or "axes.x.run_current". */
  readonly needs: readonly string[];
  /** Paths of the defaults that the finding rests on. */
  readonly assumed: readonly string[];
}

/** What makes two findings of two evaluations the same finding. */
export function findingKey(finding: Pick<Finding, "ruleId" | "axis">): string {
  return `${finding.ruleId}|${finding.axis?.toLowerCase() ?? ""}`;
}
