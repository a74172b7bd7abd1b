import "server-only";
import { Op } from "sequelize";
import type { z } from "zod";
import { SIGNATURE_MEANINGS } from "@/lib/domain/changes";
import type { backOutSchema } from "@/lib/schemas/changes";
import type { ChangeRequest } from "@/models/changes";
import { Disposition, MachineBaseline } from "@/models/changes";
import { Deviation, LotMachine } from "@/models/implementation";
import type { Context, Tx } from "@/lib/services/kernel/context";
import { authorize, requirePerson } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { mailDisposition } from "@/lib/services/mail/change-mails";
import { assignBaseline } from "@/lib/services/machines/baselines";
import { refreshStatus } from "@/lib/services/machines/refresh-status";
import { appendRecord } from "@/lib/services/record/append";
import { demandPassword } from "@/lib/services/sessions/demand-password";
import type { ChangeBrief } from "./load";
import { briefOf, currentVersion, demandMove, lockChange, moveTo, recordObject, subjectOf } from "./load";
import { voidApproval } from "./void-approval";

interface Request {
  readonly id: string;
  readonly request: z.output<typeof backOutSchema>;
  readonly ifMatch: number | null;
}

/** Returns the machines to what they required before this change: itself a signed decision. */
export async function backOutChange(
  context: Context,
  { id, request, ifMatch }: Request,
): Promise<ChangeBrief> {
  const person = requirePerson(context);
  await demandPassword(context, { userId: person.id, password: request.password });
  return withTransaction(context, async (tx) => {
    const change = await lockChange(tx, id, ifMatch);
    authorize(tx, "changes.back_out", subjectOf(change));
    demandMove(change, { to: "backed_out", as: "backed out" });
    const before = change.state;
    const version = await currentVersion(tx, change);
    await voidApproval(tx, change, `backed out by ${person.name}`);
    const machineIds = await returnMachines(tx, change);
    await Disposition.create(
      {
        changeId: change.id,
        proposalVersion: version.version,
        decision: "backed_out",
        meaning: SIGNATURE_MEANINGS.backed_out,
        signedHash: version.signedContentHash,
        reason: request.reason,
        actorId: person.id,
        actorName: person.name,
        at: tx.now,
      },
      { transaction: tx.transaction },
    );
    await moveTo(tx, change, { state: "backed_out", decidedAt: tx.now });
    await appendRecord(tx, {
      action: "change.backed_out",
      object: recordObject(change),
      changeId: change.id,
      machineId: change.machineId,
      before: { state: before },
      after: { state: "backed_out", machines: machineIds.length },
      reason: request.reason,
    });
    for (const machineId of machineIds) await refreshStatus(tx, machineId);
    await mailDisposition(tx, { change, decision: "backed_out", reason: request.reason });
    return briefOf(change);
  });
}

/** Ends this change's place on each machine; the baseline that was required before it is required again. */
async function returnMachines(tx: Tx, change: ChangeRequest): Promise<string[]> {
  const { transaction } = tx;
  const places = await LotMachine.findAll({ where: { changeId: change.id, endedAt: null }, transaction });
  const machineIds = places.map(({ machineId }) => machineId);
  await LotMachine.update(
    { endedAt: tx.now },
    { where: { changeId: change.id, endedAt: null }, transaction },
  );
  await Deviation.update(
    { endedAt: tx.now, endReason: "backed out" },
    { where: { changeId: change.id, endedAt: null }, transaction },
  );
  if (change.kind === "baseline")
    for (const machineId of machineIds) await requireEarlier(tx, change, machineId);
  return machineIds;
}

async function requireEarlier(tx: Tx, change: ChangeRequest, machineId: string): Promise<void> {
  const { transaction } = tx;
  const own = await MachineBaseline.findOne({
    where: { machineId, changeId: change.id, untilAt: null },
    transaction,
  });
  if (!own) return;
  const earlier = await MachineBaseline.findOne({
    where: { machineId, fromAt: { [Op.lt]: own.fromAt } },
    order: [["fromAt", "DESC"]],
    transaction,
  });
  if (earlier)
    await assignBaseline(tx, { machineId, baselineId: earlier.baselineId, changeId: earlier.changeId });
  else await own.update({ untilAt: tx.now }, { transaction });
}
