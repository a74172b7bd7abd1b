import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { gaugeDrawing, gaugeText, gaugeWords } from "@/lib/review/gauge-text";

const mount = { value: 64, before: 51, limit: 58, nearLimit: 48, sense: "upper" } as const;

describe("gaugeWords", () => {
  it("says value, value before, limit and level with units", () => {
    expect(gaugeWords({ reading: mount, unit: "°C", level: "over" })).toBe(
      "64 °C, was 51 °C, limit at most 58 °C: over limit",
    );
  });

  it("calls a lower limit a least value and shows the units of the floor", () => {
    const reading = { value: 0.3, limit: 0.25, sense: "lower" } as const;
    expect(gaugeWords({ reading, unit: "m/s", level: "near" })).toBe(
      "300 mm/s, limit at least 250 mm/s: near limit",
    );
  });

  it("does not call the mark of a hint a limit", () => {
    const reading = { value: 66, limit: null, nearLimit: 60, sense: "upper" } as const;
    expect(gaugeWords({ reading, unit: "°C", level: "near" })).toBe("66 °C, near above 60 °C: near limit");
  });

  it("says that there is no value", () => {
    const reading = { value: null, limit: 58, sense: "upper" } as const;
    expect(gaugeWords({ reading, unit: "°C", level: "cannot" })).toBe(
      "no value, limit at most 58 °C: cannot check",
    );
  });
});

describe("gaugeDrawing", () => {
  it("draws line, near zone, limit, far side, both values", () => {
    expect(gaugeDrawing({ reading: mount })).toBe("[-------------o=#/*//////]");
  });

  it("shows a value off the end by an arrow", () => {
    expect(gaugeDrawing({ reading: { value: 900, limit: 100, sense: "upper" } })).toMatch(/>\]$/);
    expect(gaugeDrawing({ reading: { value: 9, limit: 1, sense: "lower" } })).toMatch(/^\[</);
  });

  it("has no far side where a check is never over", () => {
    const drawing = gaugeDrawing({ reading: { value: 66, limit: null, nearLimit: 60, sense: "upper" } });
    expect(drawing).toMatch(/^\[-+=+\*=+\]$/);
  });

  it("draws nothing without a value or a mark", () => {
    expect(gaugeDrawing({ reading: { value: null, limit: 1, sense: "upper" } })).toBeNull();
    expect(gaugeDrawing({ reading: { value: 1, limit: null, sense: null } })).toBeNull();
  });

  it("never draws a value on the wrong side of its limit, however close it is", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 1e6, noNaN: true }),
        fc.double({ min: 0, max: 5, noNaN: true }),
        fc.constantFrom("upper" as const, "lower" as const),
        (limit, share, sense) => {
          const reading = { value: limit * share, limit, sense };
          const drawing = gaugeDrawing({ reading }) ?? "";
          const isOver = sense === "upper" ? reading.value > limit : reading.value < limit;
          expect(drawing).toHaveLength(26);
          expect(drawing.search(/[*<>]/) > drawing.indexOf("#")).toBe(isOver);
        },
      ),
    );
  });
});

describe("gaugeText", () => {
  it("puts the words behind the drawing, and stands alone as words", () => {
    expect(gaugeText({ reading: mount, unit: "°C", level: "over" })).toMatch(/^\[.{24}\] 64 °C, was/);
    const bare = { value: 60, limit: null, sense: null } as const;
    expect(gaugeText({ reading: bare, unit: "Hz", level: "within" })).toBe("60 Hz: within limits");
  });
});
