import { formatNumber } from "@/lib/domain/units";
import type { LostSteps } from "@/lib/physics/evidence/lost-steps";

/** Lost-step arithmetic in a sentence. */
export function lostStepWords({ lost, remainder, verdict, teeth }: LostSteps): string {
  const split = `${formatNumber(lost)} full steps lost, remainder ${formatNumber(remainder)}`;
  const belt =
    teeth === null
      ? ""
      : ` ${Math.abs(teeth)} slipped belt ${Math.abs(teeth) === 1 ? "tooth" : "teeth"} would give just this.`;
  if (verdict === "none") return `Nothing lost: the axis stands within what the reference repeats to.${belt}`;
  if (verdict === "lost") return `${split}: whole slips of four full steps.${belt}`;
  if (verdict === "unexplained")
    return `${split}: the remainder is more than the reference repeats to, and lost steps do not explain it. Look at backlash, the coupling and the belt.${belt}`;
  return `${split}: the remainder is the reference's repeatability or something loose; what the reference repeats to was not given.${belt}`;
}
