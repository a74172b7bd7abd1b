import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { KeyRule } from "@/lib/domain/key-table";
import { garbage, RUNS, TIMEOUT } from "../parsers/arbitrary-texts";
import { AXES, complaints, map, said } from "./support";

const RUN: KeyRule = { key: "axis.{axis}.run_ma", parameter: "run_current", unit: "mA", basis: "rms" };

function rule(key: string, parameter: KeyRule["parameter"], more: Partial<KeyRule> = {}): KeyRule {
  return { key, parameter, ...more };
}

describe("a rule", () => {
  it("with {axis} reads the key of each axis, whatever the case of either", () => {
    expect(said({ text: "[AXIS.x]\nRun_mA = 800\n[axis.Y]\nrun_ma = 900", rules: [RUN] })).toEqual([
      "X run_current 0.8 A rms",
      "Y run_current 0.9 A rms",
    ]);
  });

  it("has {axis} inside a word too", () => {
    const rules = [
      rule("{axis}_max", "travel_max", { unit: "mm" }),
      rule("accel{axis}", "acceleration", { unit: "m/s^2" }),
    ];
    expect(said({ text: "X_MAX = 300\naccely = 3", rules })).toEqual([
      "X travel_max 0.3 m",
      "Y acceleration 3 m/s²",
    ]);
  });

  it("with {axis} for a whole last segment reads the elements of a list by the order of the axes", () => {
    const rules = [rule("steps.{axis}", "steps_per_mm")];
    expect(said({ text: "steps = 80, 81, 26.7", rules })).toEqual([
      "X steps_per_mm 80 1/mm",
      "Y steps_per_mm 81 1/mm",
      "C steps_per_mm 26.7 1/deg",
    ]);
    expect(said({ text: "[steps]\ny = 80\n0 = 9", rules })).toEqual(["Y steps_per_mm 80 1/mm"]);
  });

  it("with a number for the last segment reads that element", () => {
    const rules = [
      rule("STEPS.1", "steps_per_mm", { axis: "x" }),
      rule("STEPS.0", "steps_per_mm", { axis: "Y" }),
    ];
    expect(said({ path: "a.h", text: "#define STEPS { 80, 90 }", rules })).toEqual([
      "X steps_per_mm 90 1/mm",
      "Y steps_per_mm 80 1/mm",
    ]);
  });

  it("for a whole key that holds a list gives a sentence and no value", () => {
    const setting = { text: "steps = 80, 80", rules: [rule("steps", "steps_per_mm", { axis: "x" })] };
    expect(said(setting)).toEqual([]);
    expect(complaints(setting)).toEqual([
      "list-length: “steps” on line 1 is a list of 2, and the key table takes it for one value. It is kept and not used; name its elements in the key table: “steps.0” or “steps.{axis}”.",
    ]);
    expect(map(setting).unmapped).toEqual([]);
  });

  it("tells when a list has another number of elements than the machine has axes", () => {
    const setting = { text: "steps = 80, 80, 26, 95", rules: [rule("steps.{axis}", "steps_per_mm")] };
    expect(complaints(setting)[0]).toContain("has 4 elements, and the machine has 3 axes");
    expect(map(setting).unmapped.map(({ key, raw }) => [key, raw])).toEqual([["steps.3", "95"]]);
  });

  it("may feed several axes from one key", () => {
    const rules = ["x", "y"].map((axis) => rule("accel", "acceleration", { axis, unit: "mm/s^2" }));
    expect(said({ text: "accel = 3000", rules })).toEqual(["X acceleration 3 m/s²", "Y acceleration 3 m/s²"]);
  });

  it("for a parameter of the machine needs no axis", () => {
    const rules = [rule("supply", "supply_voltage"), rule("rate", "max_step_rate", { unit: "kHz" })];
    expect(said({ text: "supply = 24 V\nrate = 100", rules })).toEqual([
      "machine supply_voltage 24 V",
      "machine max_step_rate 100000 Hz",
    ]);
  });

  it("without an axis needs none on a machine with one, and is reported on others", () => {
    const rules = [rule("accel", "acceleration", { unit: "mm/s^2" })];
    expect(said({ text: "accel = 3000", rules, axes: AXES.slice(1, 2) })).toEqual(["Y acceleration 3 m/s²"]);
    expect(said({ text: "accel = 3000", rules })).toEqual([]);
    expect(complaints({ text: "accel = 3000", rules })[0]).toMatch(
      /^axis-unknown: .*“accel” on line 1.*without saying which/,
    );
  });

  it("that names an axis the machine does not have is reported where its key stands", () => {
    const rules = [rule("accel", "acceleration", { axis: "w", unit: "mm/s^2" })];
    expect(complaints({ text: "\naccel = 3000", rules })[0]).toMatch(/^axis-unknown: .*line 2.*an axis “w”/);
    expect(complaints({ text: "other = 3000", rules })).toEqual([]);
  });

  it("of another layer does not apply", () => {
    const rules = [{ ...RUN, layer: "stored" as const }];
    const text = "axis.x.run_ma = 800";
    expect(said({ text, rules, layer: "file" })).toEqual([]);
    expect(said({ text, rules, layer: "stored" })).toHaveLength(1);
    expect(said({ text, rules })).toHaveLength(1);
  });

  it("may be for any key, also one that a language gives a meaning of its own", () => {
    const rules = [rule("__proto__", "microsteps", { axis: "x" }), rule("constructor.{axis}", "microsteps")];
    expect(said({ text: "__proto__ = 16\n[constructor]\ny = 8", rules })).toEqual([
      "X microsteps 16",
      "Y microsteps 8",
    ]);
    expect(said({ text: "toString = 16\nhasOwnProperty = 1", rules })).toEqual([]);
  });
});

describe("keys for axes that the machine does not have", () => {
  it("are told once for each axis, and left unmapped", () => {
    const setting = {
      text: "axis.w.run_ma = 1\naxis.w.accel = 2\naxis.x.run_ma = 3",
      rules: [RUN, rule("axis.{axis}.accel", "acceleration")],
    };
    expect(complaints(setting)).toEqual([
      "axis-unknown: From line 1 on 2 keys are for an axis “w”, which this machine does not have. They are kept and not used.",
    ]);
    expect(map(setting).unmapped).toHaveLength(2);
  });

  it("are not seen in words that only stand where an axis name could", () => {
    expect(complaints({ text: "default_max = 1", rules: [rule("{axis}_max", "travel_max")] })).toEqual([]);
  });
});

describe("without any hardware", () => {
  const text =
    "axis.Shoulder.run_ma = 800\naxis.shoulder.vmax = 90 deg/s\naxis.x.run_ma = 900\nZ_MAX = 200\ndefault_max = 3\nsupply = 24 V";
  const rules = [
    RUN,
    rule("axis.{axis}.vmax", "max_speed"),
    rule("{axis}_max", "travel_max", { unit: "mm" }),
    rule("supply", "supply_voltage"),
    rule("accel", "acceleration", { axis: "Y", unit: "m/s²" }),
  ];

  it("the axes are those that the texts and the key table name", () => {
    expect(said({ text: `${text}\naccel = 2`, rules, axes: [] })).toEqual([
      "Y acceleration 2 m/s²",
      "Shoulder run_current 0.8 A rms",
      `Shoulder max_speed ${Number((Math.PI / 2).toPrecision(9))} rad/s`,
      "x run_current 0.9 A rms",
      "Z travel_max 0.2 m",
      "machine supply_voltage 24 V",
    ]);
  });

  it("commented-out keys and those of another layer name none", () => {
    const other = [{ ...RUN, layer: "stored" as const }];
    expect(said({ text: "axis.x.run_ma = 900", rules: other, axes: [], layer: "file" })).toEqual([]);
    expect(said({ text: "# axis.x.run_ma = 900", rules, axes: [] })).toEqual([]);
  });
});

describe("a unit", () => {
  it("in the text beats the key table's", () => {
    expect(said({ text: "axis.x.run_ma = 0.8 A", rules: [RUN] })).toEqual(["X run_current 0.8 A rms"]);
  });

  it("may carry the basis of a current, which beats the key table's", () => {
    expect(
      said({
        text: "axis.x.run_ma = 0.8 A peak\naxis.y.run_ma = 900mA_rms",
        rules: [{ ...RUN, basis: "peak" }],
      }),
    ).toEqual(["X run_current 0.8 A peak", "Y run_current 0.9 A rms"]);
  });

  it("that nobody states leads to a sentence and no value", () => {
    const setting = { text: "accel = 3000", rules: [rule("accel", "acceleration", { axis: "x" })] };
    expect(said(setting)).toEqual([]);
    expect(complaints(setting)).toEqual([
      "unknown-unit: “accel” on line 1 has no unit; say in the key table which it is. The text is kept; the value is not used.",
    ]);
  });

  it("is not needed for counts, truth values and the scale", () => {
    const rules = [
      rule("u", "microsteps", { axis: "x", unit: "none" }),
      rule("s", "steps_per_mm", { axis: "x" }),
      rule("t", "steps_per_mm", { axis: "c" }),
      rule("r", "direction_reversed", { axis: "x" }),
    ];
    expect(said({ text: "u = 16\ns = 80\nt = 26.7\nr = yes", rules })).toEqual([
      "X microsteps 16",
      "X steps_per_mm 80 1/mm",
      "X direction_reversed 1",
      "C steps_per_mm 26.7 1/deg",
    ]);
  });

  it.each([
    [
      "accel = 3 furlong",
      "mm/s^2",
      "unknown-unit: “accel” on line 1 has the unit “furlong” (in the text), which is not known",
    ],
    [
      "accel = 3",
      "furlong",
      "unknown-unit: “accel” on line 1 has the unit “furlong” (in the key table), which is not known",
    ],
    [
      "accel = 3 mm/s",
      "mm/s^2",
      "wrong-unit: “accel” on line 1 cannot be read: “mm/s” is not a unit of acceleration on a linear axis (in the text)",
    ],
    [
      "accel = 3 deg/s^2",
      undefined,
      "wrong-unit: “accel” on line 1 cannot be read: “deg/s^2” is not a unit of acceleration on a linear axis (in the text)",
    ],
    ["accel = 3 mA", undefined, "wrong-unit: "],
    [
      "accel = fast",
      "mm/s^2",
      "not-a-number: “accel” on line 1 has “fast”, which is no number; write the number itself",
    ],
    ["accel =", "mm/s^2", "not-a-number: “accel” on line 1 has no value; write the number itself"],
  ])("in %s with the table's %s is told", (text, unit, message) => {
    const setting = {
      text,
      rules: [rule("accel", "acceleration", { axis: "x", ...(unit ? { unit } : {}) })],
    };
    expect(said(setting)).toEqual([]);
    expect(complaints(setting)[0]).toContain(message);
  });

  it("of a hold current may be %, which stays", () => {
    const rules = [
      rule("hold", "hold_current", { axis: "x" }),
      rule("hold2", "hold_current", { axis: "y", unit: "%", basis: "rms" }),
    ];
    expect(said({ text: "hold = 45 %\nhold2 = 50", rules })).toEqual([
      "X hold_current 45 %",
      "Y hold_current 50 %",
    ]);
  });

  it("in steps rests on the text's own scale first", () => {
    const rules = [
      rule("s.{axis}", "steps_per_mm"),
      rule("u.{axis}", "microsteps"),
      rule("v.{axis}", "max_speed", { unit: "steps/s" }),
      rule("a.{axis}", "acceleration", { unit: "steps/s²" }),
    ];
    expect(
      said({ text: "v = 8000, 8000, 600\na = 80000, 0, 0\ns = 100, 50, 10", rules }).filter(
        (row) => !row.includes("steps_per_mm"),
      ),
    ).toEqual([
      "X max_speed 0.08 m/s",
      "X acceleration 0.8 m/s²",
      "Y max_speed 0.16 m/s",
      "Y acceleration 0 m/s²",
      `C max_speed ${Number(((600 / 10) * (Math.PI / 180)).toPrecision(9))} rad/s`,
      "C acceleration 0 rad/s²",
    ]);
  });

  it("in steps rests on microsteps, step angle and travel where the text has no scale", () => {
    const rules = [
      rule("v", "max_speed", { axis: "x" }),
      rule("u", "microsteps", { axis: "x" }),
      rule("w", "max_speed", { axis: "c" }),
      rule("k", "microsteps", { axis: "c" }),
    ];
    expect(said({ text: "v = 16000 steps/s\nu = 16\nw = 9600 steps/s\nk = 16", rules })).toEqual([
      "X microsteps 16",
      "X max_speed 0.2 m/s",
      "C microsteps 16",
      `C max_speed ${Number(((9600 / (200 * 16 * 3)) * 2 * Math.PI).toPrecision(9))} rad/s`,
    ]);
  });

  it("in steps without any scale is told, and gives no value", () => {
    const setting = { text: "v = 16000 steps/s", rules: [rule("v", "max_speed", { axis: "x" })] };
    expect(said(setting)).toEqual([]);
    expect(complaints(setting)[0]).toMatch(/^scale-missing: .*needs the steps per mm/);
  });

  it("in turns a minute rests on the travel of a turn", () => {
    const rules = [rule("v", "max_speed", { axis: "x" }), rule("w", "max_speed", { axis: "c" })];
    expect(said({ text: "v = 300 rpm\nw = 30 rpm", rules })).toEqual([
      "X max_speed 0.2 m/s",
      `C max_speed ${Number(Math.PI.toPrecision(9))} rad/s`,
    ]);
    const bare = { text: "v = 300 rpm", rules, axes: [{ axis: "x", kind: "linear" as const }] };
    expect(complaints(bare)[0]).toMatch(/^scale-missing: .*travel per turn/);
  });
});

describe("a value", () => {
  it.each([
    ['"800"', "X run_current 0.8 A rms"],
    ['"0.8 A"', "X run_current 0.8 A rms"],
    ["(800)", "X run_current 0.8 A rms"],
    ["0x320", "X run_current 0.8 A rms"],
    ["8e2", "X run_current 0.8 A rms"],
  ])("may be typed %s", (raw, row) => {
    expect(said({ text: `axis.x.run_ma = ${raw}`, rules: [RUN] })).toEqual([row]);
  });

  it("keeps the number and unit typed, and where it stands", () => {
    const [value] = map({ text: "[axis.x]\n  run_ma = 0.8 A ; hot", rules: [RUN] }).parameters;
    expect(value).toMatchObject({
      typed: { value: 0.8, unit: "A" },
      source: { path: "a.conf", line: 2, column: 12, start: 20, end: 25, raw: "0.8 A", key: "axis.x.run_ma" },
    });
  });

  it.each([
    ["true", 1],
    ["OFF", 0],
    ["1", 1],
    ["0", 0],
    ['"yes"', 1],
  ])("that switches may be typed %s", (raw, value) => {
    const rules = [rule("r", "direction_reversed", { axis: "x" })];
    expect(map({ text: `r = ${raw}`, rules }).parameters[0]?.value).toBe(value);
  });

  it.each(["2", "maybe", "", "1 mm"])("that switches is not %j", (raw) => {
    expect(
      complaints({ text: `r = ${raw}`, rules: [rule("r", "direction_reversed", { axis: "x" })] })[0],
    ).toMatch(/^not-a-number: .*neither yes nor no/);
  });

  it("that switches says yes where a header defines the name alone", () => {
    const rules = [
      rule("X_INVERT", "direction_reversed", { axis: "x" }),
      rule("Y_INVERT", "direction_reversed", { axis: "y" }),
    ];
    expect(said({ path: "a.h", text: "#define X_INVERT\n//#define Y_INVERT", rules })).toEqual([
      "X direction_reversed 1",
    ]);
  });

  it("of microsteps may be typed 1/16 (common practice, no source)", () => {
    expect(said({ text: "u = 1/16", rules: [rule("u", "microsteps", { axis: "x" })] })).toEqual([
      "X microsteps 16",
    ]);
  });

  it("that is a count has no unit", () => {
    expect(complaints({ text: "u = 16 mm", rules: [rule("u", "microsteps", { axis: "x" })] })[0]).toMatch(
      /^wrong-unit: /,
    );
    expect(complaints({ text: "u = 16 times", rules: [rule("u", "microsteps", { axis: "x" })] })[0]).toMatch(
      /^unknown-unit: .*“times”/,
    );
  });

  it("that is commented out or shadowed is none", () => {
    const text = "# axis.x.run_ma = 700\naxis.y.run_ma = 800\naxis.y.run_ma = 900";
    expect(said({ text, rules: [RUN] })).toEqual(["Y run_current 0.9 A rms"]);
  });

  it("of a later file wins, without a word", () => {
    const setting = { text: ["axis.x.run_ma = 700", "axis.x.run_ma = 800"], rules: [RUN] };
    expect(said(setting)).toEqual(["X run_current 0.8 A rms"]);
    expect(map(setting).parameters[0]?.source.path).toBe("1-a.conf");
    expect(complaints(setting)).toEqual([]);
  });

  it("of a later key of the same file wins, which is told unless they agree", () => {
    const rules = [RUN, rule("irun.{axis}", "run_current", { unit: "A", basis: "rms" })];
    const setting = { text: "axis.x.run_ma = 700\n[irun]\nx = 0.8", rules };
    expect(said(setting)).toEqual(["X run_current 0.8 A rms"]);
    expect(complaints(setting)[0]).toMatch(
      /^duplicate-key: “axis.x.run_ma” on line 1 and “irun.x” on line 3 both set the run current/,
    );
    expect(complaints({ ...setting, text: "axis.x.run_ma = 800\n[irun]\nx = 0.8" })).toEqual([]);
  });

  it("that counts and cannot be read is not replaced by an earlier one", () => {
    expect(said({ text: ["axis.x.run_ma = 700", "axis.x.run_ma = fast"], rules: [RUN] })).toEqual([]);
  });
});

describe("a conditional value", () => {
  const rules = [rule("A", "acceleration", { axis: "x", unit: "mm/s^2" })];
  const at = (text: string) => ({ path: "a.h", text, rules });

  it("counts where all branches give the same, in whatever spelling", () => {
    const setting = at("#if FAST\n#define A 3000\n#else\n#define A 3.0e3\n#endif");
    expect(said(setting)).toEqual(["X acceleration 3 m/s²"]);
    expect(complaints(setting)).toEqual([]);
  });

  it("counts with a warning where no other branch stands", () => {
    const setting = at("#ifndef A\n#define A 3000\n#endif");
    expect(said(setting)).toEqual(["X acceleration 3 m/s²"]);
    expect(complaints(setting)[0]).toMatch(
      /^conditional-value: “A” on line 2 holds only under “#ifndef A”; it is taken to hold/,
    );
  });

  it("does not count where the branches differ", () => {
    const setting = at("#if FAST\n#define A 3000\n#else\n#define A 2000\n#endif");
    expect(said(setting)).toEqual([]);
    expect(complaints(setting)).toEqual([
      "conditional-value: “A” on line 2 holds only under “#if FAST”; no value counts, since the branches differ. Everything is kept; take the condition away, or check the text that the compiler sees.",
    ]);
  });

  it("gives way to an unconditional one, with a warning where it differs", () => {
    const setting = at("#define A 3000\n#if FAST\n#define A 2000\n#endif\n#if SLOW\n#define A 3000\n#endif");
    expect(said(setting)).toEqual(["X acceleration 3 m/s²"]);
    expect(complaints(setting)).toHaveLength(1);
    expect(complaints(setting)[0]).toMatch(/^conditional-value: “A” on line 3 .*line 1 counts/);
  });

  it("is left out where the condition is 0, and is plain where it is 1", () => {
    const setting = at("#if 0\n#define A 1\n#else\n#define A 2000\n#endif");
    expect(said(setting)).toEqual(["X acceleration 2 m/s²"]);
    expect(complaints(setting)).toEqual([]);
  });

  it("does not count beside one that a condition takes back", () => {
    expect(said(at("#define A 3000\n#if FAST\n#undef A\n#define A 2000\n#endif"))).toEqual([]);
  });
});

describe("keys without a rule", () => {
  it("are listed with their line and value, enabled ones alone", () => {
    const { unmapped } = map({ text: "foo = 3\n# bar = 4\n[axis.x]\nrun_ma = 5\nbaz = 1, 2", rules: [RUN] });
    expect(unmapped.map(({ path, line, key, raw }) => [path, line, key, raw])).toEqual([
      ["a.conf", 1, "foo", "3"],
      ["a.conf", 5, "axis.x.baz", "1, 2"],
    ]);
  });

  it("have suggestions where their name says something", () => {
    const { unmapped } = map({ text: "axis.x.irun = 5\nfoo = 3", rules: [] });
    expect(unmapped.map(({ suggestions }) => suggestions[0]?.parameter)).toEqual(["run_current", undefined]);
  });
});

describe("parameters", () => {
  it("come by axis as the machine has them, the machine's own last, in the order of the parameter list", () => {
    const rules = [
      RUN,
      rule("supply", "supply_voltage"),
      rule("axis.{axis}.accel", "acceleration", { unit: "m/s²" }),
    ];
    expect(
      said({ text: "supply = 24 V\naxis.y.accel = 1\naxis.y.run_ma = 1\naxis.x.accel = 2", rules }),
    ).toEqual([
      "X acceleration 2 m/s²",
      "Y run_current 0.001 A rms",
      "Y acceleration 1 m/s²",
      "machine supply_voltage 24 V",
    ]);
  });

  it("are finite, whatever the texts hold, and nothing throws", { timeout: TIMEOUT }, () => {
    const rules = [
      rule("k", "acceleration", { axis: "x", unit: "mm/s^2" }),
      rule("{axis}", "microsteps"),
      rule("a.{axis}", "max_speed", { unit: "steps/s" }),
    ];
    fc.assert(
      fc.property(garbage, garbage, (one, other) => {
        const { parameters } = map({ text: [`k = ${one}\n${other}`, `a = ${other}`], rules });
        for (const { value } of parameters) expect(Number.isFinite(value)).toBe(true);
      }),
      RUNS,
    );
  });
});
