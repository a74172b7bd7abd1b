import "server-only";
import type { z } from "zod";
import { changeLabel, SIGNATURE_MEANINGS } from "@/lib/domain/changes";
import type { CheckReport } from "@/lib/review/types";
import type { dispositionSchema } from "@/lib/schemas/changes";
import { MachineModel } from "@/models/catalog";
import type { ChangeRequest, ProposalVersion } from "@/models/changes";
import { Baseline, Disposition } from "@/models/changes";
import { Machine } from "@/models/machines";
import { Evaluation } from "@/models/revisions";
import type { Context, Tx } from "@/lib/services/kernel/context";
import { authorize, requirePerson } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { mailDisposition } from "@/lib/services/mail/change-mails";
import { appendRecord } from "@/lib/services/record/append";
import { demandPassword } from "@/lib/services/sessions/demand-password";
import { proposalBase, staleReason } from "./base";
import { targetOf } from "./edit";
import { overKeys } from "./evaluate";
import type { ChangeBrief } from "./load";
import { briefOf, currentVersion, demandMove, lockChange, moveTo, recordObject, subjectOf } from "./load";
import { supersedeOvertaken } from "./supersede";

type Request = z.output<typeof dispositionSchema>;

interface DecideRequest {
  readonly id: string;
  readonly request: Request;
  readonly ifMatch: number | null;
}

/**
 * Records a disposition: signed with the password, bound by hash to what was before the approver. Of two people who
 * decide at one moment the first to hold the row wins; the other is told.
 */
export async function decideChange(
  context: Context,
  { id, request, ifMatch }: DecideRequest,
): Promise<ChangeBrief> {
  const person = requirePerson(context);
  await demandPassword(context, { userId: person.id, password: request.password });
  return withTransaction(context, async (tx) => {
    const change = await lockChange(tx, id, ifMatch);
    authorize(tx, "changes.decide", subjectOf(change));
    demandMove(change, { to: request.decision, as: request.decision });
    const version = await currentVersion(tx, change);
    demandSameContent(change, version, request);
    if (request.decision === "approved") await demandApprovable(tx, change, { version, request });
    else demandReason(request);
    await Disposition.create(
      {
        changeId: change.id,
        proposalVersion: version.version,
        decision: request.decision,
        meaning: SIGNATURE_MEANINGS[request.decision],
        signedHash: version.signedContentHash,
        reason: request.reason,
        justifications: request.decision === "approved" ? request.justifications : {},
        actorId: person.id,
        actorName: person.name,
        at: tx.now,
      },
      { transaction: tx.transaction },
    );
    if (request.decision === "approved") await bringAbout(tx, change, version);
    await moveTo(tx, change, { state: request.decision, decidedAt: tx.now });
    await appendRecord(tx, {
      action: `change.${request.decision}`,
      object: recordObject(change),
      changeId: change.id,
      machineId: change.machineId,
      before: { state: "evaluation" },
      after: {
        state: request.decision,
        version: version.version,
        signed: version.signedContentHash,
        justifications: request.justifications,
      },
      reason: request.reason || null,
    });
    await mailDisposition(tx, { change, decision: request.decision, reason: request.reason });
    return briefOf(change);
  });
}

function demandSameContent(change: ChangeRequest, version: ProposalVersion, request: Request): void {
  if (request.proposalVersion === version.version && request.signedContentHash === version.signedContentHash)
    return;
  throw new ServiceError(
    "precondition_failed",
    `${changeLabel(change.number)} is at proposal version ${version.version} now, which is not what you had before you. Nothing was signed; look at it again.`,
    { details: { current: briefOf(change) } },
  );
}

function demandReason({ decision, reason }: Request): void {
  if (reason.length >= 3) return;
  throw new ServiceError("invalid", `Say why it is ${decision}. Nothing was signed.`, { pointer: "/reason" });
}

interface Approval {
  readonly version: ProposalVersion;
  readonly request: Request;
}

/** The base must not have moved, and every over-limit finding needs its written justification. */
async function demandApprovable(
  tx: Tx,
  change: ChangeRequest,
  { version, request }: Approval,
): Promise<void> {
  await lockTarget(tx, change);
  const today = await proposalBase({ ...targetOf(change), asOf: tx.now, transaction: tx.transaction });
  const stale = staleReason(version, today);
  if (stale) throw new ServiceError("conflict", `${stale} Nothing was signed.`, { details: { stale: true } });
  const evaluation = await Evaluation.findByPk(version.evaluationId, { transaction: tx.transaction });
  // The stored report is the one that storeEvaluation wrote.
  const report = evaluation?.report as CheckReport;
  const open = overKeys(report, version.machinesEvaluated).filter(
    ({ key }) => (request.justifications[key] ?? "").length < 10,
  );
  if (open.length === 0) return;
  throw new ServiceError(
    "invalid",
    `An over-limit finding is approved only with a written justification of at least ten characters. Open: ${open.map(({ sentence }) => sentence).join(" ")} Nothing was signed.`,
    { pointer: "/justifications", details: { open } },
  );
}

/** Two changes of one model (or machine) approved at one moment: the second waits here and finds its base moved. */
async function lockTarget({ transaction }: Tx, { modelId, machineId }: ChangeRequest): Promise<void> {
  const options = { transaction, lock: transaction.LOCK.UPDATE };
  if (machineId === null) await MachineModel.findByPk(modelId, options);
  else await Machine.findByPk(machineId, options);
}

/** An approved change of a model is its next baseline; machines require it when it is released to them. */
async function bringAbout(tx: Tx, change: ChangeRequest, version: ProposalVersion): Promise<void> {
  if (change.kind !== "baseline") return;
  const { transaction } = tx;
  await supersedeOvertaken(tx, change);
  const last = await Baseline.max<number | null, Baseline>("number", {
    where: { modelId: change.modelId },
    transaction,
  });
  await Baseline.create(
    {
      modelId: change.modelId,
      number: (last ?? 0) + 1,
      revisionId: version.revisionId,
      changeId: change.id,
      approvedAt: tx.now,
      approvedByName: tx.actor.name,
    },
    { transaction },
  );
}
