import { z } from "zod";
import { parameterNameSchema } from "@/lib/domain/parameters";
import { editAnswerSchema } from "./texts";

const axis = z.string().nullable();
const checkPlace = z.object({ ruleId: z.string(), axis });
const side = z.object({
  value: z.number(),
  unit: z.string(),
  basis: z.enum(["peak", "rms"]).nullable(),
});

export const counterAnswerSchema = z.object({
  /** What is proposed, in one sentence. */
  sentence: z.string(),
  moves: z.array(
    z.object({
      axis,
      parameter: parameterNameSchema,
      /** What else the same key of the text sets. */
      also: z.array(z.object({ axis, parameter: parameterNameSchema })),
      was: side,
      toBe: side,
      /** (toBe − was)/|was|; null where `was` is 0. */
      change: z.number().nullable(),
      /** Weight by the policy × relative change. */
      cost: z.number(),
      /** Checks that are over limit with the old value in its place. */
      because: z.array(checkPlace),
      path: z.string(),
      line: z.number(),
    }),
  ),
  cost: z.number(),
  cleared: z.array(checkPlace),
  /** Checks that contradict each other; a single one is beyond what the text may say. */
  conflicts: z.array(z.object({ checks: z.array(checkPlace), sentence: z.string() })),
  /** Findings over limit that stay. */
  left: z.array(checkPlace),
  leastShare: z.number(),
  /** The texts with the moves written into them; everything else stays byte for byte. */
  files: editAnswerSchema.shape.files,
  versions: z.object({ rules: z.string(), policy: z.string() }),
});
export type CounterAnswer = z.infer<typeof counterAnswerSchema>;
