import { z } from "zod";
import { policySchema } from "@/lib/domain/policy";
import { answeredInstant, reasonSchema } from "./codes";

export const savePolicySchema = z.object({
  policy: z.object({
    torque_margin_below_limit_speed: policySchema.shape.torque_margin_below_limit_speed.unwrap(),
    torque_margin_above_limit_speed: policySchema.shape.torque_margin_above_limit_speed.unwrap(),
    junction_limit_c: policySchema.shape.junction_limit_c.unwrap(),
    stale_after_days: policySchema.shape.stale_after_days.unwrap(),
    counter_weight_current: policySchema.shape.counter_weight_current.unwrap(),
    counter_weight_speed: policySchema.shape.counter_weight_speed.unwrap(),
    counter_weight_acceleration: policySchema.shape.counter_weight_acceleration.unwrap(),
    counter_weight_corner_speed: policySchema.shape.counter_weight_corner_speed.unwrap(),
    counter_least_share: policySchema.shape.counter_least_share.unwrap(),
    counter_raises_current: policySchema.shape.counter_raises_current.unwrap(),
  }),
  note: reasonSchema,
});
export type SavePolicy = z.infer<typeof savePolicySchema>;

export const policyVersionSchema = z.object({
  /** 0: the product's defaults, until the team saves its own. */
  version: z.number(),
  policy: policySchema,
  note: z.string(),
  createdByName: z.string(),
  createdAt: answeredInstant.nullable(),
});
export type PolicyVersionView = z.infer<typeof policyVersionSchema>;

export const policiesSchema = z.object({
  current: policyVersionSchema,
  /** Newest first, the current one among them; the newest hundred. */
  history: z.array(policyVersionSchema),
});
export type PoliciesView = z.infer<typeof policiesSchema>;
