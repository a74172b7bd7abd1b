import { inductanceRuleVoltage } from "@/lib/physics/supply";
import { exceeds, hint, judged } from "./assessment";
import type { Assessment } from "./assessment";
import { axisRule } from "./check";
import { gather, hardware, supplyVoltage } from "./data";
import { CONNECTION_READS } from "./quantities/current";
import { plain, show } from "./show";
import type { AxisView } from "./types";

function assess(axis: AxisView): Assessment {
  const parts = gather({
    voltage: supplyVoltage(axis),
    inductance: hardware(axis, "motor", "inductance_mh"),
  });
  if (!parts.ok) return parts;
  const { voltage, inductance } = parts.values;
  const most = inductanceRuleVoltage(inductance);
  const high = exceeds(voltage, most);
  return judged(hint({ value: voltage, applies: high, nearLimit: most, unit: "V" }), {
    assumed: parts.assumed,
    sentence: () =>
      high
        ? `${show(voltage, "V")} is more than the ${show(most, "V")} that the rule of the inductance allows this motor: its iron may run hot at standstill and low speed.`
        : `${show(voltage, "V")} lies within the ${show(most, "V")} that the rule of the inductance allows this motor.`,
    formula: () =>
      `${show(voltage, "V")} ${high ? ">" : "≤"} 32 · √(${plain(inductance)} mH) = ${show(most, "V")}`,
  });
}

/** The supply is hardware: no parameter of a text clears it. */
export const INDUCTANCE_RULE = axisRule({
  id: "inductance-rule",
  title: "Supply against the winding's inductance",
  compares: "The supply voltage with 32 times the root of the winding's inductance in mH.",
  formula: "V ≤ 32·√(L/mH)",
  source:
    "Common practice, no source: a bound on iron heat of unknown origin, and no target; the driver's own limit stands above it",
  needs: ["supply.voltage_v", "motor.inductance_mh", ...CONNECTION_READS],
  margin: "near above the rule's voltage, never over",
  caution: null,
  parameters: () => [],
  assess,
});
