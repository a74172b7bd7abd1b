import { describe, expect, it } from "vitest";
import { editDocument } from "@/lib/parsers/edit-document";
import { parseText } from "@/lib/parsers/parse-text";
import type { Edit, Format } from "@/lib/parsers/types";

function edit(format: Format, text: string, ...edits: [key: string, raw: string, element?: number][]) {
  const document = parseText({ path: "a", text, format });
  const wanted = edits.map(([key, raw, element]): Edit => {
    const entry = document.entries.findLastIndex((one) => one.key === key);
    return { entry, element: element ?? null, raw };
  });
  const { document: after, refused } = editDocument(document, wanted);
  return { text: after.text, reasons: refused.map(({ reason }) => reason) };
}

describe("an edit", () => {
  it.each<[Format, string, string, string, string]>([
    ["lines", "run = 800   ; note\r\nb=1", "run", "1000", "run = 1000   ; note\r\nb=1"],
    ["lines", "run =\nb=1", "run", " 800", "run = 800\nb=1"],
    ["lines", "run = # later", "run", "800", "run =800 # later"],
    ["lines", "run 800", "run", '"800 mA"', 'run "800 mA"'],
    ["lines", "# run = 800", "run", "900", "# run = 900"],
    ["lines", "\ufeffrun = 800", "run", "900", "\ufeffrun = 900"],
    ["defines", "#define RUN 800 // mA", "RUN", "900", "#define RUN 900 // mA"],
    ["defines", "#define RUN\t(800)\n", "RUN", "(900)", "#define RUN\t(900)\n"],
    ["defines", "//#define RUN 800", "RUN", "900", "//#define RUN 900"],
    ["toml", "run = 800   # note\r\nb=1", "run", "1000", "run = 1000   # note\r\nb=1"],
    ["toml", "# run = 800", "run", "900", "# run = 900"],
    ["toml", '[a]\nx.run = "800 mA"', "a.x.run", '"900 mA"', '[a]\nx.run = "900 mA"'],
    ["yaml", "a:\n  run: 800   # note\r\nb: 1", "a.run", "1000", "a:\n  run: 1000   # note\r\nb: 1"],
    ["yaml", "a: 1\n# run: 800", "run", "900", "a: 1\n# run: 900"],
    ["yaml", "a: &c {run: 800}\nb: *c", "b.run", "900", "a: &c {run: 900}\nb: *c"],
    ["yaml", "run: |\n  fast\nb: 1", "run", "800", "run: 800\nb: 1"],
    ["yaml", "run:\nb: 1", "run", " 800", "run: 800\nb: 1"],
    ["properties", "run : 8\\\n  00\nb=1", "run", "900", "run : 900\nb=1"],
    ["properties", "#run=800", "run", "900", "#run=900"],
    ["env", "export RUN='800' # note\nB=1", "RUN", "'900'", "export RUN='900' # note\nB=1"],
    ["csv", 'axis;run;hold\nx; "800" ;400', "x.run", "900", "axis;run;hold\nx; 900 ;400"],
    ["json", '{"run": 800, // note\n"b":1}', "run", "1000", '{"run": 1000, // note\n"b":1}'],
    ["json", '{ // "run": 800,\n}', "run", "900", '{ // "run": 900,\n}'],
    ["json", '\ufeff{"a":{"run":null}}', "a.run", '"800 mA"', '\ufeff{"a":{"run":"800 mA"}}'],
    ["defines", "#define RUN 800", "RUN", "{ 1, \\\n 2 }", "#define RUN { 1, \\\n 2 }"],
  ])("in %s %j replaces the value", (format, text, key, raw, after) => {
    expect(edit(format, text, [key, raw])).toEqual({ text: after, reasons: [] });
  });

  it("of one element leaves the other elements and their spacing", () => {
    expect(edit("lines", "s = { 80 , 80,  400 } # xyz", ["s", "1600", 2]).text).toBe(
      "s = { 80 , 80,  1600 } # xyz",
    );
    expect(edit("defines", "#define S { 80, \\\n  400 }", ["S", "(90)", 1]).text).toBe(
      "#define S { 80, \\\n  (90) }",
    );
  });

  it("may come with others of the same line", () => {
    expect(edit("lines", "s = 1, 2, 3", ["s", "30", 2], ["s", "100", 0])).toEqual({
      text: "s = 100, 2, 30",
      reasons: [],
    });
  });

  it.each<[Format, string, string, string]>([
    ["lines", "run = 800", "run", "900 # hot"],
    ["lines", "run = 800", "run", "900\nb = 1"],
    ["lines", "run 800", "run", "= 900"],
    ["lines", "run = 800", "run", '"open'],
    ["lines", "run = 800\nb = 2", "run", "900\r"],
    ["lines", "# run = 800", "run", "as fast as it goes"],
    ["toml", "run = 800", "run", "900 mA"],
    ["toml", "run = 800", "run", "900 # hot"],
    ["toml", "run = 800", "run", "900\nb = 1"],
    ["yaml", "run: 800", "run", "900 # hot"],
    ["yaml", "run: 800", "run", "900\nb: 1"],
    ["yaml", "run: 800", "run", "*c"],
    ["yaml", "a: {run: 800}", "a.run", "900, b: 1"],
    ["properties", "run=800", "run", "900\nb=1"],
    ["properties", "run=800\nb=1", "run", "900\\"],
    ["env", "RUN=800", "RUN", "900 # hot"],
    ["env", "RUN=800", "RUN", '"open'],
    ["csv", "run,800", "run", "900,1000"],
    ["csv", "run,800", "run", '"open'],
    ["json", '{"run": 800}', "run", "900 mA"],
    ["json", '{"run": 800}', "run", '900, "b": 1'],
    ["json", '{"run": 800}', "run", "900 // hot"],
    ["json", '{"run": 800}', "run", '{"b": 1}'],
    ["defines", "#define RUN 800", "RUN", "900 // hot"],
    ["defines", "#define RUN 800", "RUN", "900\n#define B 1"],
    ["defines", "/* #define RUN 800 */", "RUN", '"*/"'],
    ["defines", "#define RUN 800\n#define B 1", "RUN", "900 \\"],
  ])("in %s %j that would read as more than a value is refused", (format, text, key, raw) => {
    const result = edit(format, text, [key, raw]);
    expect(result.text).toBe(text);
    expect(result.reasons).toHaveLength(1);
    expect(result.reasons[0]).toContain("text is left as it was");
  });

  it("that is refused does not stop the others", () => {
    const text = "/* #define A 1 */\n#define B 2\n#define C 3\n";
    const result = edit("defines", text, ["A", '"*/"'], ["B", "20"], ["C", "30"]);
    expect(result.text).toBe("/* #define A 1 */\n#define B 20\n#define C 30\n");
    expect(result.reasons).toHaveLength(1);
  });

  it("of a value that another edit already changes is refused", () => {
    expect(edit("lines", "s = 1, 2", ["s", "3"], ["s", "4", 0])).toMatchObject({
      text: "s = 3",
      reasons: ["Another edit already changes this value."],
    });
    expect(edit("lines", "s =", ["s", " 3"], ["s", " 4"]).reasons).toHaveLength(1);
  });

  it("of a key or an element that is not there is refused", () => {
    expect(edit("lines", "s = 1, 2", ["t", "3"]).reasons).toEqual(["The text has no such key."]);
    expect(edit("lines", "s = 1, 2", ["s", "3", 2]).reasons).toEqual(["“s” on line 1 has no element 2."]);
    expect(edit("lines", "s = 1", ["s", "3", 0]).reasons).toEqual(["“s” on line 1 has no element 0."]);
  });
});
