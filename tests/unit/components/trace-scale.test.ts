import { describe, expect, it } from "vitest";
import { placeIn, rangeOf, roundTicks } from "@/components/axis/trace-scale";

describe("the scale of a chart over time", () => {
  it("has round ticks within its range, in steps of 1, 2 or 5", () => {
    expect(roundTicks({ low: 0, high: 10 }, 5)).toEqual([0, 2, 4, 6, 8, 10]);
    expect(roundTicks({ low: -2.4, high: 2.4 }, 4)).toEqual([-2, 0, 2]);
    expect(roundTicks({ low: 0.013, high: 0.0209 }, 4)).toHaveLength(4);
  });

  it("has one tick where the range is a point", () => {
    expect(roundTicks({ low: 3, high: 3 }, 4)).toEqual([3]);
  });

  it("leaves a twentieth of room beyond its values and places them in it", () => {
    const range = rangeOf([0, 100]);
    expect(range).toEqual({ low: -5, high: 105 });
    expect(placeIn(range, 50)).toBe(0.5);
    expect(placeIn({ low: 1, high: 1 }, 1)).toBe(0);
  });
});
