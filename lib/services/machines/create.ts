import "server-only";
import { createMachineSchema, type CreateMachine, type MachineView } from "@/lib/schemas/machines-write";
import { Machine } from "@/models/machines";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { enqueueRecheck } from "@/lib/services/recheck/enqueue";
import { assignReleasedBaseline } from "./baselines";
import { machineObject, requireFreeSerial, requireModelInUse, requireSite } from "./find";
import { presentMachine } from "./present";

/** Adds a machine to the fleet; from now on it requires its model's released baseline. */
export async function createMachine(context: Context, input: CreateMachine): Promise<MachineView> {
  const { serial, modelId, siteId, note } = createMachineSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "machines.write");
    await requireFreeSerial(tx, serial);
    const model = await requireModelInUse(tx, modelId);
    const site = await requireSite(tx, siteId);
    const machine = await Machine.create({ serial, modelId, siteId, note }, { transaction: tx.transaction });
    await assignReleasedBaseline(tx, machine);
    await enqueueRecheck(tx, { machineIds: [machine.id] });
    await appendRecord(tx, {
      action: "machine.created",
      object: machineObject(machine),
      machineId: machine.id,
      after: { serial, model: model.code, site: site.code, note },
    });
    return presentMachine(machine);
  });
}
