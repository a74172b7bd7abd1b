import { z } from "zod";
import { parameterNameSchema } from "@/lib/domain/parameters";
import { formatSchema, sentKeyTable } from "./check";
import { sentFilesSchema } from "./files";

const basis = z.enum(["peak", "rms"]);
const axis = z.string().min(1).max(40).nullable();

/** Files are answered as they were sent: as text, or as bytes in their own encoding. */
const answeredFileSchema = z.object({
  path: z.string(),
  text: z.string().optional(),
  base64: z.string().optional(),
});
export type AnsweredFile = z.infer<typeof answeredFileSchema>;

export const editTextsSchema = z.object({
  files: sentFilesSchema,
  format: formatSchema,
  keyTable: sentKeyTable,
  changes: z
    .array(
      z.object({
        axis: axis.default(null),
        parameter: parameterNameSchema,
        value: z.number(),
        unit: z.string().max(20).default(""),
        basis: basis.optional(),
      }),
    )
    .min(1, "Say at least one value to write.")
    .max(2000, "At most 2000 values at a time."),
});
export type EditTexts = z.input<typeof editTextsSchema>;

export const editAnswerSchema = z.object({
  files: z.array(answeredFileSchema),
  applied: z.array(
    z.object({
      axis: z.string().nullable(),
      parameter: parameterNameSchema,
      path: z.string(),
      line: z.number(),
      alsoAxes: z.array(z.string()),
      /** `enabled`: the key stood commented out; `added`: the text had no such key. */
      how: z.enum(["changed", "enabled", "added"]),
    }),
  ),
  refused: z.array(
    z.object({ axis: z.string().nullable(), parameter: parameterNameSchema, reason: z.string() }),
  ),
});
export type EditAnswer = z.infer<typeof editAnswerSchema>;

export const mergeChoiceSchema = z.enum(["base", "ours", "theirs", "both"]);

/** What to take at a conflict, by its id. */
export const mergeChoicesSchema = z.record(z.string().max(400), mergeChoiceSchema);

export const mergeTextsSchema = z.object({
  base: sentFilesSchema,
  ours: sentFilesSchema,
  theirs: sentFilesSchema,
  format: formatSchema,
  keyTable: sentKeyTable,
  choices: mergeChoicesSchema.default({}),
});
export type MergeTexts = z.input<typeof mergeTextsSchema>;

/** What one text says at a conflict: the parameter's value where one is read there, and the text itself. */
const saidSchema = z
  .object({
    value: z.number().nullable(),
    unit: z.string().nullable(),
    basis: basis.nullable(),
    raw: z.string(),
    path: z.string(),
    line: z.number(),
  })
  .nullable();

export const mergeAnswerSchema = z.object({
  /** Null as long as a conflict has no choice. */
  files: z.array(answeredFileSchema).nullable(),
  conflicts: z.array(
    z.object({
      /** Rows of one id are settled by one choice. */
      id: z.string(),
      kind: z.enum(["value", "parameter", "lines", "file"]),
      axis: z.string().nullable(),
      parameter: parameterNameSchema.nullable(),
      key: z.string().nullable(),
      base: saidSchema,
      ours: saidSchema,
      theirs: saidSchema,
      options: z.array(mergeChoiceSchema),
    }),
  ),
});
export type MergeAnswer = z.infer<typeof mergeAnswerSchema>;
