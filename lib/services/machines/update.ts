import "server-only";
import { updateMachineSchema, type MachineView, type UpdateMachine } from "@/lib/schemas/machines-write";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { requireVersion } from "@/lib/services/kernel/versions";
import { appendRecord } from "@/lib/services/record/append";
import { lockMachine, machineObject, requireFreeSerial } from "./find";
import { presentMachine } from "./present";

/** Corrects the serial number or the note; neither bears on where the machine stands. */
export async function updateMachine(
  context: Context,
  input: UpdateMachine & { readonly id: string; readonly ifMatch: number | null },
): Promise<MachineView> {
  const { serial, note } = updateMachineSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "machines.write");
    const machine = await lockMachine(tx, input.id);
    const before = presentMachine(machine);
    requireVersion(input.ifMatch, before);
    if (serial !== before.serial) await requireFreeSerial(tx, serial);
    await machine.update({ serial, note, version: machine.version + 1 }, { transaction: tx.transaction });
    await appendRecord(tx, {
      action: "machine.updated",
      object: machineObject(machine),
      machineId: machine.id,
      before: { serial: before.serial, note: before.note },
      after: { serial, note },
    });
    return presentMachine(machine);
  });
}
