import { lowestCurrent } from "@/lib/physics/microstep-fidelity";
import { axisPath, computed, gather, hardware, missing, supplyVoltage } from "../data";
import { plain, show, showPeak } from "../show";
import type { Computed } from "../types";
import { CONNECTION_READS } from "./current";
import type { QuantityDefinition } from "./definition";

const OTHER_DECAY: Computed = {
  ok: false,
  needs: [],
  reason: "The lowest current of this kind exists only in slow decay.",
};

export const MINIMUM_CURRENT: QuantityDefinition = {
  reads: [
    "driver.decay_mode",
    "driver.min_on_time_us",
    "driver.chopping_frequency_hz",
    "motor.resistance_ohm",
    ...CONNECTION_READS,
    "supply.voltage_v",
  ],
  from: [],
  compute: (axis) => {
    const decay = axis.hardware.driver?.decay_mode;
    if (decay === undefined) return missing(axisPath(axis, "driver.decay_mode"));
    if (decay !== "slow") return OTHER_DECAY;
    const parts = gather({
      onTime: hardware(axis, "driver", "min_on_time_us"),
      frequency: hardware(axis, "driver", "chopping_frequency_hz"),
      voltage: supplyVoltage(axis),
      resistance: hardware(axis, "motor", "resistance_ohm"),
    });
    if (!parts.ok) return parts;
    const { onTime, frequency, voltage, resistance } = parts.values;
    const current = lowestCurrent({ onTime: onTime * 1e-6, frequency, voltage, resistance });
    return computed(
      current,
      parts.assumed,
      () =>
        `${plain(onTime)} µs · ${show(frequency, "Hz")} · ${show(voltage, "V")} / ${show(resistance, "Ω")} = ${showPeak(current)}`,
    );
  },
};
