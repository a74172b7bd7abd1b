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
