import { handle } from "@/lib/http/handle";
import { changeOperations } from "@/lib/schemas/operations/changes";
import { releaseChange } from "@/lib/services/changes/release";

export const POST = handle(changeOperations.release, ({ context, params, body, ifMatch }) =>
  releaseChange(context, { id: params.id, reason: body.reason, ifMatch }),
);
