import { handle, Versioned } from "@/lib/http/handle";
import { machineOperations } from "@/lib/schemas/operations/machines";
import { machineWriteOperations } from "@/lib/schemas/operations/machines-write";
import { showMachine } from "@/lib/services/machines/show";
import { updateMachine } from "@/lib/services/machines/update";

export const GET = handle(machineOperations.showMachine, async ({ context, params, query }) => {
  const machine = await showMachine(context, { ...query, ...params });
  return new Versioned(machine, machine.version);
});

export const PUT = handle(
  machineWriteOperations.updateMachine,
  async ({ context, params, body, ifMatch }) => {
    const machine = await updateMachine(context, { ...body, ...params, ifMatch });
    return new Versioned(machine, machine.version);
  },
);
