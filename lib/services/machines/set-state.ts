import "server-only";
import {
  machineStateChangeSchema,
  type MachineStateChange,
  type MachineView,
} from "@/lib/schemas/machines-write";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { requireVersion } from "@/lib/services/kernel/versions";
import { appendRecord } from "@/lib/services/record/append";
import { enqueueRecheck } from "@/lib/services/recheck/enqueue";
import { lockMachine, machineObject } from "./find";
import { presentMachine } from "./present";

/** In service or out of service, with the reason; also brings a retired machine back, with what it required before. */
export async function setMachineState(
  context: Context,
  input: MachineStateChange & { readonly id: string; readonly ifMatch: number | null },
): Promise<MachineView> {
  const { state, reason } = machineStateChangeSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "machines.write");
    const machine = await lockMachine(tx, input.id);
    const before = presentMachine(machine);
    requireVersion(input.ifMatch, before);
    await machine.update(
      { state, stateReason: reason, version: machine.version + 1 },
      { transaction: tx.transaction },
    );
    await enqueueRecheck(tx, { machineIds: [machine.id] });
    await appendRecord(tx, {
      action: state === "in_service" ? "machine.put_into_service" : "machine.taken_out_of_service",
      object: machineObject(machine),
      machineId: machine.id,
      before: { state: before.state, stateReason: before.stateReason },
      after: { state, stateReason: reason },
      reason,
    });
    return presentMachine(machine);
  });
}
