import "server-only";
import { ChangeRequest } from "@/models/changes";
import type { Tx } from "@/lib/services/kernel/context";
import { appendRecord } from "@/lib/services/record/append";
import { changeLabel } from "@/lib/domain/changes";
import { moveTo, recordObject } from "./load";

/**
 * A change that is approved but on no machine yet is overtaken when another one, built upon it, is approved: its
 * content goes out with the later one. Its signature stands as history.
 */
export async function supersedeOvertaken(tx: Tx, later: ChangeRequest): Promise<void> {
  const overtaken = await ChangeRequest.findAll({
    where: { modelId: later.modelId, kind: "baseline", state: "approved" },
    transaction: tx.transaction,
    lock: tx.transaction.LOCK.UPDATE,
  });
  for (const change of overtaken) {
    await moveTo(tx, change, { state: "superseded" });
    await appendRecord(tx, {
      action: "change.superseded",
      object: recordObject(change),
      changeId: change.id,
      before: { state: "approved" },
      after: { state: "superseded", by: changeLabel(later.number) },
    });
  }
}
