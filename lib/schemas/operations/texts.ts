import { MAX_UPLOAD_BYTES } from "@/lib/schemas/files";
import { operation } from "@/lib/schemas/operation";
import { editAnswerSchema, editTextsSchema, mergeAnswerSchema, mergeTextsSchema } from "@/lib/schemas/texts";

export const textOperations = {
  edit: operation({
    id: "editTexts",
    method: "POST",
    path: "/edit",
    action: "check.run",
    summary: "Write parameters into a configuration text, in its own units and spelling; nothing is stored",
    tag: "Check",
    body: editTextsSchema,
    maxBytes: MAX_UPLOAD_BYTES,
    answer: editAnswerSchema,
  }),
  merge: operation({
    id: "mergeTexts",
    method: "POST",
    path: "/merge",
    action: "check.run",
    summary: "Merge two configurations made of one base, per parameter and then by lines; nothing is stored",
    tag: "Check",
    body: mergeTextsSchema,
    maxBytes: 3 * MAX_UPLOAD_BYTES,
    answer: mergeAnswerSchema,
  }),
} as const;
