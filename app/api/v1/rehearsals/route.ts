import { handle } from "@/lib/http/handle";
import { rehearsalOperations } from "@/lib/schemas/operations/rehearsals";
import { listRehearsals } from "@/lib/services/rehearsals/list";
import { startRehearsal } from "@/lib/services/rehearsals/start";

export const GET = handle(rehearsalOperations.listRehearsals, ({ context, query }) =>
  listRehearsals(context, query),
);

export const POST = handle(rehearsalOperations.startRehearsal, ({ context, body }) =>
  startRehearsal(context, body),
);
