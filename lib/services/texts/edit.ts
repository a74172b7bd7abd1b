import "server-only";
import { writeParameters } from "@/lib/keytable/write-parameters";
import { parseFile } from "@/lib/review/check";
import type { EditAnswer, EditTexts } from "@/lib/schemas/texts";
import { editTextsSchema } from "@/lib/schemas/texts";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { acceptFiles } from "@/lib/services/revisions/accept";
import { rewriteFile } from "@/lib/services/revisions/files";
import { answerFile } from "./answer";

/** Writes values into sent texts without keeping anything; nothing but the values' own spans changes. */
export async function editTexts(context: Context, input: EditTexts): Promise<EditAnswer> {
  authorize(context, "check.run");
  const request = editTextsSchema.parse(input);
  const files = acceptFiles(request.files, request.format);
  const { texts, applied, refused } = writeParameters({
    documents: files.map(parseFile),
    keyTable: request.keyTable,
    axes: [],
    edits: request.changes,
  });
  return {
    files: files.map((file, index) =>
      answerFile(rewriteFile(file, texts[index] ?? file.text), request.files),
    ),
    applied: applied.map((one) => ({ ...one, alsoAxes: [...one.alsoAxes] })),
    refused: [...refused],
  };
}
