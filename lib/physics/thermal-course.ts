/**
 * Current of a duty cycle that heats as much as the cycle does, A rms: √(d·I² + (1 − d)·I_h²); d share of the time moving
 * (0 to 1) at run current I, the rest standing on hold current I_h, both A rms. Holds for cycles much shorter than the
 * thermal time constant, when the mean loss alone counts. Source: Joule's law, mean of the loss.
 */
export function dutyCurrent(input: {
  readonly runCurrent: number;
  readonly holdCurrent: number;
  readonly share: number;
}): number {
  const { runCurrent, holdCurrent, share } = input;
  return Math.sqrt(share * runCurrent ** 2 + (1 - share) * holdCurrent ** 2);
}

/**
 * Time, s, until a temperature is passed on the way from T0 to T∞ (°C): τ·ln((T∞ − T0)/(T∞ − T)). 0 where T0 is there
 * already, null where T∞ never gets there. τ in s. Source: first-order heating solved for t.
 */
export function timeToReach(input: {
  readonly start: number;
  readonly settled: number;
  readonly temperature: number;
  readonly timeConstant: number;
}): number | null {
  const { start, settled, temperature, timeConstant } = input;
  if (start >= temperature) return 0;
  if (settled <= temperature) return null;
  return timeConstant * Math.log((settled - start) / (settled - temperature));
}
