import "server-only";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { mailSubmission } from "@/lib/services/mail/change-mails";
import { appendRecord } from "@/lib/services/record/append";
import type { ChangeBrief } from "./load";
import { briefOf, lockChange, moveTo, recordObject, subjectOf } from "./load";
import type { Act } from "./submit";

/** Takes a deferred change up again: it is in evaluation once more, and those who decide are told. */
export async function resumeChange(context: Context, { id, reason, ifMatch }: Act): Promise<ChangeBrief> {
  return withTransaction(context, async (tx) => {
    const change = await lockChange(tx, id, ifMatch);
    authorize(tx, "changes.resume", subjectOf(change));
    if (change.state !== "deferred")
      throw new ServiceError("conflict", "This change is not deferred. Nothing was done.");
    await moveTo(tx, change, { state: "evaluation", decidedAt: null });
    await appendRecord(tx, {
      action: "change.resumed",
      object: recordObject(change),
      changeId: change.id,
      machineId: change.machineId,
      before: { state: "deferred" },
      after: { state: "evaluation" },
      reason: reason || null,
    });
    await mailSubmission(tx, change);
    return briefOf(change);
  });
}
