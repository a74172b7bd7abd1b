import { z } from "zod";
import {
  CATALOG_KINDS,
  catalogKindSchema,
  differingPartSchema,
  type CatalogKind,
} from "@/lib/domain/catalog";
import { answeredInstant, codeSchema, evidenceSchema, nameSchema } from "./codes";
import { pageQuery, paged } from "./common";

/** How a kind is written in an address: controller-board. */
export function kindSlug(kind: CatalogKind): string {
  return kind.replace("_", "-");
}

export function kindOfSlug(slug: string): CatalogKind | null {
  return CATALOG_KINDS.find((kind) => kindSlug(kind) === slug) ?? null;
}

const KIND_SLUGS = ["motor", "driver", "controller-board", "supply", "drive-train", "mount"] as const;
const kindParam = z.enum(KIND_SLUGS).transform((slug, context): CatalogKind => {
  const kind = kindOfSlug(slug);
  if (kind) return kind;
  context.addIssue({ code: "custom", message: "There is no such kind." });
  return z.NEVER;
});

export const kindParams = z.object({ kind: kindParam });
export const itemParams = z.object({ kind: kindParam, id: z.uuid() });

/** Fields of CATALOG_DATA[kind]; each may be missing, none is guessed. */
const itemData = z.record(z.string(), z.unknown());

export const createItemSchema = z.object({
  code: codeSchema,
  name: nameSchema,
  data: itemData,
  evidence: evidenceSchema,
});
export type CreateItem = z.infer<typeof createItemSchema>;

export const updateItemSchema = z.object({ name: nameSchema, data: itemData, evidence: evidenceSchema });
export type UpdateItem = z.infer<typeof updateItemSchema>;

export const copySchema = z.object({ code: codeSchema, name: nameSchema });
export type Copy = z.infer<typeof copySchema>;

export const itemQuery = pageQuery.extend({
  /** Part of a code or a name. */
  q: z.string().trim().max(200).optional(),
  retired: z.enum(["yes", "no", "all"]).default("no"),
});
export type ItemQuery = z.infer<typeof itemQuery>;

export const itemRowSchema = z.object({
  id: z.uuid(),
  kind: catalogKindSchema,
  code: z.string(),
  name: z.string(),
  version: z.number(),
  retiredAt: answeredInstant.nullable(),
  data: itemData,
  evidence: z.string(),
});
export type ItemRow = z.infer<typeof itemRowSchema>;
export const itemPageSchema = paged(itemRowSchema);
export type ItemPage = z.infer<typeof itemPageSchema>;

const versionSchema = z.object({
  version: z.number(),
  name: z.string(),
  data: itemData,
  evidence: z.string(),
  createdByName: z.string(),
  createdAt: answeredInstant,
});
export type ItemVersion = z.infer<typeof versionSchema>;

const usedBySchema = z.object({
  models: z.array(z.object({ id: z.uuid(), code: z.string(), name: z.string(), axes: z.array(z.string()) })),
  machines: z.array(
    z.object({
      id: z.uuid(),
      serial: z.string(),
      axis: z.string().nullable(),
      part: differingPartSchema,
    }),
  ),
});

export const itemViewSchema = itemRowSchema.extend({
  versions: z.array(versionSchema),
  /** Models whose newest version names it, and machines that have it recorded as their own. */
  usedBy: usedBySchema,
});
export type ItemView = z.infer<typeof itemViewSchema>;

/** An item in short, for forms that choose one. */
export interface ItemChoice {
  readonly id: string;
  readonly kind: CatalogKind;
  readonly code: string;
  readonly name: string;
  readonly retired: boolean;
  /** Only of drive trains: "belt", "rotary" ...; null where not stated. */
  readonly driveTrainKind: string | null;
}
