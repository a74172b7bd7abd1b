import { z } from "zod";

export const idParams = z.object({ id: z.uuid() });

export const pageQuery = z.object({
  page: z.coerce.number().int().min(1).max(100_000).default(1),
  pageSize: z.coerce.number().int().min(1).max(200).default(50),
});

/** A page of a list. */
export function paged<T extends z.ZodType>(item: T) {
  return z.object({ items: z.array(item), page: z.number(), pageSize: z.number(), total: z.number() });
}

/** Dates travel as ISO 8601 texts with a time zone. */
export const instant = z.iso.datetime({ offset: true });

/** RFC 9457 with our members. */
export const problemSchema = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number(),
  detail: z.string(),
  code: z.string(),
  pointer: z.string().nullable(),
  errors: z.array(z.object({ pointer: z.string(), detail: z.string() })).optional(),
});
export type Problem = z.infer<typeof problemSchema>;
