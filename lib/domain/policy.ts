import { z } from "zod";

const share = (value: number) => z.number().min(0).max(10).default(value);

/** The team's own margins; the defaults are the product's. Ratios are shares of 1, temperatures °C or K. */
export const policySchema = z.object({
  torque_margin_below_limit_speed: share(0.5),
  torque_margin_above_limit_speed: share(1.0),
  /** The driver junction is `over` above this, or above its own limit less 25 K. */
  junction_limit_c: z.number().min(40).max(200).default(125),
  /** A reading older than this is stale, and said so. */
  stale_after_days: z.number().int().min(1).max(3650).default(30),
});
export type Policy = z.infer<typeof policySchema>;

export const DEFAULT_POLICY: Policy = policySchema.parse({});
