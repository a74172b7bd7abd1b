import type { QuantityName } from "@/lib/domain/quantities";
import type { AxisView, Computed, RuleContext } from "../types";

/** How one quantity of an axis is computed. */
export interface QuantityDefinition {
  /** Hardware fields and parameters it reads itself, spelt as in `Rule.needs`. */
  readonly reads: readonly string[];
  /** Quantities it is computed from. */
  readonly from: readonly QuantityName[];
  readonly compute: (axis: AxisView) => Computed;
}

/** How one quantity of the whole machine is computed. */
export interface MachineQuantityDefinition {
  readonly reads: readonly string[];
  readonly from: readonly QuantityName[];
  readonly compute: (context: RuleContext) => Computed;
}
