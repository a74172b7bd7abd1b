import type { Finding } from "@/lib/domain/findings";
import { formatNumber } from "@/lib/domain/units";

/** The margin as people say it: "6 K below the limit", "17 % beyond the limit"; null where there is none. */
export function marginWords({ margin, unit }: Pick<Finding, "margin" | "unit">): string | null {
  if (margin === null) return null;
  const size =
    unit === "°C" ? `${formatNumber(Math.abs(margin))} K` : `${formatNumber(Math.abs(margin) * 100)} %`;
  return margin < 0 ? `${size} beyond the limit` : `${size} in hand`;
}
