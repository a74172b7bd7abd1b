import { handle } from "@/lib/http/handle";
import { changeOperations } from "@/lib/schemas/operations/changes";
import { backOutChange } from "@/lib/services/changes/back-out";

export const POST = handle(changeOperations.backOut, ({ context, params, body, ifMatch }) =>
  backOutChange(context, { id: params.id, request: body, ifMatch }),
);
