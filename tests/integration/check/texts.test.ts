import { beforeAll, describe, expect, test } from "vitest";
import type { MergeTexts } from "@/lib/schemas/texts";
import { editTexts } from "@/lib/services/texts/edit";
import { mergeTexts } from "@/lib/services/texts/merge";
import type { Context } from "@/lib/services/kernel/context";
import { FileContent } from "@/models/revisions";
import { person } from "@/tests/support/world";

let viewer: Context;
beforeAll(async () => {
  viewer = await person("viewer");
});

const TEXT = "[axis.x]\nrun_ma = 800   # per winding\naccel = 3000\n";
const keyTable = {
  rules: [
    { key: "axis.{axis}.run_ma", parameter: "run_current" as const, unit: "mA", basis: "rms" as const },
    { key: "axis.{axis}.accel", parameter: "acceleration" as const, unit: "mm/s^2" },
  ],
};
const sent = (text: string) => [{ path: "gantry.conf", text }];

describe("writing parameters into sent texts", () => {
  test("changes nothing but the value's span and says where", async () => {
    const changes = [
      { axis: "x", parameter: "run_current" as const, value: 0.9, unit: "A", basis: "rms" as const },
    ];
    const answer = await editTexts(viewer, { files: sent(TEXT), keyTable, changes });
    expect(answer).toEqual({
      files: sent(TEXT.replace("800", "900")),
      applied: [
        { axis: "x", parameter: "run_current", path: "gantry.conf", line: 2, alsoAxes: [], how: "changed" },
      ],
      refused: [],
    });
  });

  test("refuses a unit of another dimension, with the reason", async () => {
    const changes = [{ axis: "x", parameter: "acceleration" as const, value: 4, unit: "mA" }];
    const answer = await editTexts(viewer, { files: sent(TEXT), keyTable, changes });
    expect(answer.files).toEqual(sent(TEXT));
    expect(answer.applied).toEqual([]);
    expect(answer.refused).toEqual([
      { axis: "x", parameter: "acceleration", reason: expect.stringContaining("mA") },
    ]);
  });

  test("gives bytes back as bytes, in the encoding that they came in", async () => {
    const bytes = Buffer.from(`# f\u00fcr die Halle\r\n${TEXT}`, "latin1");
    const changes = [{ axis: "x", parameter: "acceleration" as const, value: 2.5, unit: "m/s^2" }];
    const files = [{ path: "gantry.conf", base64: bytes.toString("base64") }];
    const answer = await editTexts(viewer, { files, keyTable, changes });
    const back = Buffer.from(answer.files[0]?.base64 ?? "", "base64").toString("latin1");
    expect(back).toBe(bytes.toString("latin1").replace("3000", "2500"));
  });
});

describe("merging sent texts", () => {
  const request = (ours: string, theirs: string, more: Partial<MergeTexts> = {}): MergeTexts => ({
    base: sent(TEXT),
    ours: sent(ours),
    theirs: sent(theirs),
    keyTable,
    ...more,
  });

  test("joins what each side changed", async () => {
    const answer = await mergeTexts(
      viewer,
      request(TEXT.replace("800", "900"), TEXT.replace("accel = 3000", "accel = 2.5 m/s^2")),
    );
    expect(answer).toEqual({
      files: sent(TEXT.replace("800", "900").replace("accel = 3000", "accel = 2.5 m/s^2")),
      conflicts: [],
    });
  });

  test("answers no files but the conflicts, and merges once each has a choice", async () => {
    const [ours, theirs] = [TEXT.replace("800", "900"), TEXT.replace("800", "850")];
    const { files, conflicts } = await mergeTexts(viewer, request(ours, theirs));
    expect(files).toBeNull();
    expect(conflicts).toMatchObject([
      {
        axis: "x",
        parameter: "run_current",
        key: "axis.x.run_ma",
        base: { value: 0.8, unit: "A", basis: "rms", raw: "800", line: 2 },
        ours: { value: 0.9, raw: "900" },
        theirs: { value: 0.85, raw: "850" },
      },
    ]);
    const choices = { [conflicts[0]?.id ?? ""]: "ours" as const };
    const settled = await mergeTexts(viewer, request(ours, theirs, { choices }));
    expect(settled).toEqual({ files: sent(ours), conflicts: [] });
  });

  test("gives lines that both sides changed as a conflict without a parameter", async () => {
    const answer = await mergeTexts(
      viewer,
      request(TEXT.replace("per winding", "each"), TEXT.replace("per winding", "rms")),
    );
    expect(answer.conflicts).toMatchObject([
      { axis: null, parameter: null, key: null, ours: { value: null, raw: "run_ma = 800   # each\n" } },
    ]);
  });

  test("names the list and the file that cannot be taken", async () => {
    const broken = request(TEXT, TEXT, { theirs: [{ path: "a.conf", text: "\u0000\u0001\u0002" }] });
    await expect(mergeTexts(viewer, broken)).rejects.toMatchObject({ pointer: "/theirs/0/text" });
  });

  test("stores nothing", async () => {
    const before = await FileContent.count();
    await mergeTexts(viewer, request(TEXT.replace("800", "900"), TEXT));
    expect(await FileContent.count()).toBe(before);
  });
});
