import { fileResponse } from "@/lib/http/file-response";
import { handle } from "@/lib/http/handle";
import { changeOperations } from "@/lib/schemas/operations/changes";
import { attachmentFile } from "@/lib/services/implementation/attachment";

export const GET = handle(changeOperations.attachment, async ({ context, params }) => {
  const { name, bytes } = await attachmentFile(context, params.id);
  return fileResponse({ path: name, bytes });
});
