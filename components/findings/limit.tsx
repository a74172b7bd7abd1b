import type { LimitSense } from "@/lib/domain/findings";
import { Quantity } from "@/components/ui/quantity";

export interface LimitProps {
  readonly limit: number | null;
  readonly sense: LimitSense;
  readonly unit: string;
}

/** "≤ 58 °C" or "≥ 1"; nothing for a check without a limit. */
export function Limit({ limit, sense, unit }: LimitProps) {
  if (limit === null) return null;
  return (
    <span className="limit">
      <span className="visually-hidden">limit at {sense === "lower" ? "least " : "most "}</span>
      <span aria-hidden="true">{sense === "lower" ? "≥\u00a0" : "≤\u00a0"}</span>
      <Quantity value={limit} unit={unit} />
    </span>
  );
}
