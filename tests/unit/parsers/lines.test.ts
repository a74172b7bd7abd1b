import { describe, expect, it } from "vitest";
import { parseLines } from "@/lib/parsers/lines";
import type { Entry, ParsedValue } from "@/lib/parsers/types";

function parse(text: string) {
  return parseLines("some.conf", text);
}

function only(text: string): Entry {
  const { entries } = parse(text);
  expect(entries).toHaveLength(1);
  return entries[0]!;
}

/** A value in short: numbers with their unit in brackets, texts in quotes, lists as lists. */
function short(value: ParsedValue): unknown {
  switch (value.kind) {
    case "number":
      return value.unit === null ? value.value : `${value.value} [${value.unit}]`;
    case "list":
      return value.items.map((item) => short(item.value));
    case "text":
      return `"${value.value}"`;
    case "boolean":
      return value.value;
    case "none":
      return null;
  }
}

function valueOf(raw: string): unknown {
  const { value, raw: read } = only(`key = ${raw}`);
  expect(read).toBe(raw);
  return short(value);
}

function codes(text: string): string[] {
  return parse(text).diagnostics.map(({ code }) => code);
}

describe("a line", () => {
  it.each([
    ["run_ma = 800", "run_ma", "800"],
    ["run_ma=800", "run_ma", "800"],
    ["run_ma: 800", "run_ma", "800"],
    ["run_ma:800", "run_ma", "800"],
    ["run_ma := 800", "run_ma", "800"],
    ["run_ma 800", "run_ma", "800"],
    ["\trun_ma\t=\t800\t", "run_ma", "800"],
    ["$110 = 500.000", "$110", "500.000"],
    ["Max speed = 300", "Max speed", "300"],
    ["Max speed (mm/s): 300", "Max speed (mm/s)", "300"],
    ["Axis 1 speed = 300", "Axis 1 speed", "300"],
    ['"odd key" = 3', "odd key", "3"],
    ["macro home x=1 y=2", "macro", "home x=1 y=2"],
    ["path = http://host/a", "path", "http://host/a"],
    ["time 12:30", "time", "12:30"],
  ])("%s has its key and its value", (text, key, raw) => {
    const entry = only(text);
    expect([entry.key, entry.raw]).toEqual([key, raw]);
  });

  it("may have a key alone, whose value is missing and stands after it", () => {
    const entry = only("  homing_enabled  # yes");
    expect([entry.key, entry.value.kind, entry.raw, entry.comment]).toEqual([
      "homing_enabled",
      "none",
      "",
      "yes",
    ]);
    expect(entry.valueSpan).toEqual({ start: 16, end: 16, line: 1, column: 17 });
  });

  it("has an empty place for a value that is missing, directly behind the mark", () => {
    expect(only("run_ma =   # later").valueSpan).toMatchObject({ start: 8, end: 8 });
  });

  it.each(["= 5", "x,80,3000", "====", "<axis>"])("%s is kept unread and reported", (text) => {
    expect(parse(text).entries).toEqual([]);
    expect(codes(text)).toEqual(["unreadable-line"]);
  });

  it.each(["a = 1\nb = 2", "a = 1\r\nb = 2", "a = 1\rb = 2", "\ufeffa = 1\nb = 2\n"])(
    "ends at LF, CR LF or CR: %j",
    (text) => {
      expect(parse(text).entries.map(({ key, raw, keySpan }) => [key, raw, keySpan.line])).toEqual([
        ["a", "1", 1],
        ["b", "2", 2],
      ]);
    },
  );
});

describe("a section", () => {
  it("is joined to its keys with a dot, until the next one", () => {
    const { entries } = parse("top = 1\n[axis.x]\nrun = 2\n[ stepper y ] ; second\nrun = 3\n[]\nlast = 4");
    expect(entries.map(({ key }) => key)).toEqual(["top", "axis.x.run", "stepper y.run", "last"]);
    expect(entries.map(({ path }) => path)).toEqual([
      ["top"],
      ["axis.x", "run"],
      ["stepper y", "run"],
      ["last"],
    ]);
  });

  it("in double brackets has the same name", () => {
    expect(parse("[[axis]]\nrun = 1").entries[0]?.key).toBe("axis.run");
  });

  it("without its closing bracket is reported and counts", () => {
    expect(codes("[axis.x\nrun = 1")).toEqual(["unclosed-section"]);
    expect(parse("[axis.x\nrun = 1").entries[0]?.key).toBe("axis.x.run");
  });

  it("of more than 200 characters is cut in its keys", () => {
    const { entries, diagnostics } = parse(`[${"a".repeat(250)}]\nrun = 1`);
    expect(entries[0]?.key).toHaveLength(204);
    expect(diagnostics[0]?.message).toContain("250 characters");
  });

  it("with something behind it that is no comment has that reported", () => {
    expect(codes("[axis] run = 3")).toEqual(["unreadable-line"]);
  });
});

describe("a value", () => {
  it.each([
    ["800", 800],
    ["-0.5", -0.5],
    ["+5", 5],
    [".5", 0.5],
    ["5.", 5],
    ["1.5e3", 1500],
    ["2E-3", 0.002],
    ["0x1F", 31],
    ["0b101", 5],
    ["007", 7],
    ["0.1", 0.1],
    ["123456789012345678", 123456789012345680],
    ["0.30000000000000004", 0.30000000000000004],
  ])("%s is a number", (raw, value) => expect(valueOf(raw)).toBe(value));

  it.each([
    ["800mA", "800 [mA]"],
    ["12 mm/s", "12 [mm/s]"],
    ["35 %", "35 [%]"],
    ["0.8A", "0.8 [A]"],
    ["0.8 A rms", "0.8 [A rms]"],
    ["1.13 A peak", "1.13 [A peak]"],
    ["80 1/mm", "80 [1/mm]"],
    ["3000 mm/s^2", "3000 [mm/s^2]"],
    ["10 µs", "10 [µs]"],
    ["0.11Ω", "0.11 [Ω]"],
    ["5 furlong", "5 [furlong]"],
    ["5e", "5 [e]"],
  ])("%s is a number with a unit", (raw, value) => expect(valueOf(raw)).toBe(value));

  it.each([
    ["true", true],
    ["Yes", true],
    ["ON", true],
    ["false", false],
    ["no", false],
    ["off", false],
  ])("%s is a truth value", (raw, value) => expect(valueOf(raw)).toBe(value));

  it.each([
    "fast",
    "1.2.3.4",
    "2024-05-01",
    "1/16",
    "5 axis gantry",
    "--5",
    "0x",
    "it's fine",
    "1e999",
    "Infinity",
  ])("%s is plain text", (raw) => expect(valueOf(raw)).toBe(`"${raw}"`));

  it.each([
    ['"a # b"', '"a # b"'],
    ["'a ; b'", '"a ; b"'],
    ['"say \\"no\\""', '"say \\"no\\""'],
    ["'C:\\'", '"C:\\"'],
    ['"800"', '"800"'],
  ])("%s is text without its quotes, escapes as they stand", (raw, value) =>
    expect(valueOf(raw)).toBe(value),
  );

  it.each([
    ["80, 80, 400", [80, 80, 400]],
    ["80,80,", [80, 80]],
    ["[80, 80.5, 0x10]", [80, 80.5, 16]],
    ["{80 80 400}", [80, 80, 400]],
    ["(80, 80)", [80, 80]],
    ["80 80 400", [80, 80, 400]],
    ["(80 80)", [80, 80]],
    ["12 mm/s, 14mm/s", ["12 [mm/s]", "14 [mm/s]"]],
    ["[\"x, y\", 'z']", ['"x, y"', '"z"']],
    ["x, y, z", ['"x"', '"y"', '"z"']],
    ["[true, off]", [true, false]],
    ["[1, , 2]", [1, null, 2]],
    ["[80]", [80]],
    ["[]", []],
    ["{{1, 2}, 3}", ['"{1, 2}"', 3]],
    ["[(1), 2]", [1, 2]],
  ])("%s is a list", (raw, items) => expect(valueOf(raw)).toEqual(items));

  it.each([
    ["(80)", 80],
    ["( 80 mA )", "80 [mA]"],
    ["((80))", 80],
    ["(fast)", '"(fast)"'],
    ["(a) + (b)", '"(a) + (b)"'],
    ["mounted by hand, in May this year", '"mounted by hand, in May this year"'],
  ])("%s is no list", (raw, value) => expect(valueOf(raw)).toBe(value));

  it("has elements with spans of their own", () => {
    const { value } = only("steps = { 80, 400 }");
    if (value.kind !== "list") throw new Error("no list");
    expect(value.items.map(({ raw, span }) => [raw, span.column])).toEqual([
      ["80", 11],
      ["400", 15],
    ]);
  });

  it.each([
    ['name = "open', "unclosed-quote"],
    ["name = 'open # note", "unclosed-quote"],
    ["steps = [80, 80", "unclosed-list"],
    ["steps = (80", "unclosed-list"],
  ])("%s is left open, which is reported", (text, code) => {
    const { diagnostics, entries } = parse(text);
    expect(diagnostics.map((found) => found.code)).toEqual([code]);
    expect(entries[0]?.value.kind).toBe("text");
    expect(diagnostics[0]?.message).toContain("line 1");
  });
});

describe("a comment", () => {
  it.each([
    ["a = 1 # note", "1", "note"],
    ["a = 1\t; note", "1", "note"],
    ["a = 1 // note", "1", "note"],
    ["a = 1 ## note ", "1", "note"],
    ["a = 1# note", "1# note", null],
    ["a = b;c", "b;c", null],
    ['a = "x # y" # z', '"x # y"', "z"],
    ["a = Bob's # z", "Bob's", "z"],
    ["a = 12, 'x # y' # z", "12, 'x # y'", "z"],
    ["a = #fff", "", "fff"],
    ["a =#fff", "#fff", null],
  ])("trails a value after white space: %s", (text, raw, comment) => {
    const entry = only(text);
    expect([entry.raw, entry.comment]).toEqual([raw, comment]);
  });

  it.each([
    "# run_ma = 800",
    "#run_ma=800",
    ";; run_ma = 800 mA",
    "// run_ma = fast",
    '# name = "left rail"',
    "# steps = 80, 80",
    "# accel: 3000",
    "# reversed: yes",
    "# run_ma 800",
    "# vmax.x 300 mm/s",
  ])("that reads as a key is a disabled entry: %s", (text) => {
    expect(only(text)).toMatchObject({ disabled: true });
  });

  it.each([
    "# set to 800 by hand",
    "# Note: careful with this",
    "# speed = the highest one we dared",
    "# See line 3",
    "# accel: 3 axes",
    "# carriage 5, belt side",
    "# version 2",
    "#",
    "# ----------",
    "# = 3",
    "# name =",
    "# 3 = 4",
  ])("of prose is no entry: %s", (text) => {
    expect(parse(text).entries).toEqual([]);
    expect(codes(text)).toEqual([]);
  });

  it("with a plain word and a number is a disabled entry where the text writes its keys so", () => {
    const { entries } = parse("speed 300\n# accel 3000\n# see the belt\njerk 20");
    expect(entries.map(({ key, disabled }) => [key, disabled])).toEqual([
      ["speed", false],
      ["accel", true],
      ["jerk", false],
    ]);
    expect(entries.map(({ id }) => id)).toEqual([0, 1, 2]);
  });

  it("with a section names it for the disabled keys below, not for the enabled ones", () => {
    const { entries } = parse("[axis.x]\n# [axis.y]\n# run = 1\nrun = 2\n# run = 3");
    expect(entries.map(({ key, raw }) => [key, raw])).toEqual([
      ["axis.y.run", "1"],
      ["axis.x.run", "2"],
      ["axis.x.run", "3"],
    ]);
  });

  it("of a disabled entry keeps its own trailing comment", () => {
    expect(only("# run_ma = 800 ; too hot")).toMatchObject({ raw: "800", comment: "too hot" });
  });
});

describe("a key that stands twice", () => {
  it("counts where it stands last; the earlier one is shadowed and reported there", () => {
    const { entries, diagnostics } = parse("[a]\nk = 1\nk = 2\n[b]\nk = 3\n[a]\nk = 4\n# k = 5");
    expect(entries.map(({ key, raw, shadowed }) => [key, raw, shadowed])).toEqual([
      ["a.k", "1", true],
      ["a.k", "2", true],
      ["b.k", "3", false],
      ["a.k", "4", false],
      ["a.k", "5", false],
    ]);
    expect(diagnostics.map(({ code, span }) => [code, span?.line])).toEqual([
      ["duplicate-key", 2],
      ["duplicate-key", 3],
    ]);
  });

  it("is the same key whether its dots are typed or come from a section", () => {
    const { entries } = parse("a.b.k = 1\n[a]\nb.k = 2\n[a.b]\nk = 3");
    expect(entries.map(({ shadowed }) => shadowed)).toEqual([true, true, false]);
  });

  it("may have any name that a language gives a meaning of its own", () => {
    const { entries } = parse("__proto__ = 1\nconstructor = 2\n__proto__ = 3\n[__proto__]\ntoString = 4");
    expect(entries.map(({ key, shadowed }) => [key, shadowed])).toEqual([
      ["__proto__", true],
      ["constructor", false],
      ["__proto__", false],
      ["__proto__.toString", false],
    ]);
  });

  it("in a text full of them is reported a hundred times, and the rest counted", () => {
    const { diagnostics } = parse("k = 1\n".repeat(151));
    expect(diagnostics).toHaveLength(101);
    expect(diagnostics[100]?.message).toContain("50 more places");
  });
});
