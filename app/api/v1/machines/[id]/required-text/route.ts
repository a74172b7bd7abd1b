import { fileResponse } from "@/lib/http/file-response";
import { handle } from "@/lib/http/handle";
import { machineOperations } from "@/lib/schemas/operations/machines";
import { requiredText } from "@/lib/services/machines/required-text";

export const GET = handle(machineOperations.requiredText, async ({ context, params, query }) => {
  const text = await requiredText(context, { ...query, ...params });
  return text.kind === "file" ? fileResponse(text.file) : text.index;
});
