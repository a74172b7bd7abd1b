import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { KeyRule } from "@/lib/domain/key-table";
import { spellNumber } from "@/lib/keytable/spell-number";
import type { ParameterEdit } from "@/lib/keytable/types";
import { RUNS, TIMEOUT } from "../parsers/arbitrary-texts";
import { map, write, type Setting } from "./support";

const RULES: KeyRule[] = [
  { key: "{axis}.run", parameter: "run_current", unit: "mA", basis: "rms" },
  { key: "{axis}.ipk", parameter: "run_current", unit: "A", basis: "peak" },
  { key: "{axis}.any", parameter: "run_current", unit: "A" },
  { key: "{axis}.hold", parameter: "hold_current", unit: "%" },
  { key: "{axis}.ihold", parameter: "hold_current", unit: "mA", basis: "rms" },
  { key: "{axis}.accel", parameter: "acceleration", unit: "mm/s^2" },
  { key: "{axis}.v", parameter: "max_speed", unit: "steps/s" },
  { key: "{axis}.vmin", parameter: "max_speed", unit: "mm/min" },
  { key: "{axis}.rpm", parameter: "max_speed", unit: "rpm" },
  { key: "{axis}.scale", parameter: "steps_per_mm" },
  { key: "{axis}.u", parameter: "microsteps" },
  { key: "{axis}.rev", parameter: "direction_reversed" },
  { key: "steps.{axis}", parameter: "steps_per_mm" },
  { key: "all_accel", parameter: "acceleration", axis: "x", unit: "mm/s²" },
  { key: "all_accel", parameter: "acceleration", axis: "y", unit: "mm/s²" },
  { key: "supply", parameter: "supply_voltage" },
];

function setting(text: string | readonly string[], path = "a.conf"): Setting {
  return { text, rules: RULES, path };
}

function edit(
  parameter: ParameterEdit["parameter"],
  value: number,
  unit: string,
  more: Partial<ParameterEdit> = {},
): ParameterEdit {
  return { axis: "x", parameter, value, unit, ...more };
}

const RMS = { basis: "rms" } as const;
const PEAK = { basis: "peak" } as const;

describe("a wanted value", () => {
  it.each<[string, ParameterEdit, string]>([
    ["x.run = 800", edit("run_current", 0.9, "A", RMS), "x.run = 900"],
    ["x.run = 800 # hot", edit("run_current", 900, "mA", RMS), "x.run = 900 # hot"],
    ["x.run = 0.8 A", edit("run_current", 0.9, "A", RMS), "x.run = 0.9 A"],
    ["x.run = 0.80A", edit("run_current", 0.9, "A", RMS), "x.run = 0.90A"],
    ['x.run = "800 mA"', edit("run_current", 0.9, "A", RMS), 'x.run = "900 mA"'],
    ["x.run = (800)", edit("run_current", 0.9, "A", RMS), "x.run = (900)"],
    ["x.run = 0x320", edit("run_current", 0.9, "A", RMS), "x.run = 0x384"],
    ["x.run = 0X3FF", edit("run_current", 2.571, "A", RMS), "x.run = 0XA0B"],
    ["x.run = 8e2", edit("run_current", 0.9, "A", RMS), "x.run = 900"],
    ["x.run = 800.00", edit("run_current", 0.9, "A", RMS), "x.run = 900.00"],
    ["x.run = 800", edit("run_current", 0.9, "A", PEAK), "x.run = 636.396"],
    ["x.ipk = 1.0", edit("run_current", 0.9, "A", RMS), "x.ipk = 1.27279"],
    ["x.ipk = 1.0 A rms", edit("run_current", 0.9, "A", RMS), "x.ipk = 0.9 A rms"],
    ["x.any = 1.0", edit("run_current", 0.9, "A"), "x.any = 0.9"],
    ["x.accel = 3000", edit("acceleration", 2.5, "m/s²"), "x.accel = 2500"],
    ["x.accel = 3000", edit("acceleration", 2500.5, "mm/s^2"), "x.accel = 2500.5"],
    ["x.accel = 3000", edit("acceleration", 1 / 3, "m/s²"), "x.accel = 333.333"],
    ["x.accel = 3000", edit("acceleration", 12345.6789, "mm/s²"), "x.accel = 12345.6789"],
    ["x.accel = 3000", edit("acceleration", 2.5e-9, "m/s²"), "x.accel = 0.0000025"],
    ["x.accel = 3000", edit("acceleration", 3e9, "m/s²"), "x.accel = 3000000000000"],
    ["x.vmin = 6000", edit("max_speed", 0.15, "m/s"), "x.vmin = 9000"],
    ["x.rpm = 300", edit("max_speed", 0.1, "m/s"), "x.rpm = 150"],
    ["x.scale = 80\nx.v = 8000", edit("max_speed", 0.2, "m/s"), "x.scale = 80\nx.v = 16000"],
    ["x.u = 16\nx.v = 8000", edit("max_speed", 0.2, "m/s"), "x.u = 16\nx.v = 16000"],
    ["x.u = 16", edit("microsteps", 32, ""), "x.u = 32"],
    ["x.u = 1/16", edit("microsteps", 32, ""), "x.u = 1/32"],
    ["x.hold = 50 %", edit("hold_current", 40, "%"), "x.hold = 40 %"],
    ["x.run = 800\nx.hold = 50", edit("hold_current", 0.2, "A", RMS), "x.run = 800\nx.hold = 25"],
    ["x.run = 800\nx.ihold = 400", edit("hold_current", 25, "%"), "x.run = 800\nx.ihold = 200"],
    ["x.ipk = 1\nx.ihold = 400", edit("hold_current", 50, "%"), "x.ipk = 1\nx.ihold = 353.553"],
    ["steps = { 80 , 80, 26.7 }", edit("steps_per_mm", 160, "1/mm"), "steps = { 160 , 80, 26.7 }"],
    ["steps = 80 80 26.7", edit("steps_per_mm", 1600, "1/deg", { axis: "c" }), "steps = 80 80 1600.0"],
    ["x.rev = false", edit("direction_reversed", 1, ""), "x.rev = true"],
    ["x.rev = YES", edit("direction_reversed", 0, ""), "x.rev = NO"],
    ["x.rev = Off", edit("direction_reversed", 1, ""), "x.rev = On"],
    ["x.rev = 0", edit("direction_reversed", 1, ""), "x.rev = 1"],
    ["x.rev = on", edit("direction_reversed", 1, ""), "x.rev = on"],
    ["supply = 24 V", edit("supply_voltage", 36, "V", { axis: null }), "supply = 36 V"],
    ["X.RUN = 800", edit("run_current", 1, "A", { ...RMS, axis: "X" }), "X.RUN = 1000"],
  ])("in %j is written in the text's own unit, basis and spelling", (text, wanted, after) => {
    const { texts, applied, refused } = write(setting(text), wanted);
    expect(refused).toEqual([]);
    expect(texts).toEqual([after]);
    expect(applied).toHaveLength(1);
  });

  it("keeps the suffix of a C number, and the column of what stands behind it alone", () => {
    const rules: KeyRule[] = [{ key: "{axis}_ACCEL", parameter: "acceleration", unit: "mm/s^2" }];
    const text = "#define X_ACCEL (3000.0f) // mm/s2\n";
    expect(write({ text, rules, path: "a.h" }, edit("acceleration", 2, "m/s²")).texts).toEqual([
      "#define X_ACCEL (2000.0f) // mm/s2\n",
    ]);
  });

  it("goes to the place that counts: the last file, the last of two keys, the enabled one", () => {
    const { texts, applied } = write(
      setting(["x.run = 700\n", "x.run = 750\r\n# x.run = 900\r\nx.run = 800\r\n"]),
      edit("run_current", 1, "A", RMS),
    );
    expect(texts).toEqual(["x.run = 700\n", "x.run = 750\r\n# x.run = 900\r\nx.run = 1000\r\n"]);
    expect(applied).toEqual([
      { axis: "x", parameter: "run_current", path: "1-a.conf", line: 3, alsoAxes: [] },
    ]);
  });

  it("names the other axes that share its place", () => {
    const { texts, applied } = write(setting("all_accel = 3000"), edit("acceleration", 2, "m/s²"));
    expect(texts).toEqual(["all_accel = 2000"]);
    expect(applied[0]?.alsoAxes).toEqual(["Y"]);
  });

  it("may be wanted for two axes of one place, if they agree", () => {
    const both = (y: number) =>
      write(
        setting("all_accel = 3000"),
        edit("acceleration", 2, "m/s²"),
        edit("acceleration", y, "m/s²", { axis: "y" }),
      );
    expect(both(2)).toMatchObject({ texts: ["all_accel = 2000"], refused: [] });
    expect(both(2).applied).toHaveLength(2);
    expect(both(1)).toMatchObject({
      texts: ["all_accel = 2000"],
      refused: [
        {
          axis: "y",
          reason: "“all_accel” on line 1 also sets the acceleration of x, for which another value is wanted.",
        },
      ],
    });
  });

  it("in steps holds with the scale or the microsteps that are wanted with it", () => {
    expect(
      write(
        setting("x.scale = 80\nx.v = 8000"),
        edit("steps_per_mm", 160, "1/mm"),
        edit("max_speed", 0.1, "m/s"),
      ).texts,
    ).toEqual(["x.scale = 160\nx.v = 16000"]);
    expect(
      write(setting("x.u = 16\nx.v = 8000"), edit("max_speed", 0.1, "m/s"), edit("microsteps", 32, "")).texts,
    ).toEqual(["x.u = 32\nx.v = 16000"]);
  });

  it("of a hold current in % is a share of the run current that is wanted with it", () => {
    const edits = [edit("hold_current", 0.5, "A", RMS), edit("run_current", 1, "A", RMS)];
    expect(write(setting("x.run = 800\nx.hold = 50"), ...edits).texts).toEqual(["x.run = 1000\nx.hold = 50"]);
  });

  it("leaves a text alone that already says it", () => {
    const { texts, applied } = write(setting("x.run = 800.0"), edit("run_current", 0.8, "A", RMS));
    expect([texts, applied.length]).toEqual([["x.run = 800.0"], 1]);
  });
});

describe("a wanted value is refused", () => {
  it.each<[string, string, ParameterEdit, string]>([
    [
      "without a key",
      "x.u = 16",
      edit("acceleration", 1, "m/s²"),
      "The text has no key for the acceleration of x; add it to the text or the key table.",
    ],
    [
      "for an axis that is not there",
      "x.u = 16",
      edit("microsteps", 8, "", { axis: "w" }),
      "no key for the microsteps of w",
    ],
    [
      "where the key is commented out",
      "# x.u = 16",
      edit("microsteps", 8, ""),
      "no key for the microsteps of x",
    ],
    [
      "where the value cannot be read",
      "x.u = some",
      edit("microsteps", 8, ""),
      "“x.u” on line 1 gives no value that counts",
    ],
    [
      "without a basis where the text has one",
      "x.run = 800",
      edit("run_current", 1, "A"),
      "Say whether the wanted current is peak or rms.",
    ],
    [
      "with a basis where the text has none",
      "x.any = 1",
      edit("run_current", 1, "A", RMS),
      "Nobody has said whether “x.any” on line 1 is peak or rms",
    ],
    [
      "in a wrong unit",
      "x.accel = 3000",
      edit("acceleration", 1, "mm/s"),
      "“mm/s” is not a unit of acceleration",
    ],
    ["in an unknown unit", "x.accel = 3000", edit("acceleration", 1, "furlong"), "“furlong” is not known"],
    ["in a unit where none fits", "x.u = 16", edit("microsteps", 8, "mm"), "“mm” does not fit"],
    ["as no number", "x.u = 16", edit("microsteps", NaN, ""), "is no number"],
    [
      "as a share of a run current that is not there",
      "x.ihold = 400",
      edit("hold_current", 50, "%"),
      "the text has no run current",
    ],
    [
      "as a share of no run current",
      "x.run = 0\nx.hold = 50",
      edit("hold_current", 1, "A", RMS),
      "The run current is 0",
    ],
  ])("%s", (_, text, wanted, reason) => {
    const { texts, applied, refused } = write(setting(text), wanted);
    expect(texts).toEqual([text]);
    expect(applied).toEqual([]);
    expect(refused[0]?.reason).toContain(reason);
  });

  it("under a condition, and where a header's flag has no value to change", () => {
    const rules: KeyRule[] = [
      { key: "A", parameter: "acceleration", axis: "x", unit: "mm/s^2" },
      { key: "FLIP", parameter: "direction_reversed", axis: "x" },
    ];
    const text = "#ifndef A\n#define A 3000\n#endif\n#define FLIP\n";
    const { texts, refused } = write(
      { text, rules, path: "a.h" },
      edit("acceleration", 1, "m/s²"),
      edit("direction_reversed", 0, ""),
    );
    expect(texts).toEqual([text]);
    expect(refused.map(({ reason }) => reason)).toEqual([
      "“A” on line 2 stands under “#ifndef A”; edit the text itself.",
      "“FLIP” on line 4 has no number that could be changed; edit the text itself.",
    ]);
  });

  it("alone, while the others are written", () => {
    const { texts, applied, refused } = write(
      setting("x.u = 16\nx.run = 800"),
      edit("microsteps", 8, "mm"),
      edit("run_current", 1, "A", RMS),
    );
    expect([texts, applied.length, refused.length]).toEqual([["x.u = 16\nx.run = 1000"], 1, 1]);
  });
});

describe("what is written", () => {
  it("reads back as wanted to six digits, and nothing else has changed", { timeout: TIMEOUT }, () => {
    const text =
      "x.ipk = 1.0 # pk\ny.run = 0x320\nx.accel = 3000.0\nx.scale = 80.000\nx.v = 8000\ny.vmin = 6e3\nz = 1\n";
    const wishes: readonly [ParameterEdit["parameter"], string, string, "rms" | "peak" | undefined][] = [
      ["run_current", "A", "x", "rms"],
      ["run_current", "mA", "y", "peak"],
      ["acceleration", "m/s²", "x", undefined],
      ["max_speed", "mm/s", "x", undefined],
      ["max_speed", "in/min", "y", undefined],
    ];
    const value = fc.double({ min: 1e-6, max: 1e6, noNaN: true });
    fc.assert(
      fc.property(fc.constantFrom(...wishes), value, ([parameter, unit, axis, basis], wanted) => {
        const { texts, refused } = write(setting(text), { axis, parameter, value: wanted, unit, basis });
        expect(refused).toEqual([]);
        const before = map(setting(text)).parameters;
        const after = map(setting(texts)).parameters;
        expect(after).toHaveLength(before.length);
        const said = write(setting(texts), { axis, parameter, value: wanted, unit, basis });
        expect(said.texts).toEqual(texts);
        const changed = after.filter((one, index) => one.value !== before[index]?.value);
        expect(changed.length).toBeLessThanOrEqual(1);
        for (const one of changed)
          expect(inWanted(one.value, unit, basis, one.basis) / wanted).toBeCloseTo(1, 5);
      }),
      RUNS,
    );
  });
});

const FACTORS: Record<string, number> = { A: 1, mA: 1e-3, "m/s²": 1, "mm/s": 1e-3, "in/min": 0.0254 / 60 };

function inWanted(value: number, unit: string, wanted: string | undefined, basis: string | null): number {
  const root = wanted === undefined || wanted === basis ? 1 : wanted === "peak" ? Math.SQRT2 : Math.SQRT1_2;
  return (value * root) / FACTORS[unit]!;
}

describe("a number", () => {
  it.each([
    [0, "5", "0"],
    [0, "5.00", "0.00"],
    [-0.5, "5", "-0.5"],
    [100, "5", "100"],
    [1e21, "5", "1000000000000000000000"],
    [1.5e-7, "5", "0.00000015"],
    [2 / 3, "0.1", "0.666667"],
    [200000 / 3, "1", "66666.7"],
    [0.1 + 0.2, "0.1", "0.3"],
    [1.25, "1.0e0", "1.25"],
    [255, "0xf", "0xff"],
    [15, "0x00FF", "0x000F"],
    [1.5, "0xff", "1.5"],
    [80, ".5", "80.0"],
    [12000, "8_000", "12_000"],
    [1200000.5, "800_000.0", "1_200_000.5"],
    [200, "1_6", "200"],
  ])("%d in the manner of %s is %s", (value, was, text) => expect(spellNumber(value, was)).toBe(text));

  it("keeps six significant digits at least, without an exponent", { timeout: TIMEOUT }, () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e15, max: 1e15, noNaN: true }),
        fc.constantFrom("1", "1.50", "1e3"),
        (value, was) => {
          if (Math.abs(value) < 1e-12 && value !== 0) return;
          const text = spellNumber(value, was);
          expect(text).toMatch(/^-?\d+(\.\d+)?$/);
          expect(Math.abs(Number(text) - value)).toBeLessThanOrEqual(5.001e-6 * Math.abs(value));
        },
      ),
      RUNS,
    );
  });
});
