import { handle } from "@/lib/http/handle";
import { changeOperations } from "@/lib/schemas/operations/changes";
import { commentOnChange } from "@/lib/services/changes/comment";

export const POST = handle(changeOperations.comment, ({ context, params, body }) =>
  commentOnChange(context, { id: params.id, comment: body }),
);
