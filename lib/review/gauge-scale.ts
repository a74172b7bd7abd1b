import type { LimitSense } from "@/lib/domain/findings";

/** A value against its limit, with the value before the change where there is one. All in one unit. */
export interface GaugeReading {
  readonly value: number | null;
  readonly before?: number | null | undefined;
  /** Where *over* begins; null for a check without a limit. */
  readonly limit: number | null;
  /** Where *near* begins. */
  readonly nearLimit?: number | null | undefined;
  readonly sense: LimitSense;
}

/**
 * One scale for every gauge of a table, whatever the units: 0 is the left end and 1 the limit, so that all limits
 * stand in one line and the right is always the bad side. `end` is the right end, in the same measure.
 */
export interface GaugeScale {
  readonly end: number;
}

/** A place on a gauge: 0 is its left end, 1 its right end; `beyond` where the true place lies off an end. */
export interface GaugePlace {
  readonly at: number;
  readonly beyond: "low" | "high" | null;
}

const ENDS = [1.5, 2, 3, 4] as const;

/** What the scale is pinned to: the limit, or where `near` begins for a check that is never over. */
export function gaugeMark(reading: GaugeReading): number | null {
  return reading.limit ?? reading.nearLimit ?? null;
}

/**
 * How far a value has gone towards its mark, without a unit: 1 at the mark, more beyond it on the bad side, 0 as far
 * on the good side as the mark is from zero. Linear in the value. Null where there is no mark or the mark is 0.
 */
export function gaugeUse(value: number, reading: GaugeReading): number | null {
  const mark = gaugeMark(reading);
  if (mark === null || mark === 0 || !Number.isFinite(value)) return null;
  const excess = (value - mark) / Math.abs(mark);
  return reading.sense === "lower" ? 1 - excess : 1 + excess;
}

/** The narrowest scale that holds every value of a table, to four times the limit. */
export function gaugeScale(readings: readonly GaugeReading[]): GaugeScale {
  const uses = readings.flatMap((reading) =>
    [reading.value, reading.before].map((value) =>
      value === null || value === undefined ? null : gaugeUse(value, reading),
    ),
  );
  const furthest = Math.max(0, ...uses.map((use) => use ?? 0));
  return { end: ENDS.find((end) => furthest <= end) ?? 4 };
}

/** Where a use (see `gaugeUse`) stands on a scale. */
export function gaugePlace(use: number, scale: GaugeScale): GaugePlace {
  if (use < 0) return { at: 0, beyond: "low" };
  if (use > scale.end) return { at: 1, beyond: "high" };
  return { at: use / scale.end, beyond: null };
}
