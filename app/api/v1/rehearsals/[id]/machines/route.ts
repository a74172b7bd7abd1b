import { handle } from "@/lib/http/handle";
import { rehearsalOperations } from "@/lib/schemas/operations/rehearsals";
import { listRehearsalMachines } from "@/lib/services/rehearsals/list-machines";

export const GET = handle(rehearsalOperations.listRehearsalMachines, ({ context, params, query }) =>
  listRehearsalMachines(context, { ...params, ...query }),
);
