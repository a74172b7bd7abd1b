import { copperFactor } from "./motor-heat";

/** Highest supply voltage, V: V·(1 + tolerance), tolerance a share of 1. Source: definition of the tolerance. */
export function highestSupplyVoltage(voltage: number, tolerance: number): number {
  return voltage * (1 + tolerance);
}

/** Kinetic energy, J: ½·m·v² (kg, m/s) or ½·J·ω² (kg·m², rad/s). Source: mechanics. */
export function kineticEnergy(mass: number, speed: number): number {
  return 0.5 * mass * speed ** 2;
}

/**
 * Bus voltage, V, after a capacitor C (F) at V (V) took the energy E (J): √(V² + 2·E/C). The worst case: nothing is
 * lost in copper, friction or the supply. Source: energy of a capacitor; same form in Servotronix CDHD2S manual p. 96.
 */
export function voltageAfterBraking(input: {
  readonly voltage: number;
  readonly energy: number;
  readonly capacitance: number;
}): number {
  return Math.sqrt(input.voltage ** 2 + (2 * input.energy) / input.capacitance);
}

/**
 * Power, W, that motors feed back into the supply while a load goes down: (F·η)·v − losses, 0 where the losses take it
 * all. F what pulls the load down less its friction, N (N·m); v speed, m/s (rad/s); η efficiency, 0 to 1; losses of all
 * copper and drivers, W. Source: balance of power.
 */
export function loweringPower(input: {
  readonly pull: number;
  readonly speed: number;
  readonly efficiency: number;
  readonly losses: number;
}): number {
  return Math.max(0, input.pull * input.speed * input.efficiency - input.losses);
}

/**
 * Energy, J, that comes back over a travel d (m, rad) at the speed v (m/s, rad/s) with the power P (W): P·d/v, 0 at
 * standstill. The whole way at v leaves the losses least time. Source: work is power over time.
 */
export function loweringEnergy(input: {
  readonly power: number;
  readonly speed: number;
  readonly travel: number;
}): number {
  return input.power > 0 ? (input.power * input.travel) / input.speed : 0;
}

/**
 * Supply voltage over the voltage of the winding's resistance at rated current, no unit: V/(I_r·R); V in V, I_r in A rms,
 * R in Ω at 20 °C. 5 to 25 is usual (common practice, no source); 4, a 3 V motor on 12 V, is in daily use.
 */
export function overdriveRatio(input: {
  readonly voltage: number;
  readonly ratedCurrent: number;
  readonly resistance: number;
}): number {
  return input.voltage / (input.ratedCurrent * input.resistance);
}

/**
 * Supply voltage, V, up to which a motor of inductance L (mH) is usually run: 32·√L. A rule about the motor's iron heat;
 * it never stands above the driver's own limit. Common practice, no source.
 */
export function inductanceRuleVoltage(inductanceMillihenry: number): number {
  return 32 * Math.sqrt(inductanceMillihenry);
}

/**
 * Power that a supply has to deliver, W: (Σ copper + Σ drivers + Σ mechanical + other)/η; all in W, η the share that
 * arrives (iron, wiring and switching losses take the rest), 0 to 1. Source: balance of power.
 */
export function supplyLoad(input: {
  readonly copper: number;
  readonly drivers: number;
  readonly mechanical: number;
  readonly other: number;
  readonly efficiency: number;
}): number {
  return (input.copper + input.drivers + input.mechanical + input.other) / input.efficiency;
}

/**
 * Voltage lost on a cable of two conductors, V: 2·l·R'·I·(234.5 + T)/254.5; l in m, R' of one conductor in Ω/km at
 * 20 °C, I in A, T in °C. Source: Ohm's law; R' after IEC 60228 class 5: 39.0 (0.5 mm²), 26.0 (0.75), 19.5 (1.0),
 * 13.3 (1.5), 7.98 (2.5) Ω/km.
 */
export function cableDrop(input: {
  readonly length: number;
  readonly ohmPerKm: number;
  readonly current: number;
  readonly temperature: number;
}): number {
  const loop = (2 * input.length * input.ohmPerKm) / 1000;
  return loop * input.current * copperFactor(input.temperature);
}
