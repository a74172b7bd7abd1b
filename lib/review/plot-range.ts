const STEPS = [1, 1.5, 2, 2.5, 3, 4, 5, 6, 8, 10] as const;

/** The smallest round number that is no smaller: 1, 1.5, 2, 2.5, 3, 4, 5, 6 or 8 times a power of ten. 1 for nothing. */
export function roundUp(value: number): number {
  if (!(value > 0) || !Number.isFinite(value)) return 1;
  const power = 10 ** Math.floor(Math.log10(value));
  const step = STEPS.find((one) => one * power >= value * (1 - 1e-9)) ?? 10;
  return step * power;
}

/** Round numbers from `low` to `high`, about `count` of them, both ends within; for the scale of a picture. */
export function roundTicks(low: number, high: number, count: number): number[] {
  const span = high - low;
  if (!(span > 0) || !Number.isFinite(span)) return [];
  const raw = span / Math.max(1, count);
  const power = 10 ** Math.floor(Math.log10(raw));
  const step = ([1, 2, 2.5, 5, 10].find((one) => one * power >= raw * (1 - 1e-9)) ?? 10) * power;
  const first = Math.ceil(low / step - 1e-9);
  const last = Math.floor(high / step + 1e-9);
  return Array.from({ length: last - first + 1 }, (_, index) =>
    Number(((first + index) * step).toPrecision(12)),
  );
}

/**
 * Values from 0 to `end` in even steps, with further places put in: at a place where a curve jumps, the place itself and
 * one just behind it.
 */
export function samplePlaces(end: number, count: number, jumps: readonly number[]): number[] {
  const even = Array.from({ length: count + 1 }, (_, index) => (end * index) / count);
  const extra = jumps.flatMap((at) => (at > 0 && at < end ? [at, at * (1 + 1e-6)] : []));
  return [...new Set([...even, ...extra])].sort((one, other) => one - other);
}
