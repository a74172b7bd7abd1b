/** Up to `count` steps from one end to the other and the first one itself, evenly apart; both ends are among them. */
export function samples(from: number, to: number, count: number): number[] {
  const steps = Math.min(count, Math.abs(to - from));
  return Array.from(
    { length: steps + 1 },
    (_, step) => from + Math.round(((to - from) * step) / (steps || 1)),
  );
}
