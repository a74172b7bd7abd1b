import { peakFromRms } from "@/lib/physics/current-conventions";
import { copperFactor } from "@/lib/physics/motor-heat";
import { drivableCurrent } from "@/lib/physics/pull-out";
import { judged, judgeUpper, upperSign } from "./assessment";
import type { Assessment } from "./assessment";
import { currentParameters, lowerCurrent } from "./candidates";
import { axisRule } from "./check";
import { gather, hardware, setPoint, supplyVoltage } from "./data";
import { CONNECTION_READS } from "./quantities/current";
import { isClosedLoop, notCovered } from "./quantities/open-loop";
import { readsOf } from "./quantities/table";
import { torqueTemperature } from "./quantities/torque";
import { show, showPeak, showRms } from "./show";
import type { AxisView } from "./types";

/** The supply is to have this many times the voltage that the current takes at standstill; the product's choice. */
const RESERVE = 1.25;

function assess(axis: AxisView): Assessment {
  if (isClosedLoop(axis.hardware)) return notCovered(axis.axis);
  const parts = gather({
    current: axis.quantity("winding_current_rms"),
    voltage: supplyVoltage(axis),
    resistance: hardware(axis, "motor", "resistance_ohm"),
    onResistance: hardware(axis, "driver", "rds_on_ohm"),
    sense: setPoint(axis, "sense_resistance_ohm"),
    temperature: torqueTemperature(axis),
  });
  if (!parts.ok) return parts;
  const { current, voltage, onResistance, sense, temperature } = parts.values;
  const resistance = parts.values.resistance * copperFactor(temperature) + onResistance + sense;
  const limit = drivableCurrent({ voltage, resistance });
  const verdict = judgeUpper({ value: current, limit, near: limit / RESERVE, unit: "A" });
  return judged(verdict, {
    assumed: parts.assumed,
    sentence: () =>
      `At standstill ${show(voltage, "V")} drive ${showRms(limit)} at most through a winding at ${show(temperature, "°C")}${LEVEL_WORDS[verdict.level](current)}`,
    formula: () =>
      `${showPeak(peakFromRms(current))} · ${show(resistance, "Ω")} = ${show(peakFromRms(current) * resistance, "V")} ${upperSign(verdict)} ${show(voltage, "V")}`,
  });
}

const LEVEL_WORDS = {
  over: (current: number) =>
    `: the ${showRms(current)} of the text never flow, and torque reckoned with them is not there.`,
  near: (current: number) =>
    `; the ${showRms(current)} of the text leave less than a fourth of the voltage in reserve.`,
  within: (current: number) => `, more than the ${showRms(current)} of the text.`,
} as const;

export const SUPPLY_DRIVES_CURRENT = axisRule({
  id: "supply-drives-current",
  title: "Supply against the run current",
  compares:
    "The run current with the current that the supply can drive through the hot winding at standstill.",
  formula: "√2·I·(R(T) + R_on + Rs) ≤ V; I_most = V/(√2·(R(T) + R_on + Rs))",
  source: "Ohm's law; R(T) as in the torque at speed; the reserve of 1.25 is the product's choice",
  needs: [
    ...readsOf("winding_current_rms", "winding_c"),
    ...CONNECTION_READS,
    "supply.voltage_v",
    "motor.resistance_ohm",
    "motor.winding_limit_c",
    "driver.rds_on_ohm",
    "driver.set_point.sense_resistance_ohm",
    "driver.feedback",
  ],
  margin:
    "near where the supply has less than 1.25 times the voltage that the current takes, over where less than it",
  caution: null,
  parameters: (axis) => currentParameters(axis, "run_current"),
  candidates: lowerCurrent,
  assess,
});
