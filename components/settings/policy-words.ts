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
};

const SHARES: readonly PolicyField[] = ["torque_margin_below_limit_speed", "torque_margin_above_limit_speed"];
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
  const value = SHARES.includes(field) ? shownShare(policy[field]) : policy[field];
  return `${value} ${POLICY_WORDS[field].unit}`;
}
