import { describe, expect, it } from "vitest";
import { parseText } from "@/lib/parsers/parse-text";
import { recogniseFormat } from "@/lib/parsers/recognise";

const LINES = "[axis.x]\nrun_ma = 800\naccel = 3000\n";
const HEADER = "#define RUN_MA 800\n//#define ACCEL 3000\n#if FAST\n#endif\n";

describe("the format", () => {
  it.each([
    ["a.conf", LINES, "lines"],
    ["a.h", HEADER, "defines"],
    ["a.h", LINES, "lines"],
    ["a.conf", HEADER, "defines"],
    ["noname", LINES, "lines"],
    ["noname", HEADER, "defines"],
    ["a.txt", "run_ma 800\naccel 3000", "lines"],
    ["a.conf", "# only a comment\n", "lines"],
    ["a.h", "// only a comment\n", "defines"],
    ["a.json", '{"run_ma": 800}', "json"],
    ["noname", '{"run_ma": 800}', "json"],
    ["a.conf", '{\n  // rms\n  "x": { "run_ma": 800 }\n}', "json"],
    ["noname", '[{"axis": "x"}]', "json"],
    ["a.toml", LINES, "toml"],
    ["a.conf", '[[axis]]\nname = "x"\nrun = 800\n[[axis]]\nname = "z"\nrun = 700', "toml"],
    ["noname", 'x = { run = 800, hold = "400 mA" }', "toml"],
    ["a.yaml", "run: 800", "yaml"],
    ["a.conf", "axes:\n  x:\n    run: 800\n", "yaml"],
    ["noname", "axes:\n- run: 800\n- run: 700\n", "yaml"],
    ["noname", "run_ma: 800\naccel: 3000", "lines"],
    ["a.properties", "x.run=800\ny.run=700", "properties"],
    ["noname", "! drive\nx\\:run=800\nlabel=\\u00b5", "properties"],
    [".env", "RUN_MA=800\nHOLD_MA=400", "env"],
    ["noname", "export RUN_MA=800\nexport HOLD_MA=400", "env"],
    ["a.csv", "axis,run_ma\nx,800", "csv"],
    ["noname", "axis;run_ma;hold_ma\nx;800;400\ny;700;350", "csv"],
    ["noname", "/*\n * Head\n */\n#ifndef A_H\n#define A_H\n#endif", "defines"],
  ])("of %s with %j is %s", (path, text, format) => {
    const { format: found, ranking } = recogniseFormat({ path, text });
    expect(found).toBe(format);
    expect(ranking[0]?.format).toBe(format);
    expect(ranking[0]?.reasons.length).toBeGreaterThan(0);
  });

  it.each(["", "Once there was a machine that kept its step, and another that lost it.\n", "<a><b/></a>"])(
    "of %j is none",
    (text) => expect(recogniseFormat({ path: "noname", text }).format).toBeNull(),
  );

  it("that is none leads to a sentence, and the text is read as lines", () => {
    const document = parseText({ path: "noname", text: "<a>\n" });
    expect(document.format).toBe("lines");
    expect(document.diagnostics[0]).toMatchObject({ code: "unknown-format", severity: "warning" });
    expect(document.diagnostics[0]?.message).toContain("noname");
  });

  it("that is given is not sought", () => {
    expect(parseText({ path: "a.h", text: HEADER, format: "lines" }).format).toBe("lines");
  });
});
