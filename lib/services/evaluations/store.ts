import "server-only";
import type { Assembly } from "@/lib/domain/assembly";
import type { Level } from "@/lib/domain/levels";
import { gravest } from "@/lib/domain/levels";
import type { CheckReport } from "@/lib/review/types";
import { RULES_VERSION } from "@/lib/rules/version";
import { Evaluation, FindingRow } from "@/models/revisions";
import type { Tx } from "@/lib/services/kernel/context";
import { hashOf } from "@/lib/services/kernel/hash";

interface StoreInput {
  readonly revisionId: string;
  readonly machineId: string | null;
  readonly assembly: Assembly;
  readonly keyTableId: string | null;
  readonly policyVersion: number;
  readonly report: CheckReport;
}

export interface StoredEvaluation {
  readonly id: string;
  readonly level: Level;
}

/** Keeps what the checks made of a revision, with everything needed to make it again: versions, hardware, its hash. */
export async function storeEvaluation(tx: Tx, input: StoreInput): Promise<StoredEvaluation> {
  const { report, assembly } = input;
  const level = gravest(report.findings.map((finding) => finding.level));
  const evaluation = await Evaluation.create(
    {
      revisionId: input.revisionId,
      machineId: input.machineId,
      rulesVersion: RULES_VERSION,
      policyVersion: input.policyVersion,
      keyTableId: input.keyTableId,
      assembly,
      assemblyHash: hashOf(assembly),
      report,
      level,
      createdAt: tx.now,
    },
    { transaction: tx.transaction },
  );
  await FindingRow.bulkCreate(
    report.findings.map((finding) => ({
      evaluationId: evaluation.id,
      ruleId: finding.ruleId,
      level: finding.level,
      axis: finding.axis,
      value: finding.value,
      limitValue: finding.limit,
      unit: finding.unit,
      sentence: finding.sentence,
    })),
    { transaction: tx.transaction },
  );
  return { id: evaluation.id, level };
}
