import { handle, Versioned } from "@/lib/http/handle";
import { machineWriteOperations } from "@/lib/schemas/operations/machines-write";
import { copyMachine } from "@/lib/services/machines/copy";

export const POST = handle(machineWriteOperations.copyMachine, async ({ context, params, body }) => {
  const machine = await copyMachine(context, { ...body, ...params });
  return new Versioned(machine, machine.version);
});
