import { fileResponse } from "@/lib/http/file-response";
import { handle } from "@/lib/http/handle";
import { readingOperations } from "@/lib/schemas/operations/readings";
import { readingFile } from "@/lib/services/readings/file";

export const GET = handle(readingOperations.readingFile, async ({ context, params }) =>
  fileResponse(await readingFile(context, params)),
);
