import { handle, Versioned } from "@/lib/http/handle";
import { machineWriteOperations } from "@/lib/schemas/operations/machines-write";
import { updateMachine } from "@/lib/services/machines/update";

export const PUT = handle(
  machineWriteOperations.updateMachine,
  async ({ context, params, body, ifMatch }) => {
    const machine = await updateMachine(context, { ...body, ...params, ifMatch });
    return new Versioned(machine, machine.version);
  },
);
