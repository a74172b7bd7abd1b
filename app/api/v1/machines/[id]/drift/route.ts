import { handle } from "@/lib/http/handle";
import { machineOperations } from "@/lib/schemas/operations/machines";
import { showDrift } from "@/lib/services/machines/drift";

export const GET = handle(machineOperations.showDrift, ({ context, params, query }) =>
  showDrift(context, { ...query, ...params }),
);
