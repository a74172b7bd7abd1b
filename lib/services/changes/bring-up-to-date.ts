import "server-only";
import { rebaseEdits } from "@/lib/review/rebase";
import type { RebaseResult } from "@/lib/review/rebase";
import type { ChangeRequest } from "@/models/changes";
import type { Context, Tx } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { currentKeyTable } from "@/lib/services/key-tables/current";
import { appendRecord } from "@/lib/services/record/append";
import type { StoredFile } from "@/lib/services/revisions/files";
import { acceptFile, rewriteFile } from "@/lib/services/revisions/files";
import { loadFiles } from "@/lib/services/revisions/load";
import type { ProposalBase } from "./base";
import { proposalBase, staleReason } from "./base";
import { leaveApproval, targetOf } from "./edit";
import { machinesOf } from "./effectivity";
import { proposalAssembly } from "./evaluate";
import type { ChangeBrief } from "./load";
import { briefOf, currentVersion, demandMove, lockChange, recordObject, subjectOf } from "./load";
import { writeVersion } from "./write-version";

export interface BroughtUpToDate extends Pick<RebaseResult, "reapplied" | "notFitting" | "textNotFitting"> {
  readonly change: ChangeBrief;
}

interface Request {
  readonly id: string;
  readonly ifMatch: number | null;
}

/** Opens the proposal again on its base as it is today: its edits reapplied where they still fit, the rest told. */
export async function bringUpToDate(context: Context, { id, ifMatch }: Request): Promise<BroughtUpToDate> {
  return withTransaction(context, async (tx) => {
    const change = await lockChange(tx, id, ifMatch);
    authorize(tx, "changes.edit", subjectOf(change));
    if (change.state !== "draft") demandMove(change, { to: "withdrawn", as: "brought up to date" });
    const { base, rebased, files } = await rebase(tx, change);
    await writeVersion(tx, change, { files, base, note: `brought up to date with ${base.label}` });
    await leaveApproval(tx, change);
    await appendRecord(tx, {
      action: "change.brought_up_to_date",
      object: recordObject(change),
      changeId: change.id,
      machineId: change.machineId,
      after: {
        version: change.currentVersion,
        base: base.label,
        reapplied: rebased.reapplied.map(({ axis, parameter }) => ({ axis, parameter })),
        notFitting: rebased.notFitting.map(({ axis, parameter, reason }) => ({ axis, parameter, reason })),
      },
    });
    const { reapplied, notFitting, textNotFitting } = rebased;
    return { change: briefOf(change), reapplied, notFitting, textNotFitting };
  });
}

async function rebase(tx: Tx, change: ChangeRequest) {
  const { transaction } = tx;
  const target = targetOf(change);
  const version = await currentVersion(tx, change);
  const base = await proposalBase({ ...target, asOf: tx.now, transaction });
  if (!staleReason(version, base))
    throw new ServiceError("conflict", "The proposal stands on the text in force already. Nothing was done.");
  const edited = await loadFiles(version.revisionId, transaction);
  const oldBase = version.baseRevisionId ? await loadFiles(version.baseRevisionId, transaction) : [];
  const machines = change.machineId === null ? await machinesOf({ ...change.get(), transaction }) : [];
  const assembly = await proposalAssembly({ ...target, transaction }, machines);
  const { table: keyTable } = await currentKeyTable(change.modelId, transaction);
  const rebased = rebaseEdits({ oldBase, edited, newBase: base.files, keyTable, assembly });
  return { base, rebased, files: filesOf(rebased, base, edited) };
}

/** The rebased texts in the encoding of the file they come from. */
function filesOf({ files }: RebaseResult, base: ProposalBase, edited: readonly StoredFile[]): StoredFile[] {
  return files.map((file, index) => {
    const origin = [...base.files, ...edited].find(({ path }) => path === file.path);
    return origin ? rewriteFile(origin, file.text) : acceptFile({ file, index });
  });
}
