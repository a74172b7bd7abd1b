import { handle } from "@/lib/http/handle";
import { changeOperations } from "@/lib/schemas/operations/changes";
import { downloadForMachine } from "@/lib/services/implementation/download";

export const POST = handle(changeOperations.download, ({ context, params }) =>
  downloadForMachine(context, { changeId: params.id, machineId: params.machineId }),
);
