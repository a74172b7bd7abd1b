/** Turns that count. */
export const RUNS = 7;
const WARM_UP = 3;

function timeOf(work: () => unknown): number {
  const start = performance.now();
  work();
  return performance.now() - start;
}

function median(times: readonly number[]): number {
  return [...times].sort((a, b) => a - b)[times.length >> 1] ?? NaN;
}

/** Medians in milliseconds of two works that take turns, so that a busy machine slows both alike. The first turns do not count. */
export function medianTimes(one: () => unknown, other: () => unknown): [number, number] {
  const turns = Array.from({ length: WARM_UP + RUNS }, () => [timeOf(one), timeOf(other)] as const).slice(
    WARM_UP,
  );
  return [median(turns.map(([time]) => time)), median(turns.map(([, time]) => time))];
}
