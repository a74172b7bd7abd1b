import { handle } from "@/lib/http/handle";
import { changeOperations } from "@/lib/schemas/operations/changes";
import { submitChange } from "@/lib/services/changes/submit";

export const POST = handle(changeOperations.submit, ({ context, params, body, ifMatch }) =>
  submitChange(context, { id: params.id, reason: body.reason, ifMatch }),
);
