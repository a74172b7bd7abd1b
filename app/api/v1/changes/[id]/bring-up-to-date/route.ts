import { handle } from "@/lib/http/handle";
import { changeOperations } from "@/lib/schemas/operations/changes";
import { bringUpToDate } from "@/lib/services/changes/bring-up-to-date";

export const POST = handle(changeOperations.bringUpToDate, ({ context, params, ifMatch }) =>
  bringUpToDate(context, { id: params.id, ifMatch }),
);
