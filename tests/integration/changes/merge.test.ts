import { afterAll, describe, expect, it } from "vitest";
import { mergeConfigurations } from "@/lib/review/merge";
import { sequelize } from "@/lib/server/sequelize";
import { bringUpToDate } from "@/lib/services/changes/bring-up-to-date";
import { mergeStart } from "@/lib/services/changes/merge-start";
import { showChange } from "@/lib/services/changes/show";
import { RecordEvent } from "@/models/record";
import { approve, draft, floor, textOf, type Floor } from "../../support/changes";

afterAll(() => sequelize.close());

/** A draft whose base has moved: both raised the acceleration, the proposal also the speed, the baseline the current. */
async function stale(world: Floor) {
  const first = await draft(world, textOf());
  await approve(world, first.id);
  const mine = await draft(world, textOf({ speed: 190, accel: 2600 }));
  const theirs = await draft(world, textOf({ current: 900, accel: 2500 }));
  await approve(world, theirs.id);
  return mine;
}

async function conflictsOf(world: Floor, id: string) {
  const { texts } = await mergeStart(world.engineer, id);
  if (!texts) throw new Error("The base has not moved.");
  return { texts, conflicts: mergeConfigurations(texts).conflicts };
}

describe("a proposal whose base has moved", () => {
  it("is merged with the text in force, each conflict as chosen", async () => {
    const world = await floor(1);
    const mine = await stale(world);
    const { texts, conflicts } = await conflictsOf(world, mine.id);
    expect(conflicts.map(({ places }) => places.map(({ axis, parameter }) => [axis, parameter]))).toEqual([
      [["x", "acceleration"]],
      [["y", "acceleration"]],
    ]);
    const [x, y] = conflicts.map(({ id }) => id);
    const answer = await bringUpToDate(world.engineer, {
      id: mine.id,
      ifMatch: mine.lockVersion,
      baseHash: texts.baseHash,
      choices: { [x ?? ""]: "ours", [y ?? ""]: "theirs" },
    });
    expect(answer.reapplied).toContainEqual({ axis: "x", parameter: "acceleration" });
    expect(answer.notFitting).toMatchObject([{ axis: "y", parameter: "acceleration" }]);
    const now = await showChange(world.engineer, mine.id);
    expect(now.stale).toBeNull();
    const [ofX = "", ofY = ""] = textOf({ current: 900, speed: 190, accel: 2600 }).split("\n\n");
    expect(now.proposal.files[0]?.text).toBe(`${ofX}\n\n${ofY.replace("2600", "2500")}`);
    const [told] = await RecordEvent.findAll({
      where: { changeId: mine.id, action: "change.brought_up_to_date" },
    });
    expect(told?.after).toMatchObject({ notFitting: [{ axis: "y", parameter: "acceleration" }] });
  });

  it("is left as it was while a conflict has no choice", async () => {
    const world = await floor(1);
    const mine = await stale(world);
    const attempt = bringUpToDate(world.engineer, { id: mine.id, ifMatch: null, choices: {} });
    await expect(attempt).rejects.toThrow("2 conflicts with baseline");
    expect((await showChange(world.engineer, mine.id)).proposal.version).toBe(mine.version);
  });

  it("is not merged with another text than the one that was looked at", async () => {
    const world = await floor(1);
    const mine = await stale(world);
    const { texts, conflicts } = await conflictsOf(world, mine.id);
    const again = await draft(world, textOf({ current: 900, accel: 2400 }));
    await approve(world, again.id);
    const choices = Object.fromEntries(conflicts.map(({ id }) => [id, "ours" as const]));
    const late = { id: mine.id, ifMatch: null, baseHash: texts.baseHash, choices };
    await expect(bringUpToDate(world.engineer, late)).rejects.toThrow("moved once more");
  });

  it("has nothing to merge once it stands on the text in force", async () => {
    const world = await floor(1);
    const first = await draft(world, textOf());
    expect((await mergeStart(world.engineer, first.id)).texts).toBeNull();
  });

  it("is merged by engineers and approvers alone", async () => {
    const world = await floor(1);
    const mine = await stale(world);
    await expect(mergeStart(world.technician, mine.id)).rejects.toMatchObject({ code: "forbidden" });
  });
});
