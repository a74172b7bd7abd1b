import { handle } from "@/lib/http/handle";
import { textOperations } from "@/lib/schemas/operations/texts";
import { mergeTexts } from "@/lib/services/texts/merge";

export const POST = handle(textOperations.merge, ({ context, body }) => mergeTexts(context, body));
