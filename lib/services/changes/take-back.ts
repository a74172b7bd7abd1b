import "server-only";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import type { ChangeBrief } from "./load";
import { briefOf, demandMove, lockChange, moveTo, recordObject, subjectOf } from "./load";
import type { Act } from "./submit";

/** The author takes a proposal out of evaluation, back into draft. */
export async function takeBackChange(context: Context, { id, reason, ifMatch }: Act): Promise<ChangeBrief> {
  return withTransaction(context, async (tx) => {
    const change = await lockChange(tx, id, ifMatch);
    authorize(tx, "changes.take_back", subjectOf(change));
    demandMove(change, { to: "draft", as: "taken back" });
    await moveTo(tx, change, { state: "draft", submittedAt: null });
    await appendRecord(tx, {
      action: "change.taken_back",
      object: recordObject(change),
      changeId: change.id,
      machineId: change.machineId,
      before: { state: "evaluation" },
      after: { state: "draft" },
      reason: reason || null,
    });
    return briefOf(change);
  });
}
