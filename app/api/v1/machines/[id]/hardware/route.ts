import { handle, Versioned } from "@/lib/http/handle";
import { machineWriteOperations } from "@/lib/schemas/operations/machines-write";
import { listHardware } from "@/lib/services/machines/list-hardware";
import { recordHardware } from "@/lib/services/machines/record-hardware";

export const GET = handle(machineWriteOperations.listHardware, async ({ context, params }) => {
  const hardware = await listHardware(context, params.id);
  return new Versioned(hardware, hardware.machineVersion);
});

export const POST = handle(machineWriteOperations.recordHardware, async ({ context, params, body }) => {
  const hardware = await recordHardware(context, { ...body, ...params });
  return new Versioned(hardware, hardware.machineVersion);
});
