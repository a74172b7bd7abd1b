/**
 * Burn threshold of bare metal, °C, by time of contact in s: 65 at 1 s, 56 at 10 s, 51 at 1 min, 48 at 10 min, 43 at 8 h;
 * between them in proportion to the logarithm of the time. Source: ISO 13732-1 (from memory; the standard gives
 * thresholds for contacts from 0.5 s and sets no limits).
 */
const THRESHOLDS: readonly (readonly [number, number])[] = [
  [1, 65],
  [10, 56],
  [60, 51],
  [600, 48],
  [28_800, 43],
];

/**
 * How long, s, bare metal of a temperature (°C) may be touched before it burns; null where no length of touch burns,
 * 0 above the threshold of one second. Source: `THRESHOLDS` read the other way round.
 */
export function touchTime(temperature: number): number | null {
  const [first] = THRESHOLDS;
  if (first === undefined || temperature > first[1]) return 0;
  for (let index = 1; index < THRESHOLDS.length; index++) {
    const [early, late] = [THRESHOLDS[index - 1], THRESHOLDS[index]];
    if (early === undefined || late === undefined || temperature < late[1]) continue;
    const share = (early[1] - temperature) / (early[1] - late[1]);
    return early[0] * (late[0] / early[0]) ** share;
  }
  return null;
}
