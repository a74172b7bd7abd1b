import { z } from "zod";

const share = (value: number) =>
  z
    .number("Type a number in %.")
    .min(0, "A margin is at least 0 %.")
    .max(10, "A margin is at most 1000 %.")
    .default(value);

/** The team's own margins; the defaults are the product's. Ratios are shares of 1, temperatures °C or K. */
export const policySchema = z.object({
  torque_margin_below_limit_speed: share(0.5),
  torque_margin_above_limit_speed: share(1.0),
  /** The driver junction is `over` above this, or above its own limit less 25 K. */
  junction_limit_c: z
    .number("Type a number in °C.")
    .min(40, "At least 40 °C.")
    .max(200, "At most 200 °C.")
    .default(125),
  /** A reading older than this is stale, and said so. */
  stale_after_days: z
    .number("Type a number of days.")
    .int("Whole days.")
    .min(1, "At least 1 day.")
    .max(3650, "At most 3650 days.")
    .default(30),
});
export type Policy = z.infer<typeof policySchema>;

export const DEFAULT_POLICY: Policy = policySchema.parse({});
