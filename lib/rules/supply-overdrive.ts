import { overdriveRatio } from "@/lib/physics/supply";
import { exceeds, hint, judged } from "./assessment";
import type { Assessment } from "./assessment";
import { axisRule } from "./check";
import { gather, hardware, supplyVoltage } from "./data";
import { RATED_READS, ratingRms } from "./quantities/current";
import { plain, show, showRms } from "./show";
import type { AxisView } from "./types";

/** 12 V on a motor of 3 V, a ratio of 4, is in daily use and passes. */
const LEAST = 2;
const MOST = 25;

function assess(axis: AxisView): Assessment {
  const parts = gather({
    voltage: supplyVoltage(axis),
    ratedCurrent: ratingRms(axis, "motor"),
    resistance: hardware(axis, "motor", "resistance_ohm"),
  });
  if (!parts.ok) return parts;
  const { voltage, ratedCurrent, resistance } = parts.values;
  const ratio = overdriveRatio(parts.values);
  const low = exceeds(LEAST, ratio);
  const high = exceeds(ratio, MOST);
  return judged(hint({ value: ratio, applies: low || high, nearLimit: low ? LEAST : MOST, unit: "" }), {
    assumed: parts.assumed,
    sentence: () =>
      `The supply of ${show(voltage, "V")} is ${plain(ratio)} times the ${show(ratedCurrent * resistance, "V")} that the winding takes at its rated current.${remark(low, high)}`,
    formula: () =>
      `${show(voltage, "V")} / (${showRms(ratedCurrent)} · ${show(resistance, "Ω")}) = ${plain(ratio)}; usual ${LEAST} to ${MOST}`,
  });
}

function remark(low: boolean, high: boolean): string {
  if (low) return " Little is left to drive the current at speed.";
  return high ? " Ripple heats the iron more than usual; look at the motor's temperature." : "";
}

/** The supply is hardware: no parameter of a text clears it. */
export const SUPPLY_OVERDRIVE = axisRule({
  id: "supply-overdrive",
  title: "Supply against the winding's voltage",
  compares: "The supply voltage with the voltage that the winding takes at its rated current.",
  formula: "2 ≤ V/(I_r·R) ≤ 25",
  source:
    "Common practice, no source: 5 to 25 is usual, and 3 V motors on 12 V rails, a ratio of 4, are normal; 2 is the product's choice",
  needs: ["supply.voltage_v", "motor.resistance_ohm", ...RATED_READS],
  margin: "near below 2 or above 25, never over",
  caution: null,
  parameters: () => [],
  assess,
});
