import { z } from "zod";
import { measuredTemperatureSchema } from "@/lib/domain/changes";
import { REFINABLE_FIELDS } from "@/lib/domain/refined";

export const judgedHeatSchema = measuredTemperatureSchema.extend({
  verificationId: z.string(),
  at: z.string(),
  ambientC: z.number().nullable(),
  /** A rms in one winding by what was required then. */
  current: z.number().nullable(),
  sameMotor: z.boolean(),
  /** W, K, °C */
  power: z.number().nullable(),
  rise: z.number().nullable(),
  predicted: z.number().nullable(),
  /** Why it refines nothing; null where it does. */
  ignored: z.string().nullable(),
});

const fitSchema = z.discriminatedUnion("ok", [
  z.object({
    ok: z.literal(true),
    /** K/W */
    value: z.number(),
    uncertainty: z.number(),
    low: z.number(),
    high: z.number(),
    /** Share of 1 that the measurements have in the value. */
    weight: z.number(),
  }),
  z.object({ ok: z.literal(false), because: z.enum(["too_few", "contradictory", "far_from_catalog"]) }),
]);

export const measuredHeatSchema = z.object({
  /** Newest first. */
  readings: z.array(judgedHeatSchema),
  fits: z.array(
    z.object({
      axis: z.string(),
      field: z.enum(REFINABLE_FIELDS),
      catalog: z.number(),
      readings: z.number(),
      fit: fitSchema,
    }),
  ),
});
export type MeasuredHeatView = z.infer<typeof measuredHeatSchema>;
