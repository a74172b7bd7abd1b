import "server-only";
import { copyMachineSchema, type CopyMachine, type MachineView } from "@/lib/schemas/machines-write";
import { Machine, MachineHardware } from "@/models/machines";
import type { Context, Tx } from "@/lib/services/kernel/context";
import { authorize, personBehind } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { enqueueRecheck } from "@/lib/services/recheck/enqueue";
import { assignReleasedBaseline } from "./baselines";
import { lockMachine, machineObject, requireFreeSerial, requireModelInUse, requireSite } from "./find";
import { presentMachine } from "./present";

/** Adds a machine of the same model; recorded hardware comes along only on evidence of its own. */
export async function copyMachine(
  context: Context,
  input: CopyMachine & { readonly id: string },
): Promise<MachineView> {
  const { serial, siteId, hardwareEvidence } = copyMachineSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "machines.write");
    const original = await lockMachine(tx, input.id);
    await requireFreeSerial(tx, serial);
    await requireModelInUse(tx, original.modelId);
    const site = await requireSite(tx, siteId ?? original.siteId);
    const machine = await Machine.create(
      { serial, modelId: original.modelId, siteId: site.id, note: original.note },
      { transaction: tx.transaction },
    );
    const facts =
      hardwareEvidence === undefined ? 0 : await copyFacts(tx, { original, machine, hardwareEvidence });
    await assignReleasedBaseline(tx, machine);
    await enqueueRecheck(tx, { machineIds: [machine.id] });
    await appendRecord(tx, {
      action: "machine.copied",
      object: machineObject(machine),
      machineId: machine.id,
      before: { id: original.id, serial: original.serial },
      after: { serial, site: site.code, hardwareFacts: facts, evidence: hardwareEvidence ?? null },
    });
    return presentMachine(machine);
  });
}

interface FactCopy {
  readonly original: Machine;
  readonly machine: Machine;
  readonly hardwareEvidence: string;
}

async function copyFacts(tx: Tx, { original, machine, hardwareEvidence }: FactCopy): Promise<number> {
  const standing = await MachineHardware.findAll({
    where: { machineId: original.id, endedAt: null },
    transaction: tx.transaction,
  });
  const rows = standing.map(({ axis, part, itemId, data }) => ({
    machineId: machine.id,
    axis,
    part,
    itemId,
    data,
    evidence: hardwareEvidence,
    recordedBy: personBehind(tx.actor),
    recordedByName: tx.actor.name,
    recordedAt: tx.now,
  }));
  await MachineHardware.bulkCreate(rows, { transaction: tx.transaction });
  return rows.length;
}
