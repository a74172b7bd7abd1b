import "server-only";
import { editTextsOf } from "@/lib/review/edit-texts";
import type { EditAnswer, EditTexts } from "@/lib/schemas/texts";
import { editTextsSchema } from "@/lib/schemas/texts";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { acceptFiles } from "@/lib/services/revisions/accept";
import { rewriteFile } from "@/lib/services/revisions/files";
import { answerFile } from "./answer";

/** Writes values into sent texts without keeping anything; nothing but the values' own spans changes, or the keys that had to be given. */
export async function editTexts(context: Context, input: EditTexts): Promise<EditAnswer> {
  authorize(context, "check.run");
  const request = editTextsSchema.parse(input);
  const files = acceptFiles(request.files, request.format);
  const edited = editTextsOf({ files, keyTable: request.keyTable, changes: request.changes });
  return {
    files: files.map((file, index) =>
      answerFile(rewriteFile(file, edited.files[index]?.text ?? file.text), request.files),
    ),
    applied: edited.applied.map((one) => ({ ...one, alsoAxes: [...one.alsoAxes] })),
    refused: [...edited.refused],
  };
}
