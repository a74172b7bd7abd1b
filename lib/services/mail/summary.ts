import "server-only";
import { changeSummary } from "@/lib/review/change-summary";
import { effects } from "@/lib/review/effects";
import { parameterChanges } from "@/lib/review/parameter-changes";
import type { CheckReport } from "@/lib/review/types";
import type { ChangeRequest } from "@/models/changes";
import { ProposalVersion } from "@/models/changes";
import { Evaluation } from "@/models/revisions";
import type { Tx } from "@/lib/services/kernel/context";

/** Parameters, effects and findings of the current proposal, in plain lines. */
export async function summaryLines(tx: Tx, change: ChangeRequest): Promise<string[]> {
  const { transaction } = tx;
  const version = await ProposalVersion.findOne({
    where: { changeId: change.id, version: change.currentVersion },
    transaction,
  });
  if (!version) return [];
  const reports = await reportsOf(version, tx);
  if (!reports.after) return [];
  const { after, before = EMPTY } = reports;
  const changes = parameterChanges(before, after);
  return changeSummary({ changes, effects: effects({ before, after, changes }), findings: after.findings });
}

const EMPTY: CheckReport = {
  documents: [],
  parameters: [],
  unmapped: [],
  quantities: [],
  findings: [],
  provenance: [],
};

async function reportsOf(version: ProposalVersion, { transaction }: Tx) {
  const ids = [version.evaluationId, version.baseEvaluationId].filter((id) => id !== null);
  const rows = await Evaluation.findAll({ where: { id: ids }, transaction });
  // Stored reports are those that storeEvaluation wrote.
  const reportOf = (id: string | null) =>
    rows.find((row) => row.id === id)?.report as CheckReport | undefined;
  return { before: reportOf(version.baseEvaluationId), after: reportOf(version.evaluationId) };
}
