import { checkConfiguration } from "./check";
import { compareFindings } from "./compare-findings";
import { effects } from "./effects";
import { parameterChanges } from "./parameter-changes";
import type { CheckInput, CheckReport, Effect, FindingComparison, ParameterChange } from "./types";

/** What the editor asks its worker after each pause in typing. */
export interface LiveRequest {
  /** Counts up; an answer to an older request is dropped. */
  readonly id: number;
  readonly input: CheckInput;
  /** The configuration that the change starts from; without it only the report is answered. */
  readonly baseline?: CheckReport | null | undefined;
}

export interface LiveAnswer {
  readonly id: number;
  readonly report: CheckReport;
  readonly changes: readonly ParameterChange[];
  readonly effects: readonly Effect[];
  readonly comparison: FindingComparison;
}

/** The worker's whole work: check the text as it stands and hold it against the baseline. */
export function answerLive({ id, input, baseline }: LiveRequest): LiveAnswer {
  const report = checkConfiguration(input);
  const before = baseline ?? report;
  const changes = parameterChanges(before, report);
  return {
    id,
    report,
    changes,
    effects: effects({ before, after: report, changes }),
    comparison: compareFindings(before.findings, report.findings),
  };
}
