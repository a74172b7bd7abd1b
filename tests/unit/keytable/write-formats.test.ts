import { describe, expect, it } from "vitest";
import type { KeyRule } from "@/lib/domain/key-table";
import { write } from "./support";

const RULES: KeyRule[] = [
  { key: "x.run", parameter: "run_current", axis: "x", unit: "mA", basis: "rms" },
  { key: "y.run", parameter: "run_current", axis: "y", unit: "mA", basis: "rms" },
  { key: "run.{axis}", parameter: "run_current", unit: "mA", basis: "rms" },
];

/** The run current of x set to 0.9 A rms in a file of that name. */
function written(path: string, text: string) {
  return write(
    { text, rules: RULES, path },
    { axis: "x", parameter: "run_current", value: 0.9, unit: "A", basis: "rms" },
  );
}

describe("a wanted value", () => {
  it.each([
    ["a.json", '{"x": {"run": 800.0, "b": 1}} // c', '{"x": {"run": 900.0, "b": 1}} // c'],
    ["a.json", '{"x": {"run": "800 mA"}}', '{"x": {"run": "900 mA"}}'],
    ["a.json", '{"x": {"run": "\\u2248 800"}}', null],
    ["a.json", '{"x": {"run": "\\u0038\\u0030"}}', null],
    ["a.json", '{"run": [800, 700]}', '{"run": [900, 700]}'],
    ["a.toml", "[x]\nrun = 1_800 # mA", "[x]\nrun = 900 # mA"],
    ["a.toml", "[x]\nrun = 8e2", "[x]\nrun = 900.0"],
    ["a.toml", "[x]\nrun = 0x320", "[x]\nrun = 0x384"],
    ["a.toml", "[x]\nrun = 0o1440", "[x]\nrun = 900"],
    ["a.toml", "x.run = '0.80 A'", "x.run = '0.90 A'"],
    ["a.yaml", "x:\n  run: 800 mA   # c", "x:\n  run: 900 mA   # c"],
    ["a.yaml", "run:\n- 800\n- 700", "run:\n- 900\n- 700"],
    ["a.properties", "x.run : 800", "x.run : 900"],
    ["a.properties", "x.run = 8\\\n  00 mA", null],
    ["a.csv", "axis;run\nx; 800.0\ny;700", "axis;run\nx; 900.0\ny;700"],
    ["a.csv", "key,value,unit\nx.run,0.8,A\n", "key,value,unit\nx.run,0.9,A\n"],
  ])("in %s, %j, is written as the text writes its like", (path, text, after) => {
    const { texts, refused } = written(path, text);
    expect(texts[0]).toBe(after ?? text);
    expect(refused).toHaveLength(after === null ? 1 : 0);
  });

  it("for a key that repeats another by an alias changes both, and says so", () => {
    const { texts, applied } = written("a.yaml", "x: &d\n  run: 800\ny: *d\n");
    expect(texts).toEqual(["x: &d\n  run: 900\ny: *d\n"]);
    expect(applied).toMatchObject([{ axis: "x", alsoAxes: ["Y"] }]);
  });
});
