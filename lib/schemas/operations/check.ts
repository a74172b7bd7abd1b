import { checkAnswerSchema, checkRequestSchema } from "@/lib/schemas/check";
import { MAX_UPLOAD_BYTES } from "@/lib/schemas/files";
import { operation } from "@/lib/schemas/operation";

export const checkOperations = {
  runCheck: operation({
    id: "runCheck",
    method: "POST",
    path: "/check",
    action: "check.run",
    summary: "Check a configuration text against the physics of its axes; nothing is stored",
    tag: "Check",
    body: checkRequestSchema,
    maxBytes: MAX_UPLOAD_BYTES,
    answer: checkAnswerSchema,
  }),
} as const;
