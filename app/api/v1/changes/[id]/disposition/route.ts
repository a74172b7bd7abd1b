import { handle } from "@/lib/http/handle";
import { changeOperations } from "@/lib/schemas/operations/changes";
import { decideChange } from "@/lib/services/changes/decide";

export const POST = handle(changeOperations.decide, ({ context, params, body, ifMatch }) =>
  decideChange(context, { id: params.id, request: body, ifMatch }),
);
