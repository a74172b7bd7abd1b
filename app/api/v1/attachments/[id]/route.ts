import { handle } from "@/lib/http/handle";
import { downloadResponse } from "@/lib/http/download";
import { changeOperations } from "@/lib/schemas/operations/changes";
import { attachmentFile } from "@/lib/services/implementation/attachment";

export const GET = handle(changeOperations.attachment, async ({ context, params }) =>
  downloadResponse(await attachmentFile(context, params.id)),
);
