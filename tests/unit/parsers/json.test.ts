import fc from "fast-check";
import { parse as parseOutside } from "jsonc-parser";
import { describe, expect, it } from "vitest";
import { parseText } from "@/lib/parsers/parse-text";
import type { ParsedValue } from "@/lib/parsers/types";
import { jsonText } from "./arbitrary-json";
import { RUNS } from "./arbitrary-texts";
import { enabledValues, flatten, plainValue } from "./plain-values";

function read(text: string) {
  const { entries, diagnostics } = parseText({ path: "a.json", text, format: "json" });
  return {
    values: entries.map(({ key, value }): [string, unknown] => [key, plainValue(value)]),
    entries,
    codes: diagnostics.map(({ code, span }) => [code, span?.line ?? null, span?.column ?? null]),
    sentences: diagnostics.map(({ message }) => message),
  };
}

describe("JSON", () => {
  it("gives each member the names on the way to it, lists of plain values whole, and lists of objects by number", () => {
    expect(
      read('{"axes":{"x":{"run_ma":800}},"scale":[80,80.5,4e2],"drives":[{"id":"a"},7,[1,2]],"none":[]}')
        .values,
    ).toEqual([
      ["axes.x.run_ma", 800],
      ["scale", [80, 80.5, 400]],
      ["drives.0.id", "a"],
      ["drives.2", [1, 2]],
      ["drives.1", 7],
      ["none", []],
    ]);
  });

  it("reads each kind of value", () => {
    expect(read('{"a":true,"b":false,"c":null,"d":"800 mA","e":-0.5,"f":1e999}').values).toEqual([
      ["a", true],
      ["b", false],
      ["c", null],
      ["d", "800 mA"],
      ["e", -0.5],
      ["f", "1e999"],
    ]);
  });

  // RFC 8259, section 7.
  it.each([
    ['"\\u005C"', "\\"],
    ['"\\""', '"'],
    ['"\\/\\b\\f\\n\\r\\t"', "/\b\f\n\r\t"],
    ['"\\uD834\\uDD1E"', "\u{1d11e}"],
  ])("reads the escapes of %s", (raw, said) => {
    expect(read(`{"k": ${raw}}`).values).toEqual([["k", said]]);
  });

  // RFC 8259, section 13.
  it("reads the two examples of RFC 8259", () => {
    const image =
      '{"Image":{"Width":800,"Height":600,"Title":"View from 15th Floor","Thumbnail":{"Url":"http://www.example.com/image/481989943","Height":125,"Width":100},"Animated":false,"IDs":[116,943,234,38793]}}';
    expect(read(image).values).toEqual([
      ["Image.Width", 800],
      ["Image.Height", 600],
      ["Image.Title", "View from 15th Floor"],
      ["Image.Thumbnail.Url", "http://www.example.com/image/481989943"],
      ["Image.Thumbnail.Height", 125],
      ["Image.Thumbnail.Width", 100],
      ["Image.Animated", false],
      ["Image.IDs", [116, 943, 234, 38793]],
    ]);
    const places =
      '[{"precision":"zip","Latitude":37.7668,"City":"SAN FRANCISCO"},{"precision":"zip","Latitude":37.371991,"City":"SUNNYVALE"}]';
    expect(read(places).values.map(([key]) => key)).toEqual([
      "0.precision",
      "0.Latitude",
      "0.City",
      "1.precision",
      "1.Latitude",
      "1.City",
    ]);
  });

  it("gives a comment behind a value to its key, and takes a member in a comment for a disabled key", () => {
    const { entries } = read(
      '{\n  "a": 1, // one\n  // "b": 2,\n  // prose: it is\n  /* "c": 3 */\n  "d": [1] /* four */\n}',
    );
    expect(entries.map(({ key, disabled, comment }) => [key, disabled, comment])).toEqual([
      ["a", false, "one"],
      ["b", true, null],
      ["c", true, null],
      ["d", false, "four"],
    ]);
  });

  it("lets the later of two members of one name count, with all that stands in it", () => {
    const { entries, codes } = read('{"a":1,"b":{"c":2,"d":3},\n"a":4,"b":{"c":5}}');
    expect(entries.map(({ key, shadowed }) => [key, shadowed])).toEqual([
      ["a", true],
      ["b.c", true],
      ["b.d", true],
      ["a", false],
      ["b.c", false],
    ]);
    expect(codes).toEqual([
      ["duplicate-key", 1, 2],
      ["duplicate-key", 1, 8],
    ]);
  });

  it("keeps names such as __proto__ as names and changes no object by them", () => {
    expect(read('{"__proto__":{"polluted":1},"constructor":{"prototype":{"polluted":2}}}').values).toEqual([
      ["__proto__.polluted", 1],
      ["constructor.prototype.polluted", 2],
    ]);
    expect(({} as Record<string, unknown>)["polluted"]).toBeUndefined();
  });

  it.each<[string, unknown[], [string, number, number][]]>([
    ['{"a":1 "b":2}', ["a", "b"], [["not-standard", 1, 8]]],
    ['{"a" 1}', ["a"], [["not-standard", 1, 6]]],
    ['{"a":1,}', ["a"], [["not-standard", 1, 7]]],
    ['{"a":[1,2,]}', ["a"], [["not-standard", 1, 10]]],
    ['{a:1,"b":2}', ["b"], [["unreadable-line", 1, 2]]],
    ['{"a":nul,"b":2}', ["b"], [["unreadable-line", 1, 6]]],
    ['{"a":"open\n,"b":2}', ["b"], [["unreadable-line", 1, 6]]],
    ['{"a":"\\x"}', [], [["unreadable-line", 1, 6]]],
    ['{"a":1}}', ["a"], [["unreadable-line", 1, 8]]],
    ['{"a":1}\n{"b":1}', ["a"], [["unreadable-line", 2, 1]]],
    [
      '{"a":1]',
      ["a"],
      [
        ["unreadable-line", 1, 7],
        ["unclosed-list", 1, 1],
      ],
    ],
    [
      '{"a":[1,2',
      ["a.0", "a.1"],
      [
        ["unclosed-list", 1, 6],
        ["unclosed-list", 1, 1],
      ],
    ],
    ['{"a":}', [], [["unreadable-line", 1, 6]]],
    ["5", [], [["unreadable-line", 1, 1]]],
    [
      '{"a":1 /* x',
      ["a"],
      [
        ["unclosed-comment", 1, 8],
        ["unclosed-list", 1, 1],
      ],
    ],
  ])("reads what can be read of %j and names the place of the rest", (text, keys, codes) => {
    const found = read(text);
    expect(found.values.map(([key]) => key)).toEqual(keys);
    expect(found.codes).toEqual(codes);
    for (const sentence of found.sentences) expect(sentence).toMatch(/[.]$/);
  });

  it("reads no deeper than its limit, says where that is, and reads on behind it", () => {
    const deep = `{"a":${"[".repeat(100_000)}${"]".repeat(100_000)},"b":1}`;
    const { values, codes } = read(deep);
    expect(values).toEqual([["b", 1]]);
    expect(codes).toEqual([["too-deep", 1, 37]]);
  });

  /**
   * Where `jsonc-parser` differs: it loses a member named `__proto__`, which is kept here; and it skips faults without
   * naming what it leaves out, so only texts without any are compared.
   */
  it("says the same as an outside reader", () => {
    fc.assert(
      fc.property(jsonText, ({ text }) => {
        fc.pre(!text.includes("__proto__"));
        const outside = parseOutside(text.replace(/^\ufeff/, ""), [], {
          allowTrailingComma: true,
        }) as unknown;
        const own = enabledValues(parseText({ path: "a", text, format: "json" }));
        expect(own).toEqual(flatten(outside));
      }),
      RUNS,
    );
  });

  it("gives a list's elements their own places", () => {
    const [entry] = read('{"s": [ 80 , "µ",\n 400 ]}').entries;
    const value = entry?.value as Extract<ParsedValue, { kind: "list" }>;
    expect(value.items.map(({ raw, span }) => [raw, span.line, span.column])).toEqual([
      ["80", 1, 9],
      ['"µ"', 1, 14],
      ["400", 2, 2],
    ]);
  });
});
