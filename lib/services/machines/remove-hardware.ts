import "server-only";
import type { MachineHardwareView } from "@/lib/schemas/machines-write";
import { MachineHardware } from "@/models/machines";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { enqueueRecheck } from "@/lib/services/recheck/enqueue";
import { lockMachine, machineObject } from "./find";
import { hardwareView } from "./list-hardware";

/** Ends a recorded fact: the model's hardware counts again. The fact stays readable as what stood. */
export async function removeHardware(
  context: Context,
  input: { readonly id: string; readonly factId: string },
): Promise<MachineHardwareView> {
  return withTransaction(context, async (tx) => {
    authorize(tx, "machines.hardware");
    const machine = await lockMachine(tx, input.id);
    const fact = await MachineHardware.findOne({
      where: { id: input.factId, machineId: machine.id, endedAt: null },
      transaction: tx.transaction,
    });
    if (!fact) throw notFound("recorded hardware on this machine");
    await fact.update({ endedAt: tx.now }, { transaction: tx.transaction });
    await machine.update({ version: machine.version + 1 }, { transaction: tx.transaction });
    await enqueueRecheck(tx, { machineIds: [machine.id] });
    const { axis, part, itemId, data, evidence } = fact;
    await appendRecord(tx, {
      action: "machine.hardware_ended",
      object: machineObject(machine),
      machineId: machine.id,
      before: { axis, part, itemId, data, evidence },
    });
    return hardwareView(machine, tx.transaction);
  });
}
