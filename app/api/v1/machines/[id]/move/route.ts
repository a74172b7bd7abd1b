import { handle, Versioned } from "@/lib/http/handle";
import { machineWriteOperations } from "@/lib/schemas/operations/machines-write";
import { moveMachine } from "@/lib/services/machines/move";

export const POST = handle(machineWriteOperations.moveMachine, async ({ context, params, body, ifMatch }) => {
  const machine = await moveMachine(context, { ...body, ...params, ifMatch });
  return new Versioned(machine, machine.version);
});
