import { handle, Versioned } from "@/lib/http/handle";
import { machineWriteOperations } from "@/lib/schemas/operations/machines-write";
import { setMachineState } from "@/lib/services/machines/set-state";

export const POST = handle(
  machineWriteOperations.setMachineState,
  async ({ context, params, body, ifMatch }) => {
    const machine = await setMachineState(context, { ...body, ...params, ifMatch });
    return new Versioned(machine, machine.version);
  },
);
