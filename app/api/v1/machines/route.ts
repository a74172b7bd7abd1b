import { handle, Versioned } from "@/lib/http/handle";
import { machineWriteOperations } from "@/lib/schemas/operations/machines-write";
import { createMachine } from "@/lib/services/machines/create";

export const POST = handle(machineWriteOperations.createMachine, async ({ context, body }) => {
  const machine = await createMachine(context, body);
  return new Versioned(machine, machine.version);
});
