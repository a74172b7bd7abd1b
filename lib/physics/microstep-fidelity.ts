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
