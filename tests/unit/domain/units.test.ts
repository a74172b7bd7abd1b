import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  canonicalUnit,
  formatNumber,
  insideUnit,
  showQuantity,
  showText,
  unitDimension,
  unitFactor,
  unitsOf,
  type Dimension,
  type UnitContext,
} from "@/lib/domain/units";

const LINEAR: UnitContext = { kind: "linear" };
const ROTARY: UnitContext = { kind: "rotary" };

function factor(unit: string, dimension: Dimension, context = LINEAR): number {
  const conversion = unitFactor(unit, dimension, context);
  if (!conversion.ok) throw new Error(conversion.reason);
  return conversion.value;
}

describe("the factor of a unit", () => {
  it.each<[string, Dimension, number]>([
    ["in", "length", 2.54e-2],
    ["in/s", "speed", 2.54e-2],
    ["in/min", "speed", 2.54e-2 / 60],
    ["oz·in", "torque", 7.061552e-3],
    ["lb·in", "torque", 1.129848e-1],
  ])("%s is that of NIST SP 811 (2008), Appendix B.8, to its seven digits", (unit, dimension, value) => {
    expect(Math.abs(factor(unit, dimension) / value - 1)).toBeLessThan(5e-7);
  });

  it.each<[string, Dimension, number]>([
    ["deg", "length", 1.745329e-2],
    ["deg/s", "speed", 1.745329e-2],
    ["rpm", "speed", 1.047198e-1],
  ])("%s of a rotary axis is that of NIST SP 811 (2008), Appendix B.8", (unit, dimension, value) => {
    expect(Math.abs(factor(unit, dimension, ROTARY) / value - 1)).toBeLessThan(5e-7);
  });

  it("in·lb and in·oz follow exactly from inch, pound and standard gravity (NIST SP 811, B.8; SI Brochure 9th ed.)", () => {
    const poundForce = 0.45359237 * 9.80665;
    expect(factor("lb·in", "torque") / (poundForce * 0.0254)).toBeCloseTo(1, 12);
    expect(factor("oz·in", "torque") / ((poundForce / 16) * 0.0254)).toBeCloseTo(1, 12);
  });

  it.each<[string, Dimension, number]>([
    ["A", "current", 1],
    ["mA", "current", 1e-3],
    ["V", "voltage", 1],
    ["mV", "voltage", 1e-3],
    ["Ω", "resistance", 1],
    ["mΩ", "resistance", 1e-3],
    ["m", "length", 1],
    ["mm", "length", 1e-3],
    ["µm", "length", 1e-6],
    ["mm/s", "speed", 1e-3],
    ["mm/min", "speed", 1e-3 / 60],
    ["m/s", "speed", 1],
    ["m/min", "speed", 1 / 60],
    ["mm/s²", "acceleration", 1e-3],
    ["m/s²", "acceleration", 1],
    ["mm/s³", "jerk", 1e-3],
    ["m/s³", "jerk", 1],
    ["1/mm", "scale", 1],
    ["s", "time", 1],
    ["ms", "time", 1e-3],
    ["µs", "time", 1e-6],
    ["ns", "time", 1e-9],
    ["Hz", "frequency", 1],
    ["kHz", "frequency", 1e3],
    ["%", "share", 1e-2],
    ["N·m", "torque", 1],
    ["N·cm", "torque", 1e-2],
    ["mN·m", "torque", 1e-3],
    ["g·cm²", "inertia", 1e-7],
    ["kg·m²", "inertia", 1],
    ["H", "inductance", 1],
    ["mH", "inductance", 1e-3],
  ])(
    "%s follows from its prefix and the minute of 60 s (SI Brochure, 9th ed., tables 7 and 8)",
    (unit, dimension, value) => {
      expect(factor(unit, dimension)).toBeCloseTo(value, 15);
    },
  );

  it("in steps is that of one step", () => {
    expect(factor("steps/s", "speed", { kind: "linear", stepsPerUnit: 80_000 })).toBeCloseTo(1 / 80_000, 15);
    expect(factor("steps/s²", "acceleration", { kind: "rotary", stepsPerUnit: 500 })).toBeCloseTo(
      1 / 500,
      15,
    );
    expect(unitFactor("steps/s", "speed", LINEAR)).toMatchObject({ ok: false, code: "scale-missing" });
    expect(unitFactor("steps/s", "speed", ROTARY)).toMatchObject({
      reason: "“steps/s” needs the steps per degree.",
    });
  });

  it("in motor turns a minute is that of the travel of a turn", () => {
    expect(factor("rpm", "speed", { kind: "linear", travelPerTurn: 0.04 })).toBeCloseTo(0.04 / 60, 15);
    expect(unitFactor("rpm", "speed", LINEAR)).toMatchObject({ ok: false, code: "scale-missing" });
  });

  it("is refused for another dimension, another kind of axis, or an unknown unit", () => {
    expect(unitFactor("mA", "speed", LINEAR)).toMatchObject({ ok: false, code: "wrong-unit" });
    expect(unitFactor("deg/s", "speed", LINEAR)).toMatchObject({ ok: false, code: "wrong-unit" });
    expect(unitFactor("mm/s", "speed", ROTARY)).toMatchObject({ ok: false, code: "wrong-unit" });
    expect(unitFactor("furlong", "length", LINEAR)).toMatchObject({
      ok: false,
      code: "unknown-unit",
      reason: "The unit “furlong” is not known.",
    });
    expect(unitFactor("__proto__", "length", LINEAR)).toMatchObject({ ok: false, code: "unknown-unit" });
  });
});

describe("the spelling of a unit", () => {
  it.each([
    ["ohm", "Ω"],
    ["mohm", "mΩ"],
    ["\u2126", "Ω"],
    ["um", "µm"],
    ["us", "µs"],
    ["\u03bcs", "µs"],
    ["mm/s^2", "mm/s²"],
    ["mm/s2", "mm/s²"],
    ["m/s^3", "m/s³"],
    ["steps/mm", "1/mm"],
    ["steps/deg", "1/deg"],
    ["N.m", "N·m"],
    ["Nm", "N·m"],
    ["oz-in", "oz·in"],
    ["gcm2", "g·cm²"],
    [" mA ", "mA"],
  ])("%s is %s in the house", (written, house) => expect(canonicalUnit(written)).toBe(house));

  it("has its case: mA is none of MA, Ma and ma", () => {
    expect(["MA", "Ma", "ma", "hz", "MM", ""].map(canonicalUnit)).toEqual([
      null,
      null,
      null,
      null,
      null,
      null,
    ]);
  });

  it.each(
    "A mA V mV ohm Ω mohm mΩ mm m µm um in deg rad mm/s mm/min m/s m/min in/s in/min deg/s rad/s rpm steps/s mm/s^2 mm/s² m/s^2 deg/s^2 steps/s^2 mm/s^3 steps/mm 1/mm steps/deg s ms us µs ns Hz kHz % N·m N·cm mN·m oz·in lb·in g·cm² kg·m² mH".split(
      " ",
    ),
  )("%s is known, as the interface of the check says", (unit) => expect(unitDimension(unit)).not.toBeNull());

  it("of each dimension includes the one that is kept inside", () => {
    const dimensions: Dimension[] = [
      "current",
      "voltage",
      "resistance",
      "length",
      "speed",
      "acceleration",
      "jerk",
      "scale",
      "time",
      "frequency",
      "torque",
      "inertia",
      "inductance",
    ];
    for (const kind of ["linear", "rotary"] as const)
      for (const dimension of dimensions) {
        expect(unitsOf(dimension, kind)).toContain(insideUnit(dimension, kind));
        expect(factor(insideUnit(dimension, kind), dimension, { kind })).toBe(1);
      }
    expect(unitsOf("speed", "linear")).not.toContain("deg/s");
    expect(unitsOf("speed", "rotary")).not.toContain("mm/s");
  });
});

describe("a number on a page", () => {
  it.each([
    [0, 3, "0"],
    [-0, 3, "0"],
    [1, 3, "1"],
    [0.8, 3, "0.8"],
    [0.8004, 3, "0.8"],
    [1.005, 4, "1.005"],
    [9.9999, 3, "10"],
    [99.96, 3, "100"],
    [100, 3, "100"],
    [1234.56, 3, "1235"],
    [1234.56, 6, "1234.56"],
    [120, 2, "120"],
    [10, 1, "10"],
    [0.000123456, 3, "0.000123"],
    [0.0000123456, 3, "1.23e-5"],
    [0.00005, 3, "5e-5"],
    [12345678, 3, "1.23e+7"],
    [1e10, 3, "1e+10"],
    [2e10, 1, "2e+10"],
    [1.05e7, 3, "1.05e+7"],
    [-0.333333, 3, "-0.333"],
    [Infinity, 3, "–"],
    [NaN, 3, "–"],
  ])("%d with %d digits is %s", (value, digits, text) => expect(formatNumber(value, digits)).toBe(text));

  it("is within half a unit of its last digit, and has no needless zero", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e9, max: 1e9, noNaN: true }),
        fc.integer({ min: 1, max: 9 }),
        (value, digits) => {
          const text = formatNumber(value, digits);
          const allowed = Math.max(0.5 * 10 ** (1 - digits) * Math.abs(value), Number.MIN_VALUE);
          expect(Math.abs(Number(text) - value)).toBeLessThanOrEqual(allowed * 1.0001);
          expect(text).not.toMatch(/\.\d*0(e|$)|\.(e|$)/);
        },
      ),
    );
  });
});

describe("a quantity on a page", () => {
  it.each([
    [0.25, "m/s", "250 mm/s"],
    [3, "m/s²", "3000 mm/s²"],
    [0.4125, "m", "413 mm"],
    [Math.PI, "rad", "180 deg"],
    [0.8, "A", "0.8 A"],
    [100_000, "Hz", "100 kHz"],
    [999, "Hz", "999 Hz"],
    [0.45, "N·m", "450 mN·m"],
    [1.2, "N·m", "1.2 N·m"],
    [0, "s", "0 s"],
    [0.002, "s", "2 ms"],
    [1.9e-6, "s", "1.9 µs"],
    [2e-8, "s", "20 ns"],
    [0.99996, "s", "1 s"],
    [-0.25, "s", "-250 ms"],
    [80, "1/mm", "80 1/mm"],
    [45, "%", "45 %"],
    [16, "", "16"],
  ])("%d %s is %s", (value, unit, text) => expect(showText(value, unit)).toBe(text));

  it("has its number and its unit apart", () => {
    expect(showQuantity(0.25, "m/s")).toEqual({ number: "250", unit: "mm/s" });
  });
});
