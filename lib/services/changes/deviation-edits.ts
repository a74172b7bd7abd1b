import "server-only";
import type { DeviationEdit } from "@/lib/domain/changes";
import { parameterChanges } from "@/lib/review/parameter-changes";
import type { CheckReport } from "@/lib/review/types";
import type { ProposalVersion } from "@/models/changes";
import { Evaluation } from "@/models/revisions";
import type { Tx } from "@/lib/services/kernel/context";

/** The values that a deviation permits, so that they can be written into a later baseline as well. */
export async function deviationEdits(tx: Tx, version: ProposalVersion): Promise<DeviationEdit[]> {
  const reports = await Evaluation.findAll({
    where: { id: [version.evaluationId, version.baseEvaluationId].filter((id) => id !== null) },
    transaction: tx.transaction,
  });
  // Stored reports are those that storeEvaluation wrote.
  const reportOf = (id: string | null) =>
    reports.find((row) => row.id === id)?.report as CheckReport | undefined;
  const [before, after] = [reportOf(version.baseEvaluationId), reportOf(version.evaluationId)];
  if (!before || !after) return [];
  return parameterChanges(before, after).flatMap(({ axis, parameter, toBe }) =>
    toBe
      ? [
          {
            axis,
            parameter,
            value: toBe.value,
            unit: toBe.unit,
            ...(toBe.basis ? { basis: toBe.basis } : {}),
          },
        ]
      : [],
  );
}
