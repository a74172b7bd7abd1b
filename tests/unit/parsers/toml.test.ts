import fc from "fast-check";
import { parse as parseOutside } from "smol-toml";
import { getStaticTOMLValue, parseTOML } from "toml-eslint-parser";
import { describe, expect, it } from "vitest";
import { parseText } from "@/lib/parsers/parse-text";
import { tomlText } from "./arbitrary-toml";
import { RUNS } from "./arbitrary-texts";
import { enabledValues, flatten, plainValue } from "./plain-values";

function parse(text: string) {
  return parseText({ path: "a.toml", text, format: "toml" });
}

function values(text: string): [string, unknown][] {
  return parse(text).entries.map(({ key, value }) => [key, plainValue(value)]);
}

function codes(text: string) {
  return parse(text).diagnostics.map(({ code, span }) => [code, span?.line ?? null, span?.column ?? null]);
}

/** Small cases after TOML 1.0; the section of the specification stands with each. */
const VALID: [section: string, text: string, entries: [string, unknown][]][] = [
  [
    "Keys",
    'bare_key = 1\n1234 = 2\n"127.0.0.1" = 3\n\'k "x"\' = 4\n"" = 5',
    [
      ["bare_key", 1],
      ["1234", 2],
      ["127.0.0.1", 3],
      ['k "x"', 4],
      ["", 5],
    ],
  ],
  [
    "Keys",
    'a.b . "c d" = 1\n3.14 = 2',
    [
      ["a.b.c d", 1],
      ["3.14", 2],
    ],
  ],
  ["String", 's = "a\\tb \\u00E9 \\U0001F600 \\"q\\""', [["s", 'a\tb é 😀 "q"']]],
  ["String", 's = """\nRoses\n  Violets"""', [["s", "Roses\n  Violets"]]],
  ["String", 's = """The \\\n     fox."""', [["s", "The fox."]]],
  ["String", 's = """a ""quoted"" end"""""', [["s", 'a ""quoted"" end""']]],
  ["String", "s = '''I [dw]on't\\d'''", [["s", "I [dw]on't\\d"]]],
  ["String", "w = 'C:\\dir\\'", [["w", "C:\\dir\\"]]],
  [
    "Integer",
    "a = +99\nb = -17\nc = 5_349_221\nd = 0xdead_beef\ne = 0o755\nf = 0b1101",
    [
      ["a", 99],
      ["b", -17],
      ["c", 5349221],
      ["d", 0xdeadbeef],
      ["e", 0o755],
      ["f", 13],
    ],
  ],
  [
    "Float",
    "a = 3.1415\nb = 5e+22\nc = -2E-2\nd = 6.626e-34\ne = 224_617.445_991",
    [
      ["a", 3.1415],
      ["b", 5e22],
      ["c", -0.02],
      ["d", 6.626e-34],
      ["e", 224617.445991],
    ],
  ],
  [
    "Boolean",
    "a = true\nb = false",
    [
      ["a", true],
      ["b", false],
    ],
  ],
  [
    "Offset Date-Time",
    "a = 1979-05-27T07:32:00Z\nb = 1979-05-27 00:32:00.999-07:00",
    [
      ["a", "1979-05-27T07:32:00Z"],
      ["b", "1979-05-27 00:32:00.999-07:00"],
    ],
  ],
  [
    "Array",
    "a = [ 1, 2, # c\n 3, ]\nb = []",
    [
      ["a", [1, 2, 3]],
      ["b", []],
    ],
  ],
  [
    "Array",
    'a = [ [ 1, 2 ], ["x"] ]',
    [
      ["a.0", [1, 2]],
      ["a.1", ["x"]],
    ],
  ],
  [
    "Table",
    "[a]\nx = 1\n[ d . 'e.f' ]\ny = 2",
    [
      ["a.x", 1],
      ["d.e.f.y", 2],
    ],
  ],
  [
    "Inline Table",
    "p = { x = 1, y.z = 2 }\nq = {}",
    [
      ["p.x", 1],
      ["p.y.z", 2],
    ],
  ],
  [
    "Array of Tables",
    "[[m]]\na = 1\n[m.n]\nb = 2\n[[m]]\na = 3\n[[m.o]]\nc = 4\n[[m.o]]\nc = 5",
    [
      ["m.0.a", 1],
      ["m.0.n.b", 2],
      ["m.1.a", 3],
      ["m.1.o.0.c", 4],
      ["m.1.o.1.c", 5],
    ],
  ],
  [
    "Array of Tables",
    "m = [ { a = 1 }, { a = 2, b = [3] }, 4 ]",
    [
      ["m.0.a", 1],
      ["m.1.a", 2],
      ["m.1.b", [3]],
      ["m.2", 4],
    ],
  ],
];

type Place = [code: string, line: number, column: number];

/** Texts that TOML 1.0 does not allow: the keys that are read all the same, and where each fault is told. */
const INVALID: [section: string, text: string, keys: string[], faults: Place[]][] = [
  ["Key/Value Pair", "first = 1 last = 2\nb = 1", ["first", "b"], [["not-standard", 1, 9]]],
  ["Key/Value Pair", "k =\nb = 1", ["k", "b"], [["not-standard", 1, 4]]],
  ["Keys", "= 1\nb = 1", ["b"], [["unreadable-line", 1, 1]]],
  ["Keys", "two words = 1\nb = 1", ["b"], [["unreadable-line", 1, 5]]],
  ["Keys", "n = 1\nn = 2", ["n", "n"], [["duplicate-key", 1, 1]]],
  ["Keys", "a = 1\na.b = 2", ["a", "a.b"], [["duplicate-key", 2, 1]]],
  ["String", 's = "open\nb = 1', ["s", "b"], [["unclosed-quote", 1, 5]]],
  ["String", 's = "bad \\q"\nb = 1', ["s", "b"], [["not-standard", 1, 5]]],
  ["String", 's = "a" x\nb = 1', ["s", "b"], [["unreadable-line", 1, 9]]],
  [
    "Integer",
    "a = 01\nb = 1__0\nc = 0xG",
    ["a", "b", "c"],
    [
      ["not-standard", 1, 5],
      ["not-standard", 2, 5],
      ["not-standard", 3, 5],
    ],
  ],
  [
    "Float",
    "a = .7\nb = 7.\nc = 3.e+20",
    ["a", "b", "c"],
    [
      ["not-standard", 1, 5],
      ["not-standard", 2, 5],
      ["not-standard", 3, 5],
    ],
  ],
  ["Table", "[a\nb = 1", ["a.b"], [["unclosed-section", 1, 1]]],
  ["Table", "[a b]\nb = 1", ["b"], [["unclosed-section", 1, 1]]],
  ["Table", "[a]\nx = 1\n[a]\ny = 2", ["a.x", "a.y"], [["duplicate-key", 3, 1]]],
  ["Inline Table", "p = { x = 1\nb = 2", ["p.x", "b"], [["unclosed-list", 1, 5]]],
  ["String", "run = 800 mA", ["run"], [["not-standard", 1, 7]]],
];

describe("TOML", () => {
  it.each(VALID)("(%s) %j says what the specification says", (_, text, entries) => {
    expect(values(text)).toEqual(entries);
    expect(codes(text)).toEqual([]);
    expect(() => parseTOML(text, { tomlVersion: "1.0" })).not.toThrow();
  });

  it.each(INVALID)(
    "(%s) %j is read as far as it goes, with the place of the fault",
    (_, text, keys, faults) => {
      const { entries, diagnostics } = parse(text);
      expect(entries.map(({ key }) => key)).toEqual(keys);
      expect(codes(text)).toEqual(faults);
      for (const { message } of diagnostics) expect(message).toMatch(/\.$/);
      expect(() => parseTOML(text, { tomlVersion: "1.0" })).toThrow();
    },
  );

  it("takes a key in a comment for a disabled key of its table", () => {
    const text =
      "[x]\nrun = 800 # rms\n# hold = 400\n# note: see = below\n#[y]\n#run = 650\n# scale = [1, 2]\n[z]\n#a.b = 1";
    expect(parse(text).entries.map(({ key, disabled, comment }) => [key, disabled, comment])).toEqual([
      ["x.run", false, "rms"],
      ["x.hold", true, null],
      ["y.run", true, null],
      ["y.scale", true, null],
      ["z.a.b", true, null],
    ]);
  });

  it("reads no deeper than its limit and goes on behind it", () => {
    const deep = `a = ${"[".repeat(50_000)}${"]".repeat(50_000)}\nb = 1`;
    expect(values(deep)).toEqual([["b", 1]]);
    expect(codes(deep)).toEqual([["too-deep", 1, 37]]);
  });

  /**
   * Where the readers differ, and what is therefore left out of the comparison:
   * - a name or a table that stands twice: both outside readers refuse the text; here the later counts, and it is said;
   * - `__proto__`: one of them gives it as a prototype and not as a member;
   * - dates: objects there, their spelling here.
   */
  it("says the same as two outside readers", () => {
    fc.assert(
      fc.property(tomlText, ({ text }) => {
        const body = text.replace(/^\ufeff/, "").replaceAll("__proto__", "proto");
        const own = parse(body);
        fc.pre(own.diagnostics.length === 0);
        const outside = flatten(parseOutside(body));
        expect(withoutDates(enabledValues(own))).toEqual(withoutDates(outside));
        const third = flatten(getStaticTOMLValue(parseTOML(body, { tomlVersion: "1.0" })));
        expect([...third.keys()].sort()).toEqual([...outside.keys()].sort());
      }),
      RUNS,
    );
  });
});

function withoutDates(values: ReadonlyMap<string, unknown>): Map<string, unknown> {
  return new Map([...values].map(([key, value]) => [key, isDate(value) ? "date" : value]));
}

function isDate(value: unknown): boolean {
  if (value instanceof Date) return true;
  return typeof value === "string" && /^(\d{4}-\d\d-\d\dT|\d\d:\d\d:)/.test(value);
}
