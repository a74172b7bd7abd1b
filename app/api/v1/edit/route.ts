import { handle } from "@/lib/http/handle";
import { textOperations } from "@/lib/schemas/operations/texts";
import { editTexts } from "@/lib/services/texts/edit";

export const POST = handle(textOperations.edit, ({ context, body }) => editTexts(context, body));
