import { z } from "zod";
import { levelSchema } from "@/lib/domain/levels";
import { layerSchema, readingKindSchema } from "@/lib/domain/readings";
import { standingSchema } from "@/lib/domain/floor";
import {
  documentViewSchema,
  findingSchema,
  formatSchema,
  parameterValueSchema,
  provenanceSchema,
  unmappedSchema,
} from "./check";
import { answeredInstant } from "./codes";
import { instant, pageQuery, paged } from "./common";
import { sentFilesSchema } from "./files";

const words = (max: number, what: string) =>
  z
    .string()
    .trim()
    .max(max, `${what} has ${max} characters at most.`)
    .regex(/^[^\p{Cc}]*$/u, `${what} has no control characters.`);

export const createReadingSchema = z.object({
  kind: readingKindSchema,
  layer: layerSchema,
  /** When the machine was read, with a time zone. */
  readAt: instant,
  firmwareVersion: words(100, "A firmware version").nullish(),
  /** As read off the plate or told by the machine; another one than the machine's is refused. */
  serial: words(80, "A serial number").nullish(),
  files: sentFilesSchema,
  format: formatSchema,
  note: z.string().trim().max(2000, "A note has 2000 characters at most.").default(""),
});
export type CreateReading = z.input<typeof createReadingSchema>;

const levelsSchema = z.object({
  over: z.number(),
  near: z.number(),
  cannot: z.number(),
  within: z.number(),
});

const standingNowSchema = z.object({
  standing: standingSchema,
  level: levelSchema.nullable(),
  sentence: z.string(),
});

export const createdReadingSchema = z.object({
  id: z.uuid(),
  machineId: z.uuid(),
  serial: z.string(),
  revisionId: z.uuid(),
  evaluationId: z.uuid(),
  /** The machine was read with these very files before: no second content is kept. */
  unchanged: z.boolean(),
  level: levelSchema,
  /** How many findings of each level. */
  levels: levelsSchema,
  parameters: z.number(),
  unmapped: z.number(),
  documents: z.array(documentViewSchema),
  /** Where the machine stands with this reading. */
  machine: standingNowSchema,
  /** How far the open step of a released change has come on this machine; null without one. */
  step: z
    .object({
      changeId: z.uuid(),
      appliedAt: answeredInstant.nullable(),
      verifiedAt: answeredInstant.nullable(),
      missing: z.string().nullable(),
    })
    .nullable(),
});
export type CreatedReading = z.infer<typeof createdReadingSchema>;

export const readingQuery = pageQuery.extend({
  machineId: z.uuid().optional(),
  modelId: z.uuid().optional(),
  siteId: z.uuid().optional(),
  kind: readingKindSchema.optional(),
  layer: layerSchema.optional(),
  /** Part of a serial number. */
  q: z.string().trim().max(80).optional(),
});
export type ReadingQuery = z.infer<typeof readingQuery>;

const named = z.object({ id: z.uuid(), name: z.string() });

export const readingRowSchema = z.object({
  id: z.uuid(),
  machine: z.object({ id: z.uuid(), serial: z.string() }),
  model: named,
  site: named,
  kind: readingKindSchema,
  layer: layerSchema,
  readAt: answeredInstant,
  receivedAt: answeredInstant,
  firmwareVersion: z.string().nullable(),
  actorName: z.string(),
  note: z.string(),
  files: z.array(z.string()),
  /** Gravest finding when it was kept. */
  level: levelSchema.nullable(),
});
export type ReadingRow = z.infer<typeof readingRowSchema>;
export const readingPageSchema = paged(readingRowSchema);
export type ReadingPage = z.infer<typeof readingPageSchema>;

/** Whether a reading still says something about its machine, and what ended it. */
export const readingStandingSchema = z.discriminatedUnion("state", [
  z.object({ state: z.literal("counts") }),
  z.object({
    state: z.literal("ended"),
    because: z.enum(["newer", "as_left", "firmware"]),
    byReadingId: z.uuid(),
    at: answeredInstant,
  }),
  /** So old that the newer ones are no longer looked through for it. */
  z.object({ state: z.literal("past") }),
]);
export type ReadingStanding = z.infer<typeof readingStandingSchema>;

export const readingFileSchema = z.object({
  position: z.number(),
  path: z.string(),
  format: z.string(),
  encoding: z.enum(["utf-8", "latin-1"]),
  bom: z.boolean(),
  size: z.number(),
  sha256: z.string(),
  text: z.string(),
});

export const readingViewSchema = readingRowSchema.extend({
  serial: z.string().nullable(),
  revisionId: z.uuid(),
  standing: readingStandingSchema,
  files: z.array(readingFileSchema),
  documents: z.array(documentViewSchema),
  parameters: z.array(parameterValueSchema),
  findings: z.array(findingSchema),
  provenance: z.array(provenanceSchema),
  unmapped: z.array(unmappedSchema),
  /** Axes of the machine with their kind. */
  axes: z.array(z.object({ axis: z.string(), kind: z.enum(["linear", "rotary"]) })),
  /** What it was checked with just now. */
  versions: z.object({ rules: z.string(), policy: z.string(), keyTable: z.number() }),
  /** What the checks made of it when it was kept. */
  whenKept: z
    .object({ level: levelSchema, rules: z.string(), policy: z.string(), at: answeredInstant })
    .nullable(),
});

export const readingFileParams = z.object({
  id: z.uuid(),
  position: z.coerce.number().int().min(0).max(100),
});
