import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { parse as parseOutside } from "yaml";
import { parseText } from "@/lib/parsers/parse-text";
import { RUNS, TIMEOUT } from "./arbitrary-texts";
import { yamlText } from "./arbitrary-yaml";
import { enabledValues, flatten, plainValue } from "./plain-values";

function parse(text: string) {
  return parseText({ path: "a.yaml", text, format: "yaml" });
}

function values(text: string): [string, unknown][] {
  return parse(text).entries.map(({ key, value }) => [key, plainValue(value)]);
}

function codes(text: string) {
  return parse(text).diagnostics.map(({ code, span }) => [code, span?.line ?? null, span?.column ?? null]);
}

/** Small cases after YAML 1.2.2; the number of the specification's example stands with each. */
const VALID: [example: string, text: string, entries: [string, unknown][]][] = [
  [
    "2.2",
    "american: 65\nrbi: 147 # batted in\navg: 0.278",
    [
      ["american", 65],
      ["rbi", 147],
      ["avg", 0.278],
    ],
  ],
  [
    "2.3",
    "a:\n- x\n- y\nb:\n  - z",
    [
      ["a", ["x", "y"]],
      ["b", ["z"]],
    ],
  ],
  [
    "2.4",
    "-\n  name: a\n  hr: 65\n-\n  name: b\n  hr: 63",
    [
      ["0.name", "a"],
      ["0.hr", 65],
      ["1.name", "b"],
      ["1.hr", 63],
    ],
  ],
  [
    "2.6",
    "a: {hr: 65, avg: 0.278}\nb: {\n  hr: 63,\n  }",
    [
      ["a.hr", 65],
      ["a.avg", 0.278],
      ["b.hr", 63],
    ],
  ],
  [
    "2.7",
    "# one\n---\na: 1\nb: 2\n\n# two\n---\na: 3",
    [
      ["0.a", 1],
      ["0.b", 2],
      ["1.a", 3],
    ],
  ],
  [
    "2.10",
    "hr:\n- a\n# following\n- &s b\nrbi:\n- *s\n- c",
    [
      ["hr.0", "a"],
      ["hr.1", "b"],
      ["rbi.0", "b"],
      ["rbi.1", "c"],
    ],
  ],
  ["2.13", "k: |\n  \\//||\\/||\n  // ||", [["k", "\\//||\\/||\n// ||\n"]]],
  ["2.14", "k: >\n  a\n  b\n", [["k", "a b\n"]]],
  [
    "2.17",
    "u: \"Sosa\\u263A\"\nh: \"\\x0d\\x0a\"\ns: '\"Howdy!\"'\nq: ' # not a ''comment''.'",
    [
      ["u", "Sosa☺"],
      ["h", "\r\n"],
      ["s", '"Howdy!"'],
      ["q", " # not a 'comment'."],
    ],
  ],
  [
    "2.18",
    'plain:\n  over\n  lines\nquoted: "so\n  too"',
    [
      ["plain", "over lines"],
      ["quoted", "so too"],
    ],
  ],
  [
    "2.19",
    "a: 12345\nb: +12345\nc: 0o14\nd: 0xC",
    [
      ["a", 12345],
      ["b", 12345],
      ["c", 12],
      ["d", 12],
    ],
  ],
  [
    "2.20",
    "a: 1.23015e+3\nb: 12.3015e+02\nc: -.inf\nd: .nan",
    [
      ["a", 1230.15],
      ["b", 1230.15],
      ["c", "-.inf"],
      ["d", ".nan"],
    ],
  ],
  [
    "2.21",
    "null:\nb: true\ns: '012345'\nn: ~",
    [
      ["null", null],
      ["b", true],
      ["s", "012345"],
      ["n", null],
    ],
  ],
  [
    "2.23",
    "a: !!str 80\nb: !own 7",
    [
      ["a", "80"],
      ["b", "7"],
    ],
  ],
  [
    "10.2",
    "a: 800 mA\nb: 1/16\nc: off\nd: 12:30",
    [
      ["a", "800 mA"],
      ["b", "1/16"],
      ["c", "off"],
      ["d", "12:30"],
    ],
  ],
];

type Place = [code: string, line: number, column: number];

const INVALID: [what: string, text: string, keys: string[], faults: Place[]][] = [
  ["a tab for an indentation", "a:\n\tb: 1", ["a", "b"], [["unreadable-line", 2, 1]]],
  ["an open bracket", "a: [1, 2", ["a"], [["unreadable-line", 1, 9]]],
  ["an open quote", 'a: "x', ["a"], [["unreadable-line", 1, 6]]],
  ["a name twice", "a: 1\na: 2", ["a", "a"], [["duplicate-key", 1, 1]]],
  ["an alias of nothing", "a: *b\nc: 1", ["c"], [["alias", 1, 4]]],
  ["an alias of itself", "a: &a\n  b: *a\n  c: 1", ["a.c"], [["alias", 2, 6]]],
  ["a key that is a list", "? [a]\n: 1\nb: 2", ["b"], [["unreadable-line", 1, 3]]],
];

describe("YAML", () => {
  it.each(VALID)("(example %s) %j says what the specification says", (_, text, entries) => {
    expect(values(text)).toEqual(entries);
    expect(codes(text)).toEqual([]);
  });

  it.each(INVALID)(
    "with %s (%j) is read as far as it goes, with the place of the fault",
    (_, text, keys, faults) => {
      const { entries, diagnostics } = parse(text);
      expect(entries.map(({ key }) => key)).toEqual(keys);
      expect(codes(text)).toEqual(faults);
      for (const { message } of diagnostics) expect(message).toMatch(/\.$/);
    },
  );

  it("reads what an alias repeats at its anchor's place", () => {
    const { entries } = parse("a: &base\n  run: 800\n  s: [1, 2]\nb: *base\nc:\n  <<: *base\n  run: 900");
    expect(
      entries.map(({ key, raw, keySpan, valueSpan }) => [key, raw, keySpan.line, valueSpan.line]),
    ).toEqual([
      ["a.run", "800", 2, 2],
      ["a.s", "[1, 2]", 3, 3],
      ["b.run", "800", 4, 2],
      ["b.s", "[1, 2]", 4, 3],
      ["c.s", "[1, 2]", 6, 3],
      ["c.run", "900", 7, 7],
    ]);
  });

  it("refuses a text that multiplies itself by aliases", () => {
    const bomb = ["a0: &a0 [x, x]"];
    for (let i = 1; i < 40; i++) bomb.push(`a${i}: &a${i} [${`*a${i - 1}, `.repeat(9)}]`);
    const { entries, diagnostics } = parse(bomb.join("\n"));
    expect(entries.length).toBeLessThan(10_100);
    expect(diagnostics.filter(({ severity }) => severity === "error")).toMatchObject([
      { code: "alias", message: expect.stringContaining("multiplies the text beyond 10000 values") },
    ]);
  });

  it.each([
    ["flow lists", `a: ${"[".repeat(20_000)}${"]".repeat(20_000)}`],
    ["lists in lists", `${"- ".repeat(20_000)}1`],
    ["keys of keys", `${"? ".repeat(20_000)}1`],
  ])("refuses %s that nest too deep and reads the next document", (_, deep) => {
    expect(values(`${deep}\n---\nb: 1`)).toEqual([["b", 1]]);
    expect(codes(deep)[0]?.[0]).toBe("too-deep");
  });

  it("takes a key in a comment for a disabled key of the map at its column", () => {
    const text =
      "x:\n  run: 800 # rms\n  # hold: 400\n  # note: see below\n# top: 1\ny:\n  #run: 650\n  a:\n    b: 1\n  # c: 2 A";
    expect(parse(text).entries.map(({ key, disabled, comment }) => [key, disabled, comment])).toEqual([
      ["x.run", false, "rms"],
      ["x.hold", true, null],
      ["top", true, null],
      ["y.a.b", false, null],
      ["y.c", true, null],
    ]);
  });

  it("keeps names such as __proto__ as names and changes no object by them", () => {
    expect(values("__proto__:\n  polluted: 1\nconstructor: {prototype: {polluted: 2}}")).toEqual([
      ["__proto__.polluted", 1],
      ["constructor.prototype.polluted", 2],
    ]);
    expect(({} as Record<string, unknown>)["polluted"]).toBeUndefined();
  });

  /**
   * Where the outside reader differs on purpose: it refuses a name that stands twice (here the later counts, and it is
   * said), and gives a plain number with a unit as a text (here number and unit, compared as its spelling).
   */
  it("says the same as an outside reader", { timeout: TIMEOUT }, () => {
    fc.assert(
      fc.property(yamlText, ({ text }) => {
        const own = parse(text);
        fc.pre(own.diagnostics.length === 0 && own.entries.some(({ disabled }) => !disabled));
        expect(enabledValues(own)).toEqual(flatten(parseOutside(text)));
      }),
      RUNS,
    );
  });
});
