import "server-only";
import { retireMachineSchema, type MachineView, type RetireMachine } from "@/lib/schemas/machines-write";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { requireVersion } from "@/lib/services/kernel/versions";
import { appendRecord } from "@/lib/services/record/append";
import { lockMachine, machineObject } from "./find";
import { presentMachine } from "./present";

/** Takes a machine off the floor for good; its readings and its record stay. Putting it into service undoes it. */
export async function retireMachine(
  context: Context,
  input: RetireMachine & { readonly id: string; readonly ifMatch: number | null },
): Promise<MachineView> {
  const { reason } = retireMachineSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "machines.write");
    const machine = await lockMachine(tx, input.id);
    const before = presentMachine(machine);
    requireVersion(input.ifMatch, before);
    if (before.state === "retired") return before;
    await machine.update(
      { state: "retired", stateReason: reason, version: machine.version + 1 },
      { transaction: tx.transaction },
    );
    await appendRecord(tx, {
      action: "machine.retired",
      object: machineObject(machine),
      machineId: machine.id,
      before: { state: before.state, stateReason: before.stateReason },
      after: { state: "retired", stateReason: reason },
      reason,
    });
    return presentMachine(machine);
  });
}
