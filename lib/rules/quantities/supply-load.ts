import { windingPower } from "@/lib/physics/motor-heat";
import { cableDrop, supplyLoad } from "@/lib/physics/supply";
import {
  bothMissing,
  computed,
  fromText,
  gather,
  given,
  hardware,
  merged,
  missing,
  motorCount,
} from "../data";
import { plain, show } from "../show";
import type { AxisView, Datum, RuleContext } from "../types";
import { CONNECTION_READS } from "./current";
import type { MachineQuantityDefinition } from "./definition";
import { GEOMETRY_READS, radius } from "./geometry";
import { shaftInertia } from "./load";
import { coupledPairs, motorsInSum, motorsTurning, sharedMotors } from "./shared-motors";

/** Share of the supply's power that reaches motors and drivers; iron and wiring take the rest. The product's choice. */
export const DELIVERED = 0.85;

interface AxisPower {
  readonly ok: true;
  readonly copper: number;
  readonly drivers: number;
  readonly mechanical: number;
  readonly assumed: readonly string[];
}

/**
 * Power at the shafts of an axis, W: n·T·ω, and for motors that it turns without counting them what their rotors take,
 * J·α·ω. T in N·m for each of n motors, v in m/s, a in m/s², r in m/rad, J in kg·m². Source: mechanics.
 */
function shaftPower(input: {
  readonly torque: number;
  readonly speed: number;
  readonly acceleration: number;
  readonly shaftInertia: number;
  readonly radius: number;
  readonly motors: number;
  readonly turning: number;
}): number {
  const { torque, speed, acceleration, radius: r, motors, turning } = input;
  const rotors = (turning - motors) * input.shaftInertia * (acceleration / r);
  return (motors * torque + rotors) * (speed / r);
}

/** Powers of the motors of an axis, those that it shares in part, at its peak speed, W, accelerating. */
function axisPower(axis: AxisView) {
  const parts = gather({
    current: axis.quantity("winding_current_rms"),
    resistance: hardware(axis, "motor", "resistance_ohm"),
    temperature: axis.quantity("winding_c"),
    driver: axis.quantity("driver_power"),
    torque: axis.quantity("torque_required"),
    speed: axis.quantity("peak_speed"),
    acceleration: fromText(axis, "acceleration"),
    shaftInertia: shaftInertia(axis),
    radius: radius(axis),
    motors: motorCount(axis),
    inSum: motorsInSum(axis),
    turning: motorsTurning(axis),
  });
  if (!parts.ok) return parts;
  const { current, resistance, temperature, driver, inSum } = parts.values;
  const power: AxisPower = {
    ok: true,
    copper: inSum * windingPower({ current, resistanceAt20: resistance, temperature }),
    drivers: inSum * driver,
    mechanical: shaftPower(parts.values),
    assumed: parts.assumed,
  };
  return power;
}

/** Drivers, copper and shafts of every axis at once; one axis with a datum missing makes it unknown. */
function machinePower({ axes }: RuleContext) {
  let sum: AxisPower = { ok: true, copper: 0, drivers: 0, mechanical: 0, assumed: [] };
  const powers = axes.map(axisPower);
  const shared = coupledPairs({ axes }).map(sharedMotors);
  const lacks = [...powers, ...shared].flatMap((part) => (part.ok ? [] : [part]));
  if (lacks.length > 0) return lacks.reduce(bothMissing);
  for (const power of powers)
    if (power.ok)
      sum = {
        ok: true,
        copper: sum.copper + power.copper,
        drivers: sum.drivers + power.drivers,
        mechanical: sum.mechanical + power.mechanical,
        assumed: merged(sum.assumed, power.assumed),
      };
  return sum;
}

function otherLoad({ input }: RuleContext): Datum {
  const other = input.assembly.supply?.other_load_w;
  return other === undefined ? given(0, ["supply.other_load_w"]) : given(other);
}

export const SUPPLY_LOAD: MachineQuantityDefinition = {
  reads: [
    "motor.resistance_ohm",
    ...CONNECTION_READS,
    ...GEOMETRY_READS,
    "axis.motor_count",
    "axis.coupled_with",
    "supply.other_load_w",
  ],
  from: ["winding_current_rms", "winding_c", "driver_power", "torque_required", "peak_speed"],
  compute: (context) => {
    const power = machinePower(context);
    if (!power.ok) return power;
    const other = otherLoad(context);
    if (!other.ok) return other;
    const { copper, drivers, mechanical } = power;
    const load = supplyLoad({ copper, drivers, mechanical, other: other.value, efficiency: DELIVERED });
    return computed(
      load,
      merged(power.assumed, other.assumed),
      () =>
        `(${show(copper, "W")} copper + ${show(drivers, "W")} drivers + ${show(mechanical, "W")} shafts + ${show(other.value, "W")} other) / ${DELIVERED} = ${show(load, "W")}`,
    );
  },
};

function cableData({ input }: RuleContext) {
  const { supply, ambient_c } = input.assembly;
  const datum = (value: number | undefined, path: string): Datum =>
    value === undefined ? missing(path) : given(value);
  return {
    voltage: datum(supply?.voltage_v, "supply.voltage_v"),
    length: datum(supply?.cable_length_m, "supply.cable_length_m"),
    ohmPerKm: datum(supply?.cable_ohm_per_km, "supply.cable_ohm_per_km"),
    temperature: datum(ambient_c, "ambient_c"),
  };
}

/** Whether anything is known of the cable at all. */
export function hasCable({ input }: RuleContext): boolean {
  const { supply } = input.assembly;
  return supply?.cable_length_m !== undefined || supply?.cable_ohm_per_km !== undefined;
}

export const CABLE_DROP: MachineQuantityDefinition = {
  reads: ["supply.voltage_v", "supply.cable_length_m", "supply.cable_ohm_per_km", "machine.ambient_c"],
  from: ["supply_load"],
  compute: (context) => {
    const cable = gather(cableData(context));
    // Without a word about the cable the rest of the machine does not matter: one quiet sentence names the cable alone.
    if (!cable.ok && !hasCable(context)) return cable;
    const parts = gather({ ...cableData(context), load: context.quantity("supply_load") });
    if (!parts.ok) return parts;
    const { voltage, length, ohmPerKm, temperature, load } = parts.values;
    const current = load / voltage;
    const drop = cableDrop({ length, ohmPerKm, current, temperature });
    return computed(
      drop,
      parts.assumed,
      () =>
        `2 · ${show(length, "m")} · ${plain(ohmPerKm)} Ω/km · ${show(load, "W")} / ${show(voltage, "V")} at ${show(temperature, "°C")} = ${show(drop, "V")}`,
    );
  },
};
