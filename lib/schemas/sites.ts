import { z } from "zod";
import { answeredInstant, codeSchema, nameSchema } from "./codes";

/** Design maximum of the room, °C; null where nobody has said it: then what needs it is "cannot check". */
const ambientSchema = z
  .number("Type a number in °C, or leave it empty.")
  .min(-40, "At least -40 °C.")
  .max(70, "At most 70 °C.")
  .nullable();

export const createSiteSchema = z.object({
  code: codeSchema,
  name: nameSchema,
  ambientC: ambientSchema.default(null),
});
export type CreateSite = z.input<typeof createSiteSchema>;

export const updateSiteSchema = z.object({ name: nameSchema, ambientC: ambientSchema });
export type UpdateSite = z.infer<typeof updateSiteSchema>;

export const siteQuery = z.object({ retired: z.enum(["yes", "no", "all"]).default("no") });
export type SiteQuery = z.infer<typeof siteQuery>;

export const siteViewSchema = z.object({
  id: z.uuid(),
  code: z.string(),
  name: z.string(),
  ambientC: z.number().nullable(),
  version: z.number(),
  retiredAt: answeredInstant.nullable(),
  /** Machines there that are not retired. */
  machines: z.number(),
});
export type SiteView = z.infer<typeof siteViewSchema>;
export const siteListSchema = z.object({ items: z.array(siteViewSchema) });
export type SiteList = z.infer<typeof siteListSchema>;
