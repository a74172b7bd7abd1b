import { describe, expect, test } from "vitest";
import { answerPictures } from "@/lib/review/axis-pictures";
import { CONTINUOUS } from "@/lib/review/temperature-course";
import { operatingMapsOfChange } from "@/lib/services/changes/operating-maps";
import { axisBasis } from "@/lib/services/machines/axis-basis";
import { draft, floor, textOf } from "@/tests/support/changes";
import { configuration, fleet, requireText } from "@/tests/support/fleet";

describe("the basis of an axis", () => {
  test("is the required configuration on the machine's hardware, the axis found without regard to case", async () => {
    const { engineer, viewer, modelId, machineId } = await fleet();
    const files = [{ path: "machine.conf", text: configuration() }];
    await requireText(engineer, { modelId, machineIds: [machineId], files });
    const { basis, baseline, quantities } = await axisBasis(viewer, { machineId, axis: "X" });
    expect(basis).toMatchObject({
      machineId,
      axis: "x",
      files: [{ path: "machine.conf", text: configuration() }],
    });
    expect(baseline).not.toBeNull();
    expect(new Set(quantities.map(({ axis }) => axis))).toEqual(new Set(["x"]));
    const { keyTable, assembly, policy } = basis;
    const texts = { files: basis.files, keyTable, assembly, policy };
    const answer = answerPictures({ kind: "axis", id: 1, axis: "x", texts, tried: {}, duty: CONTINUOUS });
    expect(answer.kind === "axis" && answer.now.map(({ parameter }) => parameter)).toContain("acceleration");
  });

  test("has no text where no baseline has been released, and is not found for an axis that the machine lacks", async () => {
    const { viewer, machineId } = await fleet();
    const { basis, baseline, findings } = await axisBasis(viewer, { machineId, axis: "x" });
    expect([basis.files, baseline, findings]).toEqual([[], null, []]);
    await expect(axisBasis(viewer, { machineId, axis: "q" })).rejects.toMatchObject({ code: "not_found" });
  });
});

describe("the operating maps of a change", () => {
  test("are drawn on what the proposal was evaluated on, version by version", async () => {
    const world = await floor(1);
    const { id } = await draft(world, textOf({ accel: 3000 }));
    const maps = await operatingMapsOfChange(world.approver, { changeId: id, version: 1 });
    expect(maps.map(({ axis, was }) => [axis, was])).toEqual([
      ["x", null],
      ["y", null],
    ]);
    await expect(operatingMapsOfChange(world.approver, { changeId: id, version: 9 })).rejects.toMatchObject({
      code: "not_found",
    });
  });
});
