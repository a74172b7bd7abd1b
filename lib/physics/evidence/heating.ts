/**
 * Temperature, °C, a time t (s) after the current was switched on: T0 + (T∞ − T0)·(1 − e^(−t/τ)), T0 at the start, T∞
 * settled, τ thermal time constant in s > 0. One body alone: a winding runs ahead of it in the first minutes.
 * Source: first-order heating; IEC 60034-1 takes a test as settled below 1 K in 30 min.
 */
export function temperatureAfter(input: {
  readonly start: number;
  readonly settled: number;
  readonly time: number;
  readonly timeConstant: number;
}): number {
  const { start, settled, time, timeConstant } = input;
  return start + (settled - start) * -Math.expm1(-time / timeConstant);
}
