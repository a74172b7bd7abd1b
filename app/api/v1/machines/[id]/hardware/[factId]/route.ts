import { handle, Versioned } from "@/lib/http/handle";
import { machineWriteOperations } from "@/lib/schemas/operations/machines-write";
import { removeHardware } from "@/lib/services/machines/remove-hardware";

export const DELETE = handle(machineWriteOperations.removeHardware, async ({ context, params }) => {
  const hardware = await removeHardware(context, params);
  return new Versioned(hardware, hardware.machineVersion);
});
