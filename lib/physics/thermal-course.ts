/**
 * Temperature, °C, after the time t (s) of constant loss: T∞ − (T∞ − T0)·e^(−t/τ); T0 at the start and T∞ settled in °C
 * (or both as a rise in K), τ > 0 the thermal time constant in s, t ≥ 0. One body of one temperature: the case of a motor
 * lags its winding, and the winding's hot spot leads its mean. Source: first-order heating (derived); τ of motors is 10 to
 * 40 min (common practice, no source).
 */
export function firstOrderTemperature(input: {
  readonly start: number;
  readonly settled: number;
  readonly time: number;
  readonly timeConstant: number;
}): number {
  const { start, settled, time, timeConstant } = input;
  return settled + (start - settled) * Math.exp(-time / timeConstant);
}

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
 * already, null where T∞ never gets there. τ in s. Source: `firstOrderTemperature` solved for t.
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
