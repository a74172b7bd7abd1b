import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { diffParameters } from "@/lib/diff/parameters";
import type { ParameterValue } from "@/lib/domain/values";

function value(
  axis: string | null,
  parameter: ParameterValue["parameter"],
  amount: number,
  more: Partial<ParameterValue> = {},
): ParameterValue {
  return {
    axis,
    parameter,
    value: amount,
    unit: "",
    basis: null,
    typed: { value: amount, unit: null },
    source: { path: "a.conf", line: 1, column: 1, start: 0, end: 1, raw: String(amount), key: "k" },
    ...more,
  };
}

const rms = (amount: number) => value("x", "run_current", amount, { unit: "A", basis: "rms" });
const peak = (amount: number) => value("x", "run_current", amount, { unit: "A", basis: "peak" });

describe("two values", () => {
  it.each([
    ["the same number", rms(0.8), rms(0.8)],
    ["another spelling", rms(0.8), { ...rms(0.8), typed: { value: 800, unit: "mA" } }],
    ["a rounding in the last place", rms(0.8), rms(0.8 * (1 + 1e-10))],
    ["peak and rms of one current", rms(1), peak(Math.SQRT2)],
    ["peak and rms of one current, written with six digits", rms(0.9), peak(1.27279)],
    ["nothing", value("x", "travel_min", 0), value("x", "travel_min", -0)],
    ["another case of the axis", rms(1), { ...rms(1), axis: "X" }],
  ])("that are %s are no change", (_, was, toBe) => expect(diffParameters([was], [toBe])).toEqual([]));

  it.each([
    ["another number", rms(0.8), rms(1), 0.25],
    ["a smaller number", rms(0.8), rms(0.6), -0.25],
    ["a small difference", rms(1), rms(1 + 1e-8), 1e-8],
    ["the same number in another basis", rms(1), peak(1), Math.SQRT1_2 - 1],
    ["the same number whose basis is now known", { ...rms(1), basis: null }, rms(1), null],
    [
      "a share and a current",
      value("x", "hold_current", 50, { unit: "%" }),
      value("x", "hold_current", 0.4, { unit: "A", basis: "rms" }),
      null,
    ],
    ["a number after nothing", value("x", "travel_min", 0), value("x", "travel_min", 1), null],
    ["a step away from below", value("x", "travel_min", -2), value("x", "travel_min", -1), 0.5],
  ])("that are %s are a change", (_, was, toBe, change) => {
    const [found, ...more] = diffParameters([was], [toBe]);
    expect(more).toEqual([]);
    expect(found).toMatchObject({ axis: toBe.axis, parameter: toBe.parameter, was, toBe });
    if (change === null) expect(found?.change).toBeNull();
    else expect(found?.change).toBeCloseTo(change, 12);
  });
});

describe("parameters", () => {
  it("that come or go have one side", () => {
    const [gone, come] = diffParameters([rms(1)], [value("x", "microsteps", 16)]);
    expect(gone).toMatchObject({ parameter: "run_current", toBe: null, change: null });
    expect(come).toMatchObject({ parameter: "microsteps", was: null, change: null });
  });

  it("come by axis as they first appear, then in the order of the parameter list", () => {
    const before = [value("y", "jerk", 1), value(null, "supply_voltage", 24), value("x", "microsteps", 8)];
    const after = [value("z", "jerk", 1), value("x", "run_current", 1), value("y", "run_current", 1)];
    expect(diffParameters(before, after).map(({ axis, parameter }) => [axis, parameter])).toEqual([
      ["y", "run_current"],
      ["y", "jerk"],
      [null, "supply_voltage"],
      ["x", "run_current"],
      ["x", "microsteps"],
      ["z", "jerk"],
    ]);
  });

  it("are no change of themselves, and change back by the opposite", () => {
    const some = fc.array(
      fc.tuple(
        fc.constantFrom("x", "y", null),
        fc.constantFrom("jerk", "acceleration", "microsteps"),
        fc.double({ min: -1e6, max: 1e6, noNaN: true }),
      ),
    );
    const values = some.map((rows) =>
      rows.map(([axis, parameter, amount]) => value(axis, parameter as "jerk", amount)),
    );
    fc.assert(
      fc.property(values, values, (one, other) => {
        expect(diffParameters(one, one)).toEqual([]);
        const there = diffParameters(one, other);
        const back = diffParameters(other, one);
        expect(back).toHaveLength(there.length);
        for (const { axis, parameter, was, toBe } of there)
          expect(back).toContainEqual(expect.objectContaining({ axis, parameter, was: toBe, toBe: was }));
      }),
    );
  });
});
