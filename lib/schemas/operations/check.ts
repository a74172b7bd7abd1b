import { checkAnswerSchema, checkRequestSchema } from "@/lib/schemas/check";
import { counterAnswerSchema } from "@/lib/schemas/counter-proposal";
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
  counterProposal: operation({
    id: "counterProposal",
    method: "POST",
    path: "/counter-proposal",
    action: "check.run",
    summary:
      "The smallest change of a configuration's values that clears what is over limit; nothing is stored",
    tag: "Check",
    body: checkRequestSchema,
    maxBytes: MAX_UPLOAD_BYTES,
    answer: counterAnswerSchema,
  }),
} as const;
