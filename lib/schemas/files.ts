import { z } from "zod";

/** 2 MB a file, as the parsers take it; base64 is a third longer. */
export const MAX_TEXT_BYTES = 2_097_152;
/** Largest request that carries configuration texts. */
export const MAX_UPLOAD_BYTES = 24_000_000;

const path = z
  .string()
  .trim()
  .min(1, "A file has a name.")
  .max(300)
  .regex(/^[^\u0000-\u001f\u007f]+$/, "A file name holds no control characters.");

/** A file as Unicode text, or as its bytes in base64; bytes keep their encoding. */
export const sentFileSchema = z
  .object({ path, text: z.string().optional(), base64: z.base64().optional() })
  .refine((file) => (file.text === undefined) !== (file.base64 === undefined), {
    message: "Send either text or base64.",
  });

export const sentFilesSchema = z
  .array(sentFileSchema)
  .min(1, "Send at least one file.")
  .max(20, "At most 20 files at a time.")
  .refine((files) => new Set(files.map((file) => file.path)).size === files.length, {
    message: "Two files have the same name.",
  });
