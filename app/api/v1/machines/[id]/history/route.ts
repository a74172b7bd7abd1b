import { handle } from "@/lib/http/handle";
import { machineOperations } from "@/lib/schemas/operations/machines";
import { parameterHistory } from "@/lib/services/machines/parameter-history";

export const GET = handle(machineOperations.parameterHistory, ({ context, params, query }) =>
  parameterHistory(context, { ...query, ...params }),
);
