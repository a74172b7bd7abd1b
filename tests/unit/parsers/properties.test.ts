import { describe, expect, it } from "vitest";
import { parseText } from "@/lib/parsers/parse-text";
import { plainValue } from "./plain-values";

function parse(text: string) {
  return parseText({ path: "a.properties", text, format: "properties" });
}

function values(text: string): [string, unknown][] {
  return parse(text).entries.map(({ key, value }) => [key, plainValue(value)]);
}

describe("properties", () => {
  // The examples of the class description of java.util.Properties (method load).
  it.each<[string, [string, unknown][]]>([
    ["Truth = Beauty", [["Truth", "Beauty"]]],
    [" Truth:Beauty", [["Truth", "Beauty"]]],
    ["Truth                    :Beauty", [["Truth", "Beauty"]]],
    [
      "fruits                           apple, banana, pear, \\\n                                  cantaloupe, watermelon, \\\n                                  kiwi, mango",
      [["fruits", "apple, banana, pear, cantaloupe, watermelon, kiwi, mango"]],
    ],
    ["cheeses", [["cheeses", null]]],
    ["\\:\\=", [[":=", null]]],
  ])("%j says what the class description says", (text, said) => {
    expect(values(text)).toEqual(said);
  });

  it.each<[string, unknown]>([
    ["k = \\u00b5m", "µm"],
    ["k = a\\tb\\nc\\rd\\fe", "a\tb\nc\rd\fe"],
    ["k = C:\\\\dir", "C:\\dir"],
    ["k = \\z\\\"\\'", "z\"'"],
    ["k =   a\\\r\n   b", "ab"],
    ["k = # no comment", "# no comment"],
    ["k = 80, 80.5", [80, 80.5]],
    ["k = 800 mA", "800 mA"],
    ['k = "800"', '"800"'],
  ])("%j reads its value", (text, said) => {
    expect(values(text)).toEqual([["k", said]]);
  });

  it("keeps comments with # and !, which no backslash continues, and finds disabled keys in them", () => {
    const text = "# a note \\\nrun=800\n! hold=400\n#see = the manual of it\n\n";
    expect(parse(text).entries.map(({ key, disabled }) => [key, disabled])).toEqual([
      ["run", false],
      ["hold", true],
    ]);
  });

  it("comes to an end where a comment of one word ends in a backslash", () => {
    const text = "#run\\\n!\\\nhold=400\n";
    expect(parse(text).entries.map(({ key }) => key)).toEqual(["hold"]);
  });

  it("lets the later of two keys count and names an escape that is cut short", () => {
    const { entries, diagnostics } = parse("a=1\na=\\u00b");
    expect(entries.map(({ shadowed }) => shadowed)).toEqual([true, false]);
    expect(diagnostics.map(({ code, span }) => [code, span?.line])).toEqual([
      ["duplicate-key", 1],
      ["not-standard", 2],
    ]);
  });
});
