import "server-only";
import { Op } from "sequelize";
import { changeLabel } from "@/lib/domain/changes";
import { joinWords, plural } from "@/lib/domain/sentences";
import type { ChangeRequest, ProposalVersion } from "@/models/changes";
import { Baseline, ChangeRequest as Changes, Disposition } from "@/models/changes";
import { Deviation, Lot, LotMachine } from "@/models/implementation";
import { Machine } from "@/models/machines";
import type { Context, Tx } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound, ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { mailRelease } from "@/lib/services/mail/change-mails";
import { assignBaseline } from "@/lib/services/machines/baselines";
import { refreshStatus } from "@/lib/services/machines/refresh-status";
import { appendRecord } from "@/lib/services/record/append";
import { proposalBase, staleReason } from "./base";
import { deviationEdits } from "./deviation-edits";
import { targetOf } from "./edit";
import { machinesOf } from "./effectivity";
import type { ChangeBrief } from "./load";
import { briefOf, currentVersion, demandMove, lockChange, moveTo, recordObject, subjectOf } from "./load";
import type { Act } from "./submit";

/** Releases an approved change to its machines, in one lot: from now on they require it. */
export async function releaseChange(context: Context, { id, reason, ifMatch }: Act): Promise<ChangeBrief> {
  return withTransaction(context, async (tx) => {
    const change = await lockChange(tx, id, ifMatch);
    authorize(tx, "changes.release", subjectOf(change));
    if (change.state !== "approved") demandMove(change, { to: "verified", as: "released" });
    if (change.state !== "approved")
      throw new ServiceError("conflict", `${changeLabel(change.number)} is released already.`);
    const machines = await releasable(tx, change);
    await makeLot(tx, change, machines);
    if (change.kind === "baseline") await requireBaseline(tx, change, machines);
    else await permitDeviation(tx, change);
    await moveTo(tx, change, { state: "implementation" });
    await appendRecord(tx, {
      action: "change.released",
      object: recordObject(change),
      changeId: change.id,
      machineId: change.machineId,
      before: { state: "approved" },
      after: { state: "implementation", lot: 1, machines: machines.map(({ serial }) => serial) },
      reason: reason || null,
    });
    for (const machine of machines) await refreshStatus(tx, machine.id);
    await mailRelease(tx, { change, machines });
    return briefOf(change);
  });
}

/** Locked machines of the effectivity; refused where one still has another change to verify. */
async function releasable(tx: Tx, change: ChangeRequest): Promise<Machine[]> {
  const { transaction } = tx;
  const machines = await machinesOf({
    modelId: change.modelId,
    effectivity: change.effectivity,
    transaction,
  });
  const ids = machines.map(({ id }) => id);
  if (ids.length === 0)
    throw new ServiceError("conflict", "No machine in service is in the effectivity. Nothing was released.");
  await Machine.findAll({
    where: { id: ids },
    order: [["id", "ASC"]],
    transaction,
    lock: transaction.LOCK.UPDATE,
  });
  const busy = await LotMachine.findAll({
    where: { machineId: ids, verifiedAt: null, endedAt: null, changeId: { [Op.ne]: change.id } },
    transaction,
  });
  if (busy.length > 0) throw await stillBusy(busy, machines);
  return machines;
}

async function stillBusy(busy: readonly LotMachine[], machines: readonly Machine[]): Promise<ServiceError> {
  const changes = await Changes.findAll({
    where: { id: busy.map(({ changeId }) => changeId) },
    attributes: ["number"],
  });
  const serials = machines
    .filter(({ id }) => busy.some(({ machineId }) => machineId === id))
    .map(({ serial }) => serial);
  const labels = joinWords(changes.map(({ number }) => changeLabel(number)));
  const shown = serials.length > 5 ? plural(serials.length, "machine") : joinWords(serials);
  return new ServiceError(
    "conflict",
    `${labels} is still to be verified on ${shown}. Two unproved changes on one machine prove nothing: verify or back out the earlier one first. Nothing was released.`,
  );
}

async function makeLot(tx: Tx, change: ChangeRequest, machines: readonly Machine[]): Promise<void> {
  const { transaction } = tx;
  const lot = await Lot.create(
    { changeId: change.id, number: 1, releasedByName: tx.actor.name, releasedAt: tx.now },
    { transaction },
  );
  const rows = machines.map(({ id }) => ({
    lotId: lot.id,
    changeId: change.id,
    machineId: id,
    releasedAt: tx.now,
  }));
  await LotMachine.bulkCreate(rows, { transaction });
}

async function requireBaseline(tx: Tx, change: ChangeRequest, machines: readonly Machine[]): Promise<void> {
  const baseline = await Baseline.findOne({
    where: { changeId: change.id, voidedAt: null },
    transaction: tx.transaction,
  });
  if (!baseline) throw notFound("baseline");
  for (const { id } of machines)
    await assignBaseline(tx, { machineId: id, baselineId: baseline.id, changeId: change.id });
}

/** A deviation rests on the text that it was approved upon; where that has moved it is brought up to date first. */
async function permitDeviation(tx: Tx, change: ChangeRequest): Promise<void> {
  const { transaction } = tx;
  const version = await currentVersion(tx, change);
  const stale = staleReason(version, await proposalBase({ ...targetOf(change), asOf: tx.now, transaction }));
  if (stale)
    throw new ServiceError("conflict", `${stale} Nothing was released.`, { details: { stale: true } });
  const approval = await Disposition.findOne({
    where: { changeId: change.id, decision: "approved", voidAt: null },
    transaction,
  });
  await Deviation.create(
    await deviationRow(tx, { change, version, approvedByName: approval?.actorName ?? "" }),
    { transaction },
  );
}

interface Permit {
  readonly change: ChangeRequest;
  readonly version: ProposalVersion;
  readonly approvedByName: string;
}

async function deviationRow(tx: Tx, { change, version, approvedByName }: Permit) {
  if (change.machineId === null || change.deviationUntil === null || version.baseBaselineId === null)
    throw new ServiceError(
      "conflict",
      "A permitted deviation needs its machine, its last day and a baseline.",
    );
  return {
    machineId: change.machineId,
    changeId: change.id,
    revisionId: version.revisionId,
    baseBaselineId: version.baseBaselineId,
    edits: await deviationEdits(tx, version),
    reason: change.reason,
    approvedByName,
    fromAt: tx.now,
    untilOn: change.deviationUntil,
  };
}
