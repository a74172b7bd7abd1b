import "server-only";
import { moveMachineSchema, type MachineView, type MoveMachine } from "@/lib/schemas/machines-write";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { requireVersion } from "@/lib/services/kernel/versions";
import { appendRecord } from "@/lib/services/record/append";
import { enqueueRecheck } from "@/lib/services/recheck/enqueue";
import { lockMachine, machineObject, requireSite } from "./find";
import { presentMachine } from "./present";

/** Moves a machine to another site; what it requires stays, the ambient it is checked at follows the site. */
export async function moveMachine(
  context: Context,
  input: MoveMachine & { readonly id: string; readonly ifMatch: number | null },
): Promise<MachineView> {
  const { siteId, reason } = moveMachineSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "machines.write");
    const machine = await lockMachine(tx, input.id);
    requireVersion(input.ifMatch, machine);
    const from = machine.siteId;
    if (from === siteId) return presentMachine(machine);
    const site = await requireSite(tx, siteId);
    await machine.update({ siteId, version: machine.version + 1 }, { transaction: tx.transaction });
    await enqueueRecheck(tx, { machineIds: [machine.id] });
    await appendRecord(tx, {
      action: "machine.moved",
      object: machineObject(machine),
      machineId: machine.id,
      before: { siteId: from },
      after: { siteId, site: site.code },
      reason,
    });
    return presentMachine(machine);
  });
}
