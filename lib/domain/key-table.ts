import { z } from "zod";
import { layerSchema } from "./readings";
import { parameterNameSchema } from "./parameters";

/**
 * One row: which key is which parameter. `key` is the full key with sections joined by dots; `{axis}` in it
 * stands for an axis name (case does not matter) or, where it stands for a list index, for the axis at that
 * place in the model's order. Without `{axis}` a parameter of an axis needs `axis`.
 */
export const keyRuleSchema = z.object({
  key: z.string().min(1).max(200),
  parameter: parameterNameSchema,
  axis: z.string().min(1).max(40).optional(),
  unit: z.string().max(20).optional(),
  basis: z.enum(["peak", "rms"]).optional(),
  layer: layerSchema.optional(),
});
export type KeyRule = z.infer<typeof keyRuleSchema>;

export const keyTableSchema = z.object({ rules: z.array(keyRuleSchema).max(2000) });
export type KeyTable = z.infer<typeof keyTableSchema>;
