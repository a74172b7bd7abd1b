import { z } from "zod";
import { levelSchema } from "./levels";

/** The fleet in warmer rooms. */
export const warmDaySchema = z.object({
  kind: z.literal("warm_day"),
  /** K above each site's design maximum. */
  riseK: z.number("Type a number in K.").min(1, "At least 1 K.").max(60, "At most 60 K."),
});

/** The fleet with another part fitted. */
export const partSwapSchema = z.object({
  kind: z.literal("part_swap"),
  part: z.enum(["motor", "driver"]),
  /** Catalog item to be fitted. */
  itemId: z.uuid("Choose the part to be fitted."),
  /** Only where this item is fitted now; null: wherever a part of the kind is. */
  replacesId: z.uuid().nullable().default(null),
});

/** What a rehearsal asks. Nothing is done to any machine. */
export const rehearsalQuestionSchema = z.discriminatedUnion("kind", [warmDaySchema, partSwapSchema]);
export type RehearsalQuestion = z.infer<typeof rehearsalQuestionSchema>;

export const REHEARSAL_STATES = ["waiting", "running", "done"] as const;
export const rehearsalStateSchema = z.enum(REHEARSAL_STATES);
export type RehearsalState = z.infer<typeof rehearsalStateSchema>;

const checkPlace = z.object({ ruleId: z.string(), axis: z.string().nullable() });

export const hottestRoomSchema = z.object({
  /** `limited`: a check limits it; `any`: no check does up to `ambientC`; `cannot`: no check of heat has its data. */
  kind: z.enum(["limited", "any", "cannot"]),
  /** °C */
  ambientC: z.number().nullable(),
  limitedBy: checkPlace.nullable(),
  /** Checks that are over limit even in the coldest room; they do not limit it. */
  alwaysOver: z.array(checkPlace),
  /** Paths of data that checks lacked. */
  needs: z.array(z.string()),
});
export type HottestRoom = z.infer<typeof hottestRoomSchema>;

export const rehearsedFindingSchema = z.object({
  ruleId: z.string(),
  axis: z.string().nullable(),
  was: levelSchema.nullable(),
  toBe: levelSchema,
  sentence: z.string(),
  unit: z.string(),
  valueWas: z.number().nullable(),
  value: z.number().nullable(),
  limit: z.number().nullable(),
  nearLimit: z.number().nullable(),
  limitSense: z.enum(["upper", "lower"]).nullable(),
});
export type RehearsedFinding = z.infer<typeof rehearsedFindingSchema>;

/** What a rehearsal comes to on one machine. */
export const rehearsedMachineSchema = z.object({
  /** Whether the question bears on the machine at all: a part that it does not carry cannot be swapped on it. */
  concerned: z.boolean(),
  was: levelSchema,
  toBe: levelSchema,
  /** Axes on which the part would be another. */
  axes: z.array(z.string()),
  /** Graver than today, the gravest first. */
  graver: z.array(rehearsedFindingSchema),
  hottestRoom: hottestRoomSchema.nullable(),
  /** Why there is nothing to say, in a sentence. */
  trouble: z.string().nullable(),
});
export type RehearsedMachine = z.infer<typeof rehearsedMachineSchema>;
