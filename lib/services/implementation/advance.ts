import "server-only";
import { ChangeRequest } from "@/models/changes";
import { LotMachine } from "@/models/implementation";
import type { Tx } from "@/lib/services/kernel/context";
import { appendRecord } from "@/lib/services/record/append";
import { moveTo, recordObject } from "@/lib/services/changes/load";
import type { Proof } from "./proof";
import { proofOf } from "./proof";

/** The open step of a machine: released to it, and neither verified nor ended. */
export function openStep(tx: Tx, machineId: string): Promise<LotMachine | null> {
  return LotMachine.findOne({
    where: { machineId, verifiedAt: null, endedAt: null },
    transaction: tx.transaction,
    lock: tx.transaction.LOCK.UPDATE,
  });
}

interface Advance {
  readonly place: LotMachine;
  readonly serial: string;
  /** The reading that has just come in, if that is what moves things on. */
  readonly readingId?: string | undefined;
}

/** Moves a machine's step on as far as its proof reaches; the change is verified by itself with its last machine. */
export async function advance(tx: Tx, { place, serial, readingId }: Advance): Promise<Proof> {
  const { transaction } = tx;
  const change = await ChangeRequest.findByPk(place.changeId, { transaction, lock: transaction.LOCK.UPDATE });
  const proof = await proofOf(place, tx.now, transaction);
  if (!change) return proof;
  if (proof.applied && !place.appliedAt) {
    await place.update({ appliedAt: tx.now, appliedReadingId: readingId ?? null }, { transaction });
    await note(tx, { change, place, serial, action: "change.applied" });
  }
  if (proof.missing === null && !place.verifiedAt) {
    await place.update({ verifiedAt: tx.now, appliedAt: place.appliedAt ?? tx.now }, { transaction });
    await note(tx, { change, place, serial, action: "change.machine_verified" });
    await verifyWhole(tx, change);
  }
  return proof;
}

interface Noted {
  readonly change: ChangeRequest;
  readonly place: LotMachine;
  readonly serial: string;
  readonly action: string;
}

async function note(tx: Tx, { change, place, serial, action }: Noted): Promise<void> {
  await appendRecord(tx, {
    action,
    object: recordObject(change),
    changeId: change.id,
    machineId: place.machineId,
    after: { machine: serial },
  });
}

async function verifyWhole(tx: Tx, change: ChangeRequest): Promise<void> {
  if (change.state !== "implementation") return;
  const open = await LotMachine.count({
    where: { changeId: change.id, verifiedAt: null, endedAt: null },
    transaction: tx.transaction,
  });
  if (open > 0) return;
  await moveTo(tx, change, { state: "verified" });
  await appendRecord(tx, {
    action: "change.verified",
    object: recordObject(change),
    changeId: change.id,
    machineId: change.machineId,
    before: { state: "implementation" },
    after: { state: "verified" },
  });
}
