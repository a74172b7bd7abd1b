import "server-only";
import type { ChangeRequest } from "@/models/changes";
import type { Context, Tx } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { mailSubmission } from "@/lib/services/mail/change-mails";
import { appendRecord } from "@/lib/services/record/append";
import { contentHash } from "@/lib/services/revisions/files";
import { loadFiles } from "@/lib/services/revisions/load";
import { machinesOf } from "./effectivity";
import type { ChangeBrief } from "./load";
import { briefOf, currentVersion, demandMove, lockChange, moveTo, recordObject, subjectOf } from "./load";

export interface Act {
  readonly id: string;
  readonly reason: string;
  readonly ifMatch: number | null;
}

/** Hands a draft to those who decide and tells them by e-mail. */
export async function submitChange(context: Context, { id, reason, ifMatch }: Act): Promise<ChangeBrief> {
  return withTransaction(context, async (tx) => {
    const change = await lockChange(tx, id, ifMatch);
    authorize(tx, "changes.submit", subjectOf(change));
    if (change.state !== "draft") demandMove(change, { to: "evaluation", as: "submitted" });
    if (change.state !== "draft") throw notADraft();
    await demandSomething(tx, change);
    await moveTo(tx, change, { state: "evaluation", submittedAt: tx.now });
    await appendRecord(tx, {
      action: "change.submitted",
      object: recordObject(change),
      changeId: change.id,
      machineId: change.machineId,
      before: { state: "draft" },
      after: { state: "evaluation", version: change.currentVersion },
      reason: reason || null,
    });
    await mailSubmission(tx, change);
    return briefOf(change);
  });
}

function notADraft(): ServiceError {
  return new ServiceError("conflict", "This change is not a draft. Nothing was done.");
}

/** A proposal that changes nothing, or applies to no machine, gives nobody anything to decide. */
async function demandSomething(tx: Tx, change: ChangeRequest): Promise<void> {
  const version = await currentVersion(tx, change);
  const files = await loadFiles(version.revisionId, tx.transaction);
  if (contentHash(files) === version.baseHash)
    throw new ServiceError(
      "invalid",
      "The text is its base unchanged: there is nothing to decide. The draft is kept.",
      {
        pointer: "/files",
      },
    );
  const { modelId, effectivity } = change;
  const machines = await machinesOf({ modelId, effectivity, transaction: tx.transaction });
  if (machines.length === 0)
    throw new ServiceError("invalid", "No machine in service is in the effectivity. The draft is kept.", {
      pointer: "/effectivity",
    });
}
