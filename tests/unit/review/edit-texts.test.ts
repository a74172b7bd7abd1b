import { describe, expect, it } from "vitest";
import type { ParameterEdit } from "@/lib/keytable/types";
import { editTextsOf } from "@/lib/review/edit-texts";

const keyTable = {
  rules: [
    { key: "axis.{axis}.run_ma", parameter: "run_current" as const, unit: "mA", basis: "rms" as const },
    { key: "axis.{axis}.accel", parameter: "acceleration" as const, unit: "mm/s^2" },
    { key: "axis.{axis}.jerk", parameter: "jerk" as const, unit: "mm/s^3" },
  ],
};

function edit(text: string, changes: readonly ParameterEdit[], path = "gantry.conf") {
  const { files, applied, refused } = editTextsOf({ files: [{ path, text }], keyTable, changes });
  return { text: files[0]?.text, applied, refused };
}

const TEXT = "[axis.x]\nrun_ma = 800   # per winding\n# jerk = 20\n\n[axis.y]\n  run_ma : 700\n";
const accel = (axis: string): ParameterEdit => ({
  axis,
  parameter: "acceleration",
  value: 2.5,
  unit: "m/s^2",
});

describe("editTextsOf", () => {
  it("changes a value that stands there", () => {
    const change: ParameterEdit = {
      axis: "x",
      parameter: "run_current",
      value: 0.9,
      unit: "A",
      basis: "rms",
    };
    expect(edit(TEXT, [change])).toMatchObject({
      text: TEXT.replace("800", "900"),
      applied: [{ how: "changed", line: 2 }],
      refused: [],
    });
  });

  it("enables a key that stands commented out, with the wanted value", () => {
    const change: ParameterEdit = { axis: "x", parameter: "jerk", value: 30, unit: "mm/s^3" };
    expect(edit(TEXT, [change])).toMatchObject({
      text: TEXT.replace("# jerk = 20", "jerk = 30"),
      applied: [{ axis: "x", parameter: "jerk", how: "enabled", line: 3 }],
      refused: [],
    });
  });

  it("adds a missing key in its section, as its like is written", () => {
    expect(edit(TEXT, [accel("x")])).toMatchObject({
      text: TEXT.replace("per winding\n", "per winding\naccel = 2500\n"),
      applied: [{ axis: "x", how: "added", line: 3 }],
    });
    expect(edit(TEXT, [accel("y")]).text).toBe(`${TEXT}  accel : 2500\n`);
  });

  it("adds a #define beside those of its axis, in their case", () => {
    const table = {
      rules: [
        { key: "{axis}_RUN_MA", parameter: "run_current" as const, unit: "mA", basis: "rms" as const },
        { key: "{axis}_ACCEL", parameter: "acceleration" as const, unit: "mm/s^2" },
      ],
    };
    const text = "#define X_RUN_MA 800 // per winding\n#define Y_RUN_MA 700\n// #define Y_ACCEL 100\n";
    const { files } = editTextsOf({
      files: [{ path: "machine.h", text }],
      keyTable: table,
      changes: [accel("x"), accel("y")],
    });
    expect(files[0]?.text).toBe(
      "#define X_RUN_MA 800 // per winding\n#define X_ACCEL 2500\n#define Y_RUN_MA 700\n#define Y_ACCEL 2500\n",
    );
  });

  it("keeps the line ends of the text", () => {
    const crlf = TEXT.replaceAll("\n", "\r\n");
    expect(edit(crlf, [accel("x")]).text).toBe(
      crlf.replace("per winding\r\n", "per winding\r\naccel = 2500\r\n"),
    );
  });

  it("refuses an axis that the text does not speak of, and leaves the text as it was", () => {
    expect(edit(TEXT, [accel("z")])).toMatchObject({
      text: TEXT,
      applied: [],
      refused: [{ axis: "z", parameter: "acceleration" }],
    });
  });

  it("leaves nothing behind of a key whose value cannot be written", () => {
    const wrong: ParameterEdit = { axis: "x", parameter: "acceleration", value: 4, unit: "mA" };
    expect(edit(TEXT, [wrong])).toMatchObject({
      text: TEXT,
      applied: [],
      refused: [{ parameter: "acceleration" }],
    });
  });
});
