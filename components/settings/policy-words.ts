import type { Policy } from "@/lib/domain/policy";

export type PolicyField = keyof Policy;

interface FieldWords {
  readonly label: string;
  readonly unit: string;
  readonly help: string;
}

export const POLICY_WORDS: Record<PolicyField, FieldWords> = {
  torque_margin_below_limit_speed: {
    label: "Torque margin up to the limit speed",
    unit: "%",
    help: "How much more torque an axis must have than its load asks for, at speeds where the supply can still drive the full current.",
  },
  torque_margin_above_limit_speed: {
    label: "Torque margin above the limit speed",
    unit: "%",
    help: "The same at higher speeds, where torque falls off and the estimate is less certain.",
  },
  junction_limit_c: {
    label: "Driver junction, highest",
    unit: "°C",
    help: "A driver is over limit above this, or above its own limit less 25 K where that is lower.",
  },
  stale_after_days: {
    label: "A reading is stale after",
    unit: "days",
    help: "A machine whose newest reading is older is shown as such.",
  },
  counter_weight_current: {
    label: "Weight of a current",
    unit: "",
    help: "A counter-proposal seeks the smallest sum of relative changes; each counts with its weight. A greater weight leaves the value rather as it is.",
  },
  counter_weight_speed: {
    label: "Weight of a maximum speed",
    unit: "",
    help: "Likewise.",
  },
  counter_weight_acceleration: {
    label: "Weight of an acceleration",
    unit: "",
    help: "Likewise.",
  },
  counter_weight_corner_speed: {
    label: "Weight of a corner speed",
    unit: "",
    help: "Likewise. Every other value has the weight 1.",
  },
  counter_least_share: {
    label: "A value is lowered at most to",
    unit: "%",
    help: "Of the present value. What would have to go lower is not proposed.",
  },
  counter_raises_current: {
    label: "Raise a run current where less speed would do",
    unit: "",
    help: "No: a counter-proposal raises a run current only where nothing else clears the findings, and never above a limit.",
  },
};

const SHARES: readonly PolicyField[] = [
  "torque_margin_below_limit_speed",
  "torque_margin_above_limit_speed",
  "counter_least_share",
];
const DIGITS = 12;

/** A share of 1 in percent, without the dust of binary fractions. */
export function shownShare(share: number): number {
  return Number((share * 100).toPrecision(DIGITS));
}

/** Percent as a share of 1. */
export function storedShare(percent: number): number {
  return Number((percent / 100).toPrecision(DIGITS));
}

/** A margin with its unit, as people read it. */
export function policyValue(policy: Policy, field: PolicyField): string {
  const stored = policy[field];
  if (typeof stored === "boolean") return stored ? "yes" : "no";
  const value = SHARES.includes(field) ? shownShare(stored) : stored;
  return `${value} ${POLICY_WORDS[field].unit}`.trim();
}
