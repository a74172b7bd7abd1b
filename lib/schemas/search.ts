import { z } from "zod";

export const searchQuery = z.object({ q: z.string().trim().max(200).default("") });
export type SearchQuery = z.infer<typeof searchQuery>;

export const searchHitSchema = z.object({
  /** Where it leads, a path of the desk. */
  href: z.string(),
  title: z.string(),
  /** A second line: name, state, site. */
  note: z.string(),
});
export type SearchHit = z.infer<typeof searchHitSchema>;

export const searchGroupSchema = z.object({
  title: z.string(),
  hits: z.array(searchHitSchema),
  /** More than are shown. */
  more: z.boolean(),
});
export const searchAnswerSchema = z.object({ q: z.string(), groups: z.array(searchGroupSchema) });
export type SearchGroup = z.infer<typeof searchGroupSchema>;
export type SearchAnswer = z.infer<typeof searchAnswerSchema>;
