import { windingPower, windingSteadyState } from "@/lib/physics/motor-heat";
import { computed, gather, hardware, motorAmbient } from "../data";
import { plain, show, showRms } from "../show";
import type { AxisView, Computed } from "../types";
import { CONNECTION_READS } from "./current";
import type { QuantityDefinition } from "./definition";

const MOTOR_RUNAWAY: Computed = {
  ok: false,
  needs: [],
  reason:
    "The motor never settles: the loss of its copper grows faster with temperature than its heat leaves.",
  runaway: true,
};

export const WINDING_TEMPERATURE: QuantityDefinition = {
  reads: [
    "motor.resistance_ohm",
    ...CONNECTION_READS,
    "motor.winding_to_ambient_k_per_w",
    "machine.ambient_c",
    "machine.motor_ambient_c",
  ],
  from: ["winding_current_rms"],
  compute: (axis) => {
    const parts = gather({
      current: axis.quantity("winding_current_rms"),
      resistance: hardware(axis, "motor", "resistance_ohm"),
      thermal: hardware(axis, "motor", "winding_to_ambient_k_per_w"),
      ambient: motorAmbient(axis),
    });
    if (!parts.ok) return parts;
    const { current, resistance, thermal, ambient } = parts.values;
    const settled = windingSteadyState({
      current,
      resistanceAt20: resistance,
      thermalResistance: thermal,
      ambient,
    });
    if (!settled) return MOTOR_RUNAWAY;
    const { temperature } = settled;
    return computed(
      temperature,
      parts.assumed,
      () =>
        `${show(ambient, "°C")} + ${plain(thermal)} K/W · 2 · (${showRms(current)})² · ${show(resistance, "Ω")} · (234.5 + ${plain(temperature)}) / 254.5 = ${show(temperature, "°C")}`,
    );
  },
};

export const CASE_TEMPERATURE: QuantityDefinition = {
  reads: [
    "motor.case_to_ambient_k_per_w",
    "motor.resistance_ohm",
    ...CONNECTION_READS,
    "machine.ambient_c",
    "machine.motor_ambient_c",
  ],
  from: ["winding_c", "winding_current_rms"],
  compute: (axis) => {
    const parts = gather({
      ambient: motorAmbient(axis),
      thermal: hardware(axis, "motor", "case_to_ambient_k_per_w"),
      power: copperLoss(axis),
    });
    if (!parts.ok) return parts;
    const { ambient, thermal, power } = parts.values;
    const temperature = ambient + thermal * power;
    return computed(
      temperature,
      parts.assumed,
      () =>
        `${show(ambient, "°C")} + ${plain(thermal)} K/W · ${show(power, "W")} = ${show(temperature, "°C")}`,
    );
  },
};

/** Loss in both windings, W, at the settled winding temperature. */
function copperLoss(axis: AxisView): Computed {
  const parts = gather({
    temperature: axis.quantity("winding_c"),
    current: axis.quantity("winding_current_rms"),
    resistance: hardware(axis, "motor", "resistance_ohm"),
  });
  if (!parts.ok) return parts;
  const { temperature, current, resistance } = parts.values;
  const power = windingPower({ current, resistanceAt20: resistance, temperature });
  return computed(power, parts.assumed, () => show(power, "W"));
}
