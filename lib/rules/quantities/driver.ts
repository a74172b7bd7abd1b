import { peakFromRms } from "@/lib/physics/current-conventions";
import {
  conductionLoss,
  driverSteadyState,
  highestDriverCurrent,
  switchingLoss,
} from "@/lib/physics/driver-heat";
import { senseResistorPower } from "@/lib/physics/sense-resistor";
import {
  computed,
  driverAmbient,
  gather,
  given,
  hardware,
  merged,
  orDefault,
  setPoint,
  supplyVoltage,
} from "../data";
import { plain, show, showPeak, showRms } from "../show";
import type { AxisView, Computed, Datum } from "../types";
import type { QuantityDefinition } from "./definition";

export const SENSE_RESISTOR_POWER: QuantityDefinition = {
  reads: ["driver.set_point.sense_resistance_ohm"],
  from: ["winding_current_rms"],
  compute: (axis) => {
    const parts = gather({
      current: axis.quantity("winding_current_rms"),
      sense: setPoint(axis, "sense_resistance_ohm"),
    });
    if (!parts.ok) return parts;
    const { current, sense } = parts.values;
    const peakCurrent = peakFromRms(current);
    const power = senseResistorPower({ peakCurrent, resistance: sense });
    return computed(
      power,
      parts.assumed,
      () => `(${showPeak(peakCurrent)})² · ${show(sense, "Ω")} = ${show(power, "W")}`,
    );
  },
};

/** Switching loss, W. With an edge of 0 there is none, whatever the supply and the chopping frequency are. */
function switching(axis: AxisView, current: Datum): Datum {
  const edge = orDefault(hardware(axis, "driver", "switching_edge_ns"), 0);
  if (edge.value === 0) return given(0, edge.assumed);
  const parts = gather({
    current,
    edge,
    voltage: supplyVoltage(axis),
    frequency: hardware(axis, "driver", "chopping_frequency_hz"),
  });
  if (!parts.ok) return parts;
  const { voltage, frequency } = parts.values;
  const peakCurrent = peakFromRms(parts.values.current);
  const loss = switchingLoss({ voltage, peakCurrent, edge: parts.values.edge * 1e-9, frequency });
  return given(loss, parts.assumed);
}

export const DRIVER_POWER: QuantityDefinition = {
  reads: [
    "driver.rds_on_ohm",
    "driver.rds_on_at_c",
    "driver.quiescent_power_w",
    "driver.switching_edge_ns",
    "driver.chopping_frequency_hz",
    "driver.junction_to_ambient_k_per_w",
    "supply.voltage_v",
    "machine.ambient_c",
    "machine.enclosure_rise_k",
  ],
  from: ["winding_current_rms"],
  compute: (axis) => {
    const thermal = hardware(axis, "driver", "junction_to_ambient_k_per_w");
    return thermal.ok ? settledDriverPower(axis, thermal) : coolDriverPower(axis, thermal.needs);
  },
};

function losses(axis: AxisView) {
  const current = axis.quantity("winding_current_rms");
  return {
    current,
    onResistance: hardware(axis, "driver", "rds_on_ohm"),
    quiescent: hardware(axis, "driver", "quiescent_power_w"),
    switching: switching(axis, current),
  };
}

/** Loss at the temperature at which the on-resistance is stated, where the thermal resistance is not known. */
function coolDriverPower(axis: AxisView, thermalPath: readonly string[]): Computed {
  const parts = gather(losses(axis));
  if (!parts.ok) return parts;
  const { current, onResistance, quiescent, switching: edges } = parts.values;
  const power = conductionLoss({ current, onResistance }) + quiescent + edges;
  return computed(
    power,
    merged(parts.assumed, thermalPath),
    () =>
      `2 · (${showRms(current)})² · ${show(onResistance, "Ω")} + ${show(quiescent + edges, "W")} = ${show(power, "W")}`,
  );
}

function settledDriverPower(axis: AxisView, thermal: Datum): Computed {
  const parts = gather({
    ...losses(axis),
    statedAt: hardware(axis, "driver", "rds_on_at_c"),
    thermal,
    ambient: driverAmbient(axis),
  });
  if (!parts.ok) return parts;
  const { current, onResistance, quiescent, switching: edges, statedAt } = parts.values;
  const settled = driverSteadyState({
    conduction: conductionLoss({ current, onResistance }),
    conductionAt: statedAt,
    constant: quiescent + edges,
    thermalResistance: parts.values.thermal,
    ambient: parts.values.ambient,
  });
  if (!settled) return DRIVER_RUNAWAY;
  return computed(
    settled.power,
    parts.assumed,
    () =>
      `2 · (${showRms(current)})² · ${show(onResistance, "Ω")} · (1 + 0.005/K · (${show(settled.junction, "°C")} − ${show(statedAt, "°C")})) + ${show(quiescent + edges, "W")} = ${show(settled.power, "W")}`,
  );
}

const DRIVER_RUNAWAY: Computed = {
  ok: false,
  needs: [],
  reason: "The driver never settles: its loss grows faster with temperature than its heat leaves.",
  runaway: true,
};

export const DRIVER_JUNCTION: QuantityDefinition = {
  reads: ["driver.junction_to_ambient_k_per_w", "machine.ambient_c", "machine.enclosure_rise_k"],
  from: ["driver_power"],
  compute: (axis) => {
    const parts = gather({
      ambient: driverAmbient(axis),
      thermal: hardware(axis, "driver", "junction_to_ambient_k_per_w"),
      power: axis.quantity("driver_power"),
    });
    if (!parts.ok) return parts;
    const { ambient, thermal, power } = parts.values;
    const junction = ambient + thermal * power;
    return computed(
      junction,
      parts.assumed,
      () => `${show(ambient, "°C")} + ${plain(thermal)} K/W · ${show(power, "W")} = ${show(junction, "°C")}`,
    );
  },
};

/** Where `over` of the junction begins, °C: the policy's limit, or the junction's own less 25 K. */
export function junctionLimit(axis: AxisView): Datum {
  const own = hardware(axis, "driver", "junction_limit_c");
  return own.ok
    ? { ...own, value: Math.min(axis.policy.junction_limit_c, own.value - JUNCTION_RESERVE) }
    : own;
}

const JUNCTION_RESERVE = 25;

/** What the driver may carry in this air, however large the board's rating is. */
export const DRIVER_CURRENT_LIMIT: QuantityDefinition = {
  reads: [
    "driver.rds_on_ohm",
    "driver.rds_on_at_c",
    "driver.quiescent_power_w",
    "driver.switching_edge_ns",
    "driver.chopping_frequency_hz",
    "driver.junction_to_ambient_k_per_w",
    "driver.junction_limit_c",
    "supply.voltage_v",
    "machine.ambient_c",
    "machine.enclosure_rise_k",
  ],
  from: [],
  compute: (axis) => {
    const parts = gather({
      onResistance: hardware(axis, "driver", "rds_on_ohm"),
      onResistanceAt: hardware(axis, "driver", "rds_on_at_c"),
      quiescent: hardware(axis, "driver", "quiescent_power_w"),
      // Switching loss grows in proportion to the current.
      switchingPerAmpere: switching(axis, given(1)),
      thermalResistance: hardware(axis, "driver", "junction_to_ambient_k_per_w"),
      ambient: driverAmbient(axis),
      junction: junctionLimit(axis),
    });
    if (!parts.ok) return parts;
    const current = highestDriverCurrent(parts.values);
    const { ambient, junction, thermalResistance } = parts.values;
    return computed(
      current,
      parts.assumed,
      () =>
        `(${show(junction, "°C")} − ${show(ambient, "°C")}) / ${plain(thermalResistance)} K/W carried away: ${showRms(current)}`,
    );
  },
};
