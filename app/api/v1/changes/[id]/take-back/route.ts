import { handle } from "@/lib/http/handle";
import { changeOperations } from "@/lib/schemas/operations/changes";
import { takeBackChange } from "@/lib/services/changes/take-back";

export const POST = handle(changeOperations.takeBack, ({ context, params, body, ifMatch }) =>
  takeBackChange(context, { id: params.id, reason: body.reason, ifMatch }),
);
