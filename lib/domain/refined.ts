import { z } from "zod";

/** Thermal resistances of a motor that temperatures measured on the machine can refine. */
export const REFINABLE_FIELDS = ["winding_to_ambient_k_per_w", "case_to_ambient_k_per_w"] as const;
export type RefinableField = (typeof REFINABLE_FIELDS)[number];

/** A catalog value of one motor that has given way to a refined one; all in K/W. */
export const refinedFieldSchema = z.object({
  field: z.enum(REFINABLE_FIELDS),
  /** What the catalog says. */
  catalog: z.number().positive(),
  value: z.number().positive(),
  /** Ends of the 95 % interval. The upper one, the cautious one, stands in the motor's own field. */
  low: z.number().min(0),
  high: z.number().positive(),
  /** How many measured temperatures it rests on. */
  readings: z.number().int().min(1),
});
export type RefinedField = z.infer<typeof refinedFieldSchema>;
