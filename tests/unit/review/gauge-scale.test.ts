import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { gaugePlace, gaugeScale, gaugeUse, type GaugeReading } from "@/lib/review/gauge-scale";

const upper = (value: number | null, limit: number | null = 100): GaugeReading => ({
  value,
  limit,
  sense: "upper",
});
const lower = (value: number | null, limit: number | null = 1): GaugeReading => ({
  value,
  limit,
  sense: "lower",
});

describe("gaugeUse", () => {
  it("is 1 at the limit, whichever way the limit points", () => {
    expect(gaugeUse(100, upper(100))).toBe(1);
    expect(gaugeUse(1, lower(1))).toBe(1);
  });

  it("grows towards the bad side", () => {
    expect(gaugeUse(120, upper(0))).toBeCloseTo(1.2);
    expect(gaugeUse(0.83, lower(0))).toBeCloseTo(1.17);
    expect(gaugeUse(2, lower(0))).toBeCloseTo(0);
  });

  it("takes the near limit as its mark where a check is never over", () => {
    expect(gaugeUse(66, { value: 66, limit: null, nearLimit: 60, sense: "upper" })).toBeCloseTo(1.1);
  });

  it("says nothing without a mark, with a mark of 0 or for a value that is no number", () => {
    expect(gaugeUse(1, upper(1, null))).toBeNull();
    expect(gaugeUse(1, upper(1, 0))).toBeNull();
    expect(gaugeUse(Number.NaN, upper(1))).toBeNull();
  });

  it("keeps the bad side of a negative limit on the right", () => {
    expect(gaugeUse(-5, upper(-5, -10))).toBeGreaterThan(1);
    expect(gaugeUse(-15, lower(-15, -10))).toBeGreaterThan(1);
  });
});

describe("gaugeScale", () => {
  it("ends half a limit beyond the limit when nothing lies further", () => {
    expect(gaugeScale([upper(30), upper(149)])).toEqual({ end: 1.5 });
    expect(gaugeScale([])).toEqual({ end: 1.5 });
  });

  it("widens for the furthest value, the one before the change included", () => {
    expect(gaugeScale([upper(30), { ...upper(30), before: 180 }])).toEqual({ end: 2 });
    expect(gaugeScale([lower(-1)])).toEqual({ end: 3 });
  });

  it("stops at four times the limit, so that one wild value does not flatten the rest", () => {
    expect(gaugeScale([upper(30), upper(9000)])).toEqual({ end: 4 });
  });
});

describe("gaugePlace", () => {
  it("tells a value off either end", () => {
    expect(gaugePlace(-0.5, { end: 1.5 })).toEqual({ at: 0, beyond: "low" });
    expect(gaugePlace(7, { end: 4 })).toEqual({ at: 1, beyond: "high" });
  });

  it("keeps order: a worse value never stands further left", () => {
    const uses = fc.double({ min: -10, max: 10, noNaN: true });
    fc.assert(
      fc.property(uses, uses, fc.constantFrom(1.5, 2, 3, 4), (a, b, end) => {
        const [less, more] = a < b ? [a, b] : [b, a];
        expect(gaugePlace(less, { end }).at).toBeLessThanOrEqual(gaugePlace(more, { end }).at);
      }),
    );
  });
});
