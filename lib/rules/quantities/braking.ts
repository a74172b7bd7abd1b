import { highestSupplyVoltage, kineticEnergy, voltageAfterBraking } from "@/lib/physics/supply";
import type { Assembly } from "@/lib/domain/assembly";
import { bothMissing, computed, gather, given, merged, missing, motorCount, orDefault } from "../data";
import { plain, show } from "../show";
import type { AxisView, Datum } from "../types";
import type { MachineQuantityDefinition } from "./definition";
import { GEOMETRY_READS, radius } from "./geometry";
import { moved, MOVED_READS, shaftInertia } from "./load";
import { motorsTurning } from "./shared-motors";

/**
 * Kinetic energy of an axis at its peak speed, J: what moves, and the shafts of its motors. Motors that two axes share are
 * counted by both, and rightly: their speeds are v1 + v2 and v1 − v2, whose squares sum to 2·v1² + 2·v2². Source: mechanics.
 */
export function axisEnergy(axis: AxisView): Datum {
  const parts = gather({
    speed: axis.quantity("peak_speed"),
    moved: moved(axis),
    shaft: shaftInertia(axis),
    radius: radius(axis),
    motors: motorCount(axis),
  });
  if (!parts.ok) return parts;
  const { speed, shaft, motors } = parts.values;
  const value =
    kineticEnergy(parts.values.moved, speed) + motors * kineticEnergy(shaft, speed / parts.values.radius);
  return given(value, parts.assumed);
}

/**
 * Kinetic energy, J, of rotors that an axis turns without counting them: where two axes share two motors and each counts
 * one, half of the rotors' energy is not in the sum over the axes. 0 elsewhere, and where a datum is missing.
 * ½·(n' − n)·Jm·(v/r)², n' turning and n counted motors. Source: mechanics.
 */
export function uncountedEnergy(axis: AxisView): number {
  const parts = gather({
    speed: axis.quantity("peak_speed"),
    shaft: shaftInertia(axis),
    radius: radius(axis),
    motors: motorCount(axis),
    turning: motorsTurning(axis),
  });
  if (!parts.ok) return 0;
  const { speed, shaft, radius: r, motors, turning } = parts.values;
  return (turning - motors) * kineticEnergy(shaft, speed / r);
}

/** Kinetic energy of all axes together, J; an axis with a datum missing makes it unknown. */
function machineEnergy(axes: readonly AxisView[]): Datum {
  const energies = axes.map(axisEnergy);
  const lacks = energies.filter((energy) => !energy.ok);
  if (lacks.length > 0) return lacks.reduce(bothMissing);
  return energies.reduce<Datum>(bothTogether, given(0));
}

function bothTogether(one: Datum, other: Datum): Datum {
  if (!one.ok) return one;
  return other.ok ? given(one.value + other.value, merged(one.assumed, other.assumed)) : other;
}

function machineSupply({ supply }: Assembly) {
  const voltage = supply?.voltage_v;
  const capacitance = supply?.bus_capacitance_uf;
  const tolerance = supply?.tolerance;
  return {
    voltage: voltage === undefined ? missing("supply.voltage_v") : given(voltage),
    tolerance: orDefault(tolerance === undefined ? missing("supply.tolerance") : given(tolerance), 0.05),
    capacitance: capacitance === undefined ? missing("supply.bus_capacitance_uf") : given(capacitance),
  };
}

export const BUS_VOLTAGE_AFTER_BRAKING: MachineQuantityDefinition = {
  reads: [
    "supply.voltage_v",
    "supply.tolerance",
    "supply.bus_capacitance_uf",
    "motor.rotor_inertia_gcm2",
    "drive_train.inertia_kgm2",
    "axis.motor_count",
    ...MOVED_READS,
    ...GEOMETRY_READS,
  ],
  from: ["peak_speed"],
  compute: ({ input, axes }) => {
    const parts = gather({ ...machineSupply(input.assembly), energy: machineEnergy(axes) });
    if (!parts.ok) return parts;
    const { voltage, tolerance, capacitance } = parts.values;
    const highest = highestSupplyVoltage(voltage, tolerance);
    const after = voltageAfterBraking({
      voltage: highest,
      energy: parts.values.energy,
      capacitance: capacitance * 1e-6,
    });
    return computed(
      after,
      parts.assumed,
      () =>
        `√((${show(highest, "V")})² + 2 · ${plain(parts.values.energy)} J / ${plain(capacitance)} µF) = ${show(after, "V")}`,
    );
  },
};
