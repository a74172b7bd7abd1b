import "server-only";
import type { ChangeState } from "@/lib/domain/change-states";
import { CHANGE_STATE_WORDS, mayMove } from "@/lib/domain/change-states";
import { changeLabel } from "@/lib/domain/changes";
import type { ChangeSubject } from "@/lib/policies/decide";
import { ChangeRequest, ProposalVersion } from "@/models/changes";
import type { Tx } from "@/lib/services/kernel/context";
import { notFound, ServiceError } from "@/lib/services/kernel/errors";

/** A change as the acts upon it answer it. */
export interface ChangeBrief {
  readonly id: string;
  readonly label: string;
  readonly state: ChangeState;
  readonly version: number;
  readonly lockVersion: number;
}

export function briefOf(change: ChangeRequest): ChangeBrief {
  return {
    id: change.id,
    label: changeLabel(change.number),
    state: change.state,
    version: change.currentVersion,
    lockVersion: change.lockVersion,
  };
}

export function subjectOf(change: ChangeRequest): ChangeSubject {
  return { authorId: change.authorId, lastEditorId: change.lastEditorId };
}

/** Locks the change for the rest of the transaction; 412 where the caller has seen another version of it. */
export async function lockChange(tx: Tx, id: string, ifMatch: number | null): Promise<ChangeRequest> {
  const change = await ChangeRequest.findByPk(id, {
    transaction: tx.transaction,
    lock: tx.transaction.LOCK.UPDATE,
  });
  if (!change) throw notFound("change");
  if (ifMatch !== null && ifMatch !== change.lockVersion)
    throw new ServiceError(
      "precondition_failed",
      `${changeLabel(change.number)} was changed meanwhile and is ${CHANGE_STATE_WORDS[change.state]} now. Nothing was done; look at it again first.`,
      { details: { current: briefOf(change) } },
    );
  return change;
}

export async function currentVersion(tx: Tx, change: ChangeRequest): Promise<ProposalVersion> {
  const version = await ProposalVersion.findOne({
    where: { changeId: change.id, version: change.currentVersion },
    transaction: tx.transaction,
  });
  if (!version) throw notFound("proposal version");
  return version;
}

interface Move {
  readonly to: ChangeState;
  /** What people tried, for the refusal: "approved", "released" … */
  readonly as: string;
}

/** Refuses a move that the state table does not have, in words that say how things stand. */
export function demandMove(change: ChangeRequest, { to, as }: Move): void {
  if (mayMove(change.state, to)) return;
  throw new ServiceError(
    "conflict",
    `${changeLabel(change.number)} is ${CHANGE_STATE_WORDS[change.state]} and cannot be ${as}. Nothing was done.`,
    { details: { current: briefOf(change) } },
  );
}

/** Writes the new state under the row lock that the caller holds. */
export async function moveTo(
  tx: Tx,
  change: ChangeRequest,
  fields: Partial<Pick<ChangeRequest, "state" | "submittedAt" | "decidedAt">>,
): Promise<void> {
  await change.update({ ...fields, lockVersion: change.lockVersion + 1 }, { transaction: tx.transaction });
}

/** The object of a record entry. */
export function recordObject(change: ChangeRequest) {
  return { type: "change", id: change.id, label: `${changeLabel(change.number)} ${change.title}` } as const;
}
