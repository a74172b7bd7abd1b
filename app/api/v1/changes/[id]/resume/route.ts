import { handle } from "@/lib/http/handle";
import { changeOperations } from "@/lib/schemas/operations/changes";
import { resumeChange } from "@/lib/services/changes/resume";

export const POST = handle(changeOperations.resume, ({ context, params, body, ifMatch }) =>
  resumeChange(context, { id: params.id, reason: body.reason, ifMatch }),
);
