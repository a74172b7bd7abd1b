/**
 * Lowest peak current, A, that a slow-decay chopper can regulate: t·f·V/R; shortest on-time t in s, chopping
 * frequency f in Hz, V in V, winding R in Ω at 20 °C. Source: TRINAMIC TMC2209 data sheet Rev. 1.03, sec. 6.3.1.
 */
export function lowestCurrent(input: {
  readonly onTime: number;
  readonly frequency: number;
  readonly voltage: number;
  readonly resistance: number;
}): number {
  return (input.onTime * input.frequency * input.voltage) / input.resistance;
}

/**
 * Share of the peak value (current, or torque) that the first microstep from zero asks for: sin(90°/N), N microsteps
 * in a full step, 1 or more. Source: Micromo/Faulhaber, Microstepping: Myths and Realities, table 1.
 */
export function firstMicrostepShare(microsteps: number): number {
  return Math.sin(Math.PI / (2 * microsteps));
}

/**
 * Microsteps that pass before a load with friction begins to move: (N/90°)·asin(T_f/T); N microsteps in a full step,
 * friction torque T_f and holding torque T in N·m. Infinity where friction holds the rotor at any angle.
 * Source: torque of k microsteps, T·sin(k·90°/N) (Micromo/Faulhaber, Microstepping: Myths and Realities).
 */
export function microstepsToMove(input: {
  readonly microsteps: number;
  readonly friction: number;
  readonly holdingTorque: number;
}): number {
  const share = input.friction / input.holdingTorque;
  return share <= 1 ? (input.microsteps * Math.asin(share)) / (Math.PI / 2) : Infinity;
}
