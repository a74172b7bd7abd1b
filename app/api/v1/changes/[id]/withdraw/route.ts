import { handle } from "@/lib/http/handle";
import { changeOperations } from "@/lib/schemas/operations/changes";
import { withdrawChange } from "@/lib/services/changes/withdraw";

export const POST = handle(changeOperations.withdraw, ({ context, params, body, ifMatch }) =>
  withdrawChange(context, { id: params.id, reason: body.reason, ifMatch }),
);
