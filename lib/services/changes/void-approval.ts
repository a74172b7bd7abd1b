import "server-only";
import type { ChangeRequest } from "@/models/changes";
import { Baseline, Disposition } from "@/models/changes";
import type { Tx } from "@/lib/services/kernel/context";

/** Takes back what an approval brought about before any machine has it: the signature and the baseline it made. */
export async function voidApproval(
  tx: Tx,
  change: ChangeRequest,
  reason: string,
): Promise<Disposition | null> {
  const signature = await Disposition.findOne({
    where: { changeId: change.id, decision: "approved", voidAt: null },
    transaction: tx.transaction,
  });
  await signature?.update({ voidAt: tx.now, voidReason: reason }, { transaction: tx.transaction });
  await Baseline.update(
    { voidedAt: tx.now, voidReason: reason },
    { where: { changeId: change.id, voidedAt: null }, transaction: tx.transaction },
  );
  return signature;
}
