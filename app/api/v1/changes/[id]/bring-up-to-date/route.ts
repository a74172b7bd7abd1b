import { handle } from "@/lib/http/handle";
import { changeOperations } from "@/lib/schemas/operations/changes";
import { bringUpToDate } from "@/lib/services/changes/bring-up-to-date";

export const POST = handle(changeOperations.bringUpToDate, ({ context, params, body, ifMatch }) =>
  bringUpToDate(context, { id: params.id, ifMatch, ...body }),
);
