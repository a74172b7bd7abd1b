import { z } from "zod";
import { parameterNameSchema } from "@/lib/domain/parameters";
import { testPlanSchema, testSchema, trialSchema } from "@/lib/domain/test-sheets";
import { answeredInstant, reasonSchema } from "./codes";
import { pageQuery, paged } from "./common";

const axisName = z.string().trim().min(1, "Name the axis.").max(40);
const share = (what: string) =>
  z.number().min(0.5, `${what} is at least 50 %.`).max(0.9999, `${what} is at most 99.99 %.`);

export const planChoicesSchema = z.object({
  /** Of a ladder, in the SI unit of its setting; left out: from the prediction. */
  start: z.number().positive("The start is more than 0.").max(1e9).nullish(),
  step: z.number().positive("The step is more than 0.").max(1e9).nullish(),
  /** Of a run, shares of 1. */
  reliability: share("The reliability").default(0.9),
  confidence: share("The confidence").default(0.95),
  /** What the reference repeats to, in full steps; left out: not known. */
  repeatability: z.number().min(0, "At least 0.").max(100, "At most 100 full steps.").nullish(),
});
export type PlanChoicesInput = z.infer<typeof planChoicesSchema>;

export const createSheetSchema = planChoicesSchema.extend({
  machineId: z.uuid(),
  axis: axisName,
  test: testSchema,
  /** The change that the test proves; its proposal is what is tested, otherwise the machine's required configuration. */
  changeId: z.uuid().nullish(),
});
export type CreateSheet = z.input<typeof createSheetSchema>;

export const sheetQuery = pageQuery.extend({
  machineId: z.uuid().optional(),
  changeId: z.uuid().optional(),
  axis: axisName.optional(),
  state: z.enum(["open", "closed", "all"]).default("open"),
  /** Part of a serial number. */
  q: z.string().trim().max(80).optional(),
});
export type SheetQuery = z.infer<typeof sheetQuery>;

export const strikeSchema = z.object({ trialId: z.uuid(), reason: reasonSchema });

/** What a device has gathered; whatever of it came before is stored once. */
export const entriesSchema = z.object({
  trials: z.array(trialSchema).max(500).default([]),
  strikes: z.array(strikeSchema).max(500).default([]),
});
export type Entries = z.input<typeof entriesSchema>;

export const closeSheetSchema = z.object({
  outcome: z.enum(["finished", "broken_off"]),
  note: z.string().trim().max(1000, "A note has 1000 characters at most.").default(""),
});
export type CloseSheet = z.input<typeof closeSheetSchema>;

export const sheetRowSchema = z.object({
  id: z.uuid(),
  label: z.string(),
  test: testSchema,
  title: z.string(),
  machine: z.object({ id: z.uuid(), serial: z.string() }),
  siteName: z.string(),
  axis: z.string(),
  change: z.object({ id: z.uuid(), label: z.string() }).nullable(),
  createdAt: answeredInstant,
  actorName: z.string(),
  state: z.enum(["open", "finished", "broken_off"]),
  /** Entries that stand. */
  entries: z.number(),
});
export type SheetRow = z.infer<typeof sheetRowSchema>;
export const sheetPageSchema = paged(sheetRowSchema);
export type SheetPage = z.infer<typeof sheetPageSchema>;

export const storedTrialSchema = trialSchema.extend({
  actorName: z.string(),
  receivedAt: answeredInstant,
  struck: z.object({ reason: z.string(), actorName: z.string(), at: answeredInstant }).nullable(),
  /** Came in after the sheet was closed: kept, but not in its result. */
  late: z.boolean(),
});
export type StoredTrial = z.infer<typeof storedTrialSchema>;

export const sheetViewSchema = sheetRowSchema.extend({
  plan: testPlanSchema,
  trials: z.array(storedTrialSchema),
  result: z.object({
    sentences: z.array(z.string()),
    /** The level of a ladder's next trial; null on other sheets. */
    next: z.object({ rung: z.number(), level: z.number(), unit: z.string() }).nullable(),
    recommended: z.object({ parameter: parameterNameSchema, value: z.number(), unit: z.string() }).nullable(),
  }),
  closing: z
    .object({
      outcome: z.enum(["finished", "broken_off"]),
      note: z.string(),
      actorName: z.string(),
      at: answeredInstant,
    })
    .nullable(),
});
export type SheetView = z.infer<typeof sheetViewSchema>;

export const movedTestsSchema = z.object({
  items: z.array(
    z.object({
      axis: z.string(),
      test: testSchema,
      title: z.string(),
      /** The predictions that moved. */
      because: z.array(z.string()),
      expected: z.array(z.string()),
      /** Why start and step have to be given by hand; null where they are planned. */
      why: z.string().nullable(),
      sheets: z.array(sheetRowSchema),
    }),
  ),
});
export type MovedTests = z.infer<typeof movedTestsSchema>;
