import { z } from "zod";
import { assemblySchema } from "@/lib/domain/assembly";
import { differingPartSchema } from "@/lib/domain/catalog";
import { changeClassSchema, changeStateSchema } from "@/lib/domain/change-states";
import { standingSchema } from "@/lib/domain/floor";
import { levelSchema } from "@/lib/domain/levels";
import { machineStateSchema } from "@/lib/domain/machines";
import { parameterNameSchema } from "@/lib/domain/parameters";
import { layerSchema, readingKindSchema } from "@/lib/domain/readings";
import { findingSchema } from "./check";
import { answeredInstant } from "./codes";
import { instant, pageQuery, paged } from "./common";
import { readingRowSchema } from "./readings";

export const fleetFilter = z.object({
  siteId: z.uuid().optional(),
  modelId: z.uuid().optional(),
  /** Where the machine stands. */
  level: standingSchema.optional(),
  /** Part of a serial number. */
  q: z.string().trim().max(80).optional(),
});
export type FleetFilter = z.infer<typeof fleetFilter>;

export const machineQuery = pageQuery.extend({
  ...fleetFilter.shape,
  /** Missing: all but retired machines. */
  state: machineStateSchema.optional(),
});
export type MachineQuery = z.infer<typeof machineQuery>;

const named = z.object({ id: z.uuid(), code: z.string(), name: z.string() });

export const machineRowSchema = z.object({
  id: z.uuid(),
  serial: z.string(),
  model: named,
  site: named,
  state: machineStateSchema,
  standing: standingSchema,
  level: levelSchema.nullable(),
  sentence: z.string(),
  lastReadAt: answeredInstant.nullable(),
  stale: z.boolean(),
  version: z.number(),
});
export type MachineRow = z.infer<typeof machineRowSchema>;
export const machinePageSchema = paged(machineRowSchema);
export type MachinePage = z.infer<typeof machinePageSchema>;

const basisSchema = z.enum(["peak", "rms"]);
const valueSchema = z.object({ value: z.number(), unit: z.string(), basis: basisSchema.nullable() });
export type ValueView = z.infer<typeof valueSchema>;

export const deviationViewSchema = z.object({
  id: z.uuid(),
  reason: z.string(),
  approvedByName: z.string(),
  fromAt: answeredInstant,
  /** The last day on which it is in force. */
  untilOn: z.string(),
  changeId: z.uuid().nullable(),
  parameters: z.array(z.object({ axis: z.string().nullable(), parameter: parameterNameSchema })),
});
export type DeviationView = z.infer<typeof deviationViewSchema>;

const baselineSchema = z.object({
  id: z.uuid(),
  number: z.number(),
  since: answeredInstant,
});

const consequenceSchema = z.object({ was: findingSchema.nullable(), toBe: findingSchema });

export const driftItemSchema = z.object({
  kind: z.enum(["differs", "not_read", "stale"]),
  axis: z.string().nullable(),
  parameter: parameterNameSchema,
  required: valueSchema.nullable(),
  actual: valueSchema.nullable(),
  layer: layerSchema.nullable(),
  readingId: z.uuid().nullable(),
  readAt: answeredInstant.nullable(),
  staleDays: z.number().nullable(),
  /** (actual − required)/|required|, −1 to 1. */
  share: z.number().nullable(),
  level: levelSchema,
  sentence: z.string(),
  consequences: z.array(consequenceSchema),
});
export type DriftItemView = z.infer<typeof driftItemSchema>;

export const driftViewSchema = z.object({
  machineId: z.uuid(),
  serial: z.string(),
  asOf: answeredInstant,
  /** Null: nothing is off, and everything was read. */
  level: levelSchema.nullable(),
  sentence: z.string(),
  /** Null: no baseline has been released to the machine. */
  baseline: baselineSchema.nullable(),
  deviations: z.array(deviationViewSchema),
  items: z.array(driftItemSchema),
});
export type DriftView = z.infer<typeof driftViewSchema>;

const layerCellSchema = valueSchema.extend({
  readingId: z.uuid(),
  readAt: answeredInstant,
  path: z.string(),
  line: z.number(),
});

/** One parameter side by side: required, and in each layer that was read. */
export const layerRowSchema = z.object({
  axis: z.string().nullable(),
  parameter: parameterNameSchema,
  required: valueSchema.nullable(),
  file: layerCellSchema.nullable(),
  stored: layerCellSchema.nullable(),
  running: layerCellSchema.nullable(),
  /** The layer whose value counts; null: not read. */
  counts: layerSchema.nullable(),
  /** Level of the drift; null: as required. */
  level: levelSchema.nullable(),
});
export type LayerRow = z.infer<typeof layerRowSchema>;

const requiredFileSchema = z.object({
  position: z.number(),
  path: z.string(),
  size: z.number(),
  sha256: z.string(),
});

export const requiredViewSchema = z.object({
  baseline: baselineSchema,
  deviations: z.array(deviationViewSchema),
  files: z.array(requiredFileSchema.extend({ text: z.string() })),
  /** Parameters of deviations that the text has no place for. */
  refused: z.array(z.object({ axis: z.string().nullable(), parameter: z.string(), reason: z.string() })),
});

export const openChangeSchema = z.object({
  id: z.uuid(),
  label: z.string(),
  title: z.string(),
  class: changeClassSchema,
  state: changeStateSchema,
  authorName: z.string(),
  updatedAt: answeredInstant,
});
export type OpenChange = z.infer<typeof openChangeSchema>;

const standingReadingSchema = z.object({
  readingId: z.uuid(),
  layer: layerSchema,
  kind: readingKindSchema,
  readAt: answeredInstant,
  firmwareVersion: z.string().nullable(),
});

export const machineSheetSchema = machineRowSchema.extend({
  stateReason: z.string(),
  note: z.string(),
  ambientC: z.number().nullable(),
  hasReadBack: z.boolean(),
  createdAt: answeredInstant,
  assembly: assemblySchema,
  /** Hardware recorded on this machine, with its evidence. */
  facts: z.array(z.object({ axis: z.string().nullable(), part: differingPartSchema, evidence: z.string() })),
  /** What of the hardware is the machine's own; paths as in a finding's `needs`. */
  own: z.array(z.object({ path: z.string(), evidence: z.string() })),
  ignored: z.array(z.object({ path: z.string(), reason: z.string() })),
  /** Names of the fitted catalog items by path: "axes.x.motor", "supply". */
  fitted: z.record(z.string(), z.object({ id: z.uuid(), code: z.string(), name: z.string() })),
  required: requiredViewSchema.nullable(),
  layers: z.array(layerRowSchema),
  standingReadings: z.array(standingReadingSchema),
  drift: driftViewSchema,
  /** What the checks make of the values that count. */
  findings: z.array(findingSchema),
  readings: z.array(readingRowSchema),
  readingsTotal: z.number(),
  changes: z.array(openChangeSchema),
});
export type MachineSheet = z.infer<typeof machineSheetSchema>;

export const asOfQuery = z.object({
  /** A moment in the past, with a time zone; missing: now. */
  asOf: instant.optional(),
});

export const requiredTextQuery = asOfQuery.extend({
  /** Position of one file, from 0. */
  file: z.coerce.number().int().min(0).max(100).optional(),
});

export const requiredIndexSchema = z.object({
  machineId: z.uuid(),
  serial: z.string(),
  baseline: z.number(),
  /** Equal for equal bytes under equal names. */
  contentHash: z.string(),
  files: z.array(requiredFileSchema),
});
export type RequiredIndex = z.infer<typeof requiredIndexSchema>;

export const historyQuery = z.object({
  /** Left out for a parameter of the machine. */
  axis: z.string().trim().min(1).max(40).optional(),
  parameter: parameterNameSchema,
});
export type HistoryQuery = z.infer<typeof historyQuery>;

export const historyEntrySchema = z.object({
  at: answeredInstant,
  /** Read on the machine, required by a baseline, or permitted by a deviation. */
  source: z.enum(["reading", "baseline", "deviation"]),
  /** Null: the text of that time does not have it. */
  value: valueSchema.nullable(),
  /** As the text has it. */
  raw: z.string().nullable(),
  line: z.number().nullable(),
  layer: layerSchema.nullable(),
  kind: readingKindSchema.nullable(),
  readingId: z.uuid().nullable(),
  baseline: z.number().nullable(),
  change: z.object({ id: z.uuid(), label: z.string() }).nullable(),
  /** Until when it was required or permitted; null: it still is. */
  until: z.string().nullable(),
  by: z.string(),
});
export type HistoryEntry = z.infer<typeof historyEntrySchema>;

export const historySchema = z.object({
  machineId: z.uuid(),
  serial: z.string(),
  axis: z.string().nullable(),
  parameter: parameterNameSchema,
  /** Newest first. */
  entries: z.array(historyEntrySchema),
  /** Older readings than these were not looked through. */
  truncated: z.boolean(),
});
export type History = z.infer<typeof historySchema>;
