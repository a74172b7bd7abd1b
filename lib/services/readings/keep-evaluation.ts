import "server-only";
import type { CheckReport } from "@/lib/review/types";
import { RULES_VERSION } from "@/lib/rules/version";
import { Evaluation } from "@/models/revisions";
import { storeEvaluation, type StoredEvaluation } from "@/lib/services/evaluations/store";
import type { Tx } from "@/lib/services/kernel/context";
import { hashOf } from "@/lib/services/kernel/hash";
import type { MachineAssembly } from "@/lib/services/machines/assembly";
import type { CurrentKeyTable } from "@/lib/services/key-tables/current";
import type { CurrentPolicy } from "@/lib/services/policies/ensure";

interface Evaluated {
  readonly revisionId: string;
  readonly machineId: string;
  readonly hardware: MachineAssembly;
  readonly keyTable: CurrentKeyTable;
  readonly policy: CurrentPolicy;
  readonly report: CheckReport;
}

/** Keeps what the checks made of a reading; a machine that reports the same every hour keeps it once. */
export async function keepEvaluation(tx: Tx, input: Evaluated): Promise<StoredEvaluation> {
  const { revisionId, machineId, hardware, keyTable, policy, report } = input;
  const newest = await Evaluation.findOne({
    where: { revisionId, machineId, assemblyHash: hashOf(hardware.assembly) },
    order: [["createdAt", "DESC"]],
    transaction: tx.transaction,
  });
  const same =
    newest?.rulesVersion === RULES_VERSION &&
    newest.policyVersion === policy.version &&
    newest.keyTableId === keyTable.id &&
    hashOf(newest.report) === hashOf(report);
  if (newest && same) return { id: newest.id, level: newest.level };
  return storeEvaluation(tx, {
    revisionId,
    machineId,
    assembly: hardware.assembly,
    keyTableId: keyTable.id,
    policyVersion: policy.version,
    report,
  });
}
