import type { Finding } from "@/lib/domain/findings";
import { QUANTITY_NAMES } from "@/lib/domain/quantities";
import type { Quantity } from "@/lib/domain/quantities";
import { currentProvenance } from "./provenance";
import { isMachineQuantity, quantityUnit } from "./quantities/table";
import { RULES } from "./table";
import type { AxisView, RuleContext, RuleInput, RuleResult } from "./types";
import { ruleContext } from "./view";

/**
 * Every quantity and every finding of one machine, with the provenance of its currents. Values are SI, except °C and
 * the scale (1/mm, 1/deg). Never throws on data; what cannot be computed is absent, and a finding says why.
 */
export function evaluateRules(input: RuleInput): RuleResult {
  const context = ruleContext(input);
  return {
    quantities: [...context.axes.flatMap(axisQuantities), ...machineQuantities(context)],
    findings: RULES.flatMap((rule) => rule.evaluate(context)).sort(byAxis(context)),
    provenance: context.axes.flatMap(currentProvenance),
  };
}

function axisQuantities(axis: AxisView): Quantity[] {
  return QUANTITY_NAMES.filter((name) => !isMachineQuantity(name)).flatMap((name) => {
    const found = axis.quantity(name);
    const unit = quantityUnit(name, axis.kind);
    return found.ok ? [{ axis: axis.axis, name, value: found.value, unit }] : [];
  });
}

function machineQuantities(context: RuleContext): Quantity[] {
  return QUANTITY_NAMES.filter(isMachineQuantity).flatMap((name) => {
    const found = context.quantity(name);
    return found.ok ? [{ axis: null, name, value: found.value, unit: quantityUnit(name, "linear") }] : [];
  });
}

/** Axis by axis in the machine's order, the machine's own findings last; within an axis in the order of the table. */
function byAxis({ axes }: RuleContext): (one: Finding, other: Finding) => number {
  const ranks = new Map(axes.map(({ axis }, index) => [axis, index]));
  const rank = ({ axis }: Finding) => (axis === null ? axes.length : (ranks.get(axis) ?? axes.length));
  return (one, other) => rank(one) - rank(other);
}
