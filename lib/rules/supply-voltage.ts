import { highestSupplyVoltage } from "@/lib/physics/supply";
import { BESIDE, judged, judgeUpper, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { axisRule } from "./check";
import { gather, hardware, supplyTolerance, supplyVoltage } from "./data";
import { plain, show } from "./show";
import type { AxisView } from "./types";

const NEAR = 0.95;

function assess(axis: AxisView): Assessment {
  const parts = gather({
    voltage: supplyVoltage(axis),
    tolerance: supplyTolerance(axis),
    most: hardware(axis, "driver", "operating_max_v"),
  });
  if (!parts.ok) return parts;
  const { voltage, tolerance, most } = parts.values;
  const value = highestSupplyVoltage(voltage, tolerance);
  const verdict = judgeUpper({ value, limit: most, near: NEAR * most, unit: "V" });
  return judged(verdict, {
    assumed: parts.assumed,
    sentence: () =>
      `The supply reaches ${show(value, "V")} at the top of its tolerance, ${BESIDE[verdict.level]} the driver's highest operating voltage of ${show(most, "V")}.`,
    formula: () =>
      `${show(voltage, "V")} · (1 + ${plain(tolerance)}) = ${show(value, "V")} ${upperSign(verdict)} ${show(most, "V")}`,
  });
}

/** The supply is hardware: no parameter of a text clears it. */
export const SUPPLY_VOLTAGE = axisRule({
  id: "supply-voltage",
  title: "Supply voltage against the driver",
  compares: "The supply voltage at the top of its tolerance with the driver's highest operating voltage.",
  formula: "V·(1 + tolerance) ≤ V_operating,max",
  source: "Driver data sheet: operating range",
  needs: ["supply.voltage_v", "supply.tolerance", "driver.operating_max_v"],
  margin: "near above 95 % of the highest operating voltage, over above it",
  caution: null,
  parameters: () => [],
  assess,
});
