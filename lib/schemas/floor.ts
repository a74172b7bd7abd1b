import { z } from "zod";
import { standingSchema } from "@/lib/domain/floor";
import { levelSchema } from "@/lib/domain/levels";
import { parameterNameSchema } from "@/lib/domain/parameters";
import { answeredInstant } from "./codes";
import { instant } from "./common";
import { fleetFilter } from "./machines-read";

/** Machines that are worked out for a moment in the past in one answer. */
export const MAX_AS_OF_ROWS = 100;
export const MAX_FLOOR_ROWS = 2000;

export const floorQuery = fleetFilter
  .extend({
    /** A moment in the past, with a time zone; missing: now. */
    asOf: instant.optional(),
    page: z.coerce.number().int().min(1).max(100_000).default(1),
    pageSize: z.coerce.number().int().min(1).max(MAX_FLOOR_ROWS).optional(),
  })
  .superRefine(({ asOf, pageSize, level }, context) => {
    if (asOf === undefined) return;
    if ((pageSize ?? 0) > MAX_AS_OF_ROWS)
      context.addIssue({
        code: "custom",
        path: ["pageSize"],
        message: `For a moment in the past a page has ${MAX_AS_OF_ROWS} machines at most.`,
      });
    if (level !== undefined)
      context.addIssue({
        code: "custom",
        path: ["level"],
        message: "The filter by level works for today only; leave it out, or leave asOf out.",
      });
  });
export type FloorQuery = z.infer<typeof floorQuery>;

const columnSchema = z.object({
  key: z.string(),
  axis: z.string().nullable(),
  parameter: parameterNameSchema,
  short: z.string(),
  label: z.string(),
  modelIds: z.array(z.uuid()).optional(),
});

const cellSchema = z.object({
  kind: z.enum(["drift", "deviation", "not_read", "absent"]),
  share: z.number().optional(),
  level: levelSchema.optional(),
  title: z.string(),
});

const rowSchema = z.object({
  machineId: z.uuid(),
  serial: z.string(),
  modelId: z.uuid(),
  modelName: z.string(),
  siteName: z.string(),
  standing: standingSchema,
  sentence: z.string(),
  cells: z.record(z.string(), cellSchema),
});

const countsSchema = z.object({
  /** Machines in service. */
  inService: z.number(),
  offBaseline: z.number(),
  notRead: z.number(),
  outOfService: z.number(),
  over: z.number(),
  onDeviation: z.number(),
  /** The last day of the permitted deviation that ends first. */
  nextDeviationEnd: z.string().nullable(),
});
export type FloorCounts = z.infer<typeof countsSchema>;

const choice = z.object({ id: z.uuid(), name: z.string(), machines: z.number() });

export const floorSchema = z.object({
  asOf: answeredInstant,
  columns: z.array(columnSchema),
  rows: z.array(rowSchema),
  counts: countsSchema,
  page: z.number(),
  pageSize: z.number(),
  total: z.number(),
  /** What can be filtered by, with the number of machines. */
  sites: z.array(choice),
  models: z.array(choice),
});
export type Floor = z.infer<typeof floorSchema>;
