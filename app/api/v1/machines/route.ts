import { handle, Versioned } from "@/lib/http/handle";
import { machineOperations } from "@/lib/schemas/operations/machines";
import { machineWriteOperations } from "@/lib/schemas/operations/machines-write";
import { createMachine } from "@/lib/services/machines/create";
import { listMachines } from "@/lib/services/machines/list";

export const GET = handle(machineOperations.listMachines, ({ context, query }) =>
  listMachines(context, query),
);

export const POST = handle(machineWriteOperations.createMachine, async ({ context, body }) => {
  const machine = await createMachine(context, body);
  return new Versioned(machine, machine.version);
});
