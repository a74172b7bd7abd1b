import "server-only";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { mailDisposition } from "@/lib/services/mail/change-mails";
import { appendRecord } from "@/lib/services/record/append";
import type { ChangeBrief } from "./load";
import { briefOf, demandMove, lockChange, moveTo, recordObject, subjectOf } from "./load";
import type { Act } from "./submit";
import { voidApproval } from "./void-approval";

/** Ends a change that is on no machine yet. */
export async function withdrawChange(context: Context, { id, reason, ifMatch }: Act): Promise<ChangeBrief> {
  return withTransaction(context, async (tx) => {
    const change = await lockChange(tx, id, ifMatch);
    authorize(tx, "changes.withdraw", subjectOf(change));
    demandMove(change, { to: "withdrawn", as: "withdrawn" });
    const before = change.state;
    await voidApproval(tx, change, `withdrawn by ${tx.actor.name}`);
    await moveTo(tx, change, { state: "withdrawn", decidedAt: tx.now });
    await appendRecord(tx, {
      action: "change.withdrawn",
      object: recordObject(change),
      changeId: change.id,
      machineId: change.machineId,
      before: { state: before },
      after: { state: "withdrawn" },
      reason,
    });
    if (before !== "draft") await mailDisposition(tx, { change, decision: "withdrawn", reason });
    return briefOf(change);
  });
}
