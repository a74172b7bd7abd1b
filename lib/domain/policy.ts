import { z } from "zod";

const share = (value: number) =>
  z
    .number("Type a number in %.")
    .min(0, "A margin is at least 0 %.")
    .max(10, "A margin is at most 1000 %.")
    .default(value);

const weight = z
  .number("Type a number.")
  .min(0.1, "A weight is at least 0.1.")
  .max(100, "A weight is at most 100.")
  .default(1);

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
  /** What a counter-proposal reckons for a change of a value: weight × share of the present value. */
  counter_weight_current: weight,
  counter_weight_speed: weight,
  counter_weight_acceleration: weight,
  counter_weight_corner_speed: weight,
  /** A counter-proposal lowers no value below this share of the present one. */
  counter_least_share: z
    .number("Type a number in %.")
    .min(0.01, "At least 1 %.")
    .max(0.95, "At most 95 %.")
    .default(0.1),
  /** Whether it may raise a run current, within the limits, where less speed or acceleration would do. */
  counter_raises_current: z.boolean("Say yes or no.").default(false),
});
export type Policy = z.infer<typeof policySchema>;

export const DEFAULT_POLICY: Policy = policySchema.parse({});
