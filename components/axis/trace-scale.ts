/** Both ends of an axis of a chart. */
export interface Range {
  readonly low: number;
  readonly high: number;
}

/** Place of a value in a range as a share of 1; 0 where the range is a point. */
export function placeIn({ low, high }: Range, value: number): number {
  return high > low ? (value - low) / (high - low) : 0;
}

/** Round numbers within a range, about `count` of them, in steps of 1, 2 or 5 times a power of ten. */
export function roundTicks({ low, high }: Range, count: number): number[] {
  const rough = (high - low) / count;
  if (!(rough > 0)) return [low];
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = power * ([1, 2, 5].find((factor) => factor * power >= rough) ?? 10);
  const first = Math.ceil(low / step);
  return Array.from(
    { length: Math.floor(high / step + 1e-9) - first + 1 },
    (_, index) => (first + index) * step,
  );
}

/** Range of values with a twentieth of room at both ends. */
export function rangeOf(values: readonly number[]): Range {
  const low = values.reduce((least, value) => Math.min(least, value), Infinity);
  const high = values.reduce((most, value) => Math.max(most, value), -Infinity);
  const room = (high - low) * 0.05;
  return { low: low - room, high: high + room };
}
