import { handle, Versioned } from "@/lib/http/handle";
import { machineWriteOperations } from "@/lib/schemas/operations/machines-write";
import { retireMachine } from "@/lib/services/machines/retire";

export const POST = handle(
  machineWriteOperations.retireMachine,
  async ({ context, params, body, ifMatch }) => {
    const machine = await retireMachine(context, { ...body, ...params, ifMatch });
    return new Versioned(machine, machine.version);
  },
);
