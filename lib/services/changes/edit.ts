import "server-only";
import type { z } from "zod";
import { changeLabel } from "@/lib/domain/changes";
import { CHANGE_STATE_WORDS } from "@/lib/domain/change-states";
import type { editChangeSchema } from "@/lib/schemas/changes";
import type { ChangeRequest } from "@/models/changes";
import type { Context, Tx } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { mailVoidedApproval } from "@/lib/services/mail/change-mails";
import { appendRecord } from "@/lib/services/record/append";
import type { StoredFile } from "@/lib/services/revisions/files";
import { acceptFile, contentHash } from "@/lib/services/revisions/files";
import { loadFiles } from "@/lib/services/revisions/load";
import type { ProposalBase } from "./base";
import { proposalBase } from "./base";
import { demandFutureDay } from "./create";
import { demandEffectivity } from "./effectivity";
import type { ChangeBrief } from "./load";
import { briefOf, currentVersion, lockChange, moveTo, recordObject, subjectOf } from "./load";
import { voidApproval } from "./void-approval";
import { writeVersion } from "./write-version";

type EditChange = z.output<typeof editChangeSchema>;

interface EditRequest {
  readonly id: string;
  readonly edit: EditChange;
  readonly ifMatch: number | null;
}

const EDITABLE = ["draft", "evaluation", "approved"] as const;

/** Makes a new proposal version. In evaluation it stays there; once approved, the signature becomes void. */
export async function editChange(context: Context, { id, edit, ifMatch }: EditRequest): Promise<ChangeBrief> {
  return withTransaction(context, async (tx) => {
    const change = await lockChange(tx, id, ifMatch);
    authorize(tx, "changes.edit", subjectOf(change));
    demandEditable(change);
    const before = await wordsBefore(tx, change);
    await changeWords(tx, change, edit);
    const { files, base } = await newContent(tx, change, edit);
    await writeVersion(tx, change, { files, base, note: edit.note });
    await leaveApproval(tx, change);
    await appendRecord(tx, {
      action: "change.edited",
      object: recordObject(change),
      changeId: change.id,
      machineId: change.machineId,
      before,
      after: { version: change.currentVersion, title: change.title, content: contentHash(files) },
      reason: edit.note || null,
    });
    return briefOf(change);
  });
}

function demandEditable(change: ChangeRequest): void {
  if (EDITABLE.some((state) => state === change.state)) return;
  throw new ServiceError(
    "conflict",
    `${changeLabel(change.number)} is ${CHANGE_STATE_WORDS[change.state]} and is not edited any more. Your text was not kept here; make a new change with it.`,
  );
}

async function wordsBefore(tx: Tx, change: ChangeRequest) {
  const version = await currentVersion(tx, change);
  const files = await loadFiles(version.revisionId, tx.transaction);
  return { version: change.currentVersion, title: change.title, content: contentHash(files) };
}

async function changeWords(tx: Tx, change: ChangeRequest, edit: EditChange): Promise<void> {
  const { transaction } = tx;
  const effectivity =
    change.machineId === null ? (edit.effectivity ?? change.effectivity) : change.effectivity;
  await demandEffectivity({ modelId: change.modelId, effectivity, transaction });
  demandFutureDay(edit.deviationUntil, tx.now);
  await change.update(
    {
      title: edit.title ?? change.title,
      reason: edit.reason ?? change.reason,
      class: edit.class ?? change.class,
      effectivity,
      deviationUntil: change.machineId === null ? null : (edit.deviationUntil ?? change.deviationUntil),
    },
    { transaction },
  );
}

/** The files as sent or as they were, upon the base that the proposal was made on: only bringing up to date moves that. */
async function newContent(
  tx: Tx,
  change: ChangeRequest,
  edit: EditChange,
): Promise<{ files: StoredFile[]; base: ProposalBase }> {
  const before = await currentVersion(tx, change);
  const files = edit.files
    ? edit.files.map((file, index) => acceptFile({ file, index }))
    : await loadFiles(before.revisionId, tx.transaction);
  const today = await proposalBase({ ...targetOf(change), asOf: tx.now, transaction: tx.transaction });
  if (today.hash === before.baseHash && today.baselineId === before.baseBaselineId)
    return { files, base: today };
  const old = before.baseRevisionId ? await loadFiles(before.baseRevisionId, tx.transaction) : [];
  const ids = { baselineId: before.baseBaselineId, revisionId: before.baseRevisionId };
  return { files, base: { label: "an earlier base", ...ids, files: old, hash: before.baseHash } };
}

export function targetOf(change: ChangeRequest) {
  return { kind: change.kind, modelId: change.modelId, machineId: change.machineId };
}

/** An edit after approval: back to evaluation, the signature void, everyone who signed told. */
export async function leaveApproval(tx: Tx, change: ChangeRequest): Promise<void> {
  if (change.state !== "approved") return;
  const signature = await voidApproval(tx, change, `edited by ${tx.actor.name} after approval`);
  await moveTo(tx, change, { state: "evaluation", decidedAt: null });
  if (signature) await mailVoidedApproval(tx, { change, signature });
}
