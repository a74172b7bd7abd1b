import { randomUUID } from "node:crypto";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Trial } from "@/lib/domain/test-sheets";
import { stopQueue } from "@/lib/server/queue";
import { closeSheet } from "@/lib/services/test-sheets/close";
import { createSheet } from "@/lib/services/test-sheets/create";
import { enterOnSheet } from "@/lib/services/test-sheets/enter";
import { listSheets } from "@/lib/services/test-sheets/list";
import { proposeSheet } from "@/lib/services/test-sheets/propose";
import { showSheet } from "@/lib/services/test-sheets/show";
import { testsOfChange } from "@/lib/services/test-sheets/tests-of-change";
import { recordOfObject } from "@/lib/services/record/of-object";
import { sequelize } from "@/lib/server/sequelize";
import { act, approve, baseline, draft, floor, later, textOf, type Floor } from "@/tests/support/changes";
import { person } from "@/tests/support/world";
import { releaseChange } from "@/lib/services/changes/release";

let world: Floor;
let machineId: string;
beforeAll(async () => {
  world = await floor(2);
  await baseline(world, textOf());
  machineId = world.machines[0]!.id;
}, 120_000);
afterAll(() => stopQueue());

const at = (seconds: number) => later(world.technician, seconds);

function start(test: Parameters<typeof createSheet>[1]["test"], more = {}) {
  return createSheet(at(60), { machineId, axis: "X", test, idempotencyKey: null, ...more });
}

function trial(more: Partial<Trial> = {}): Trial {
  return {
    id: randomUUID(),
    rung: null,
    result: "pass",
    deviation: null,
    temperatures: [],
    ambientC: null,
    minutes: null,
    note: "",
    doneAt: at(100).now.toISOString(),
    ...more,
  };
}

describe("a test sheet", () => {
  it("starts with the plan that was proposed, on the axis as the machine spells it", async () => {
    const asked = { machineId, changeId: null, axis: "x", test: "acceleration_ladder" as const };
    const proposed = await proposeSheet(at(50), asked);
    const sheet = await start("acceleration_ladder");
    expect(proposed.planned).toMatchObject({ ok: true, plan: sheet.plan });
    expect(sheet).toMatchObject({ axis: "x", state: "open", entries: 0, closing: null });
    expect(sheet.result.next).toMatchObject({ rung: 0, level: sheet.plan.ladder!.start });
    expect(await showSheet(at(70), sheet.id)).toEqual(sheet);
  });

  it("is started once for the same key", async () => {
    const idempotencyKey = randomUUID();
    const one = await start("move_run", { idempotencyKey });
    expect((await start("move_run", { idempotencyKey })).id).toBe(one.id);
  });

  it("refuses an axis that is not there, and a change that does not apply", async () => {
    await expect(start("move_run", { axis: "q" })).rejects.toMatchObject({ pointer: "/axis" });
    const other = await floor(1);
    const change = await draft(other, textOf());
    await expect(start("move_run", { changeId: change.id })).rejects.toMatchObject({ pointer: "/changeId" });
  });

  it("asks for start and step on a machine that has no baseline", async () => {
    const bare = await floor(1);
    const asked = { machineId: bare.machines[0]!.id, axis: "x", idempotencyKey: null };
    const ladder = { ...asked, test: "acceleration_ladder" as const };
    await expect(createSheet(bare.technician, ladder)).rejects.toMatchObject({
      code: "invalid",
      pointer: "/start",
      message: expect.stringContaining("Not in the text: acceleration"),
    });
    const sheet = await createSheet(bare.technician, { ...ladder, start: 3, step: 0.2 });
    expect(sheet.plan.ladder).toMatchObject({ start: 3, step: 0.2, predicted: null });
  });

  it("is for those who work on machines; others read it", async () => {
    const viewer = await person("viewer");
    const sheet = await start("move_run");
    await expect(showSheet(viewer, sheet.id)).resolves.toMatchObject({ id: sheet.id });
    const asked = { machineId, axis: "x", test: "move_run" as const, idempotencyKey: null };
    await expect(createSheet(viewer, asked)).rejects.toMatchObject({ code: "forbidden" });
    await expect(enterOnSheet(viewer, { id: sheet.id, trials: [trial()] })).rejects.toMatchObject({
      code: "forbidden",
    });
  });
});

describe("entries", () => {
  it("are stored once however often and however mixed they are sent", async () => {
    const { id } = await start("move_run");
    const [one, two, three] = [trial(), trial(), trial({ result: "fail" })];
    await enterOnSheet(at(110), { id, trials: [one!, two!] });
    await Promise.all([
      enterOnSheet(at(120), { id, trials: [one!, two!, three!] }),
      enterOnSheet(at(121), { id, trials: [three!, one!, one!] }),
    ]);
    const sheet = await showSheet(at(130), id);
    expect(sheet.trials).toHaveLength(3);
    expect(sheet.entries).toBe(3);
    const record = await recordOfObject(at(130), { type: "test_sheet", id });
    expect(record.map(({ action }) => action)).toEqual([
      "test_sheet.entered",
      "test_sheet.entered",
      "test_sheet.started",
    ]);
  });

  it("lead the ladder on by the time at which they were made, not the time they came in", async () => {
    const { id } = await start("acceleration_ladder");
    const late = trial({ rung: 4, result: "fail", doneAt: at(200).now.toISOString() });
    const early = trial({ rung: 0, doneAt: at(150).now.toISOString() });
    await enterOnSheet(at(300), { id, trials: [late] });
    const sheet = await enterOnSheet(at(310), { id, trials: [early] });
    expect(sheet.trials.map(({ rung }) => rung)).toEqual([0, 4]);
    expect(sheet.result.next!.rung).toBe(2);
  });

  it("that were wrong are struck out and stay in sight", async () => {
    const { id } = await start("move_run");
    const wrong = trial({ result: "fail" });
    await enterOnSheet(at(110), { id, trials: [wrong] });
    const strikes = [{ trialId: wrong.id, reason: "The cable hung in the way." }];
    const sheet = await enterOnSheet(at(120), { id, strikes });
    expect(sheet.trials[0]!.struck).toMatchObject({ reason: "The cable hung in the way." });
    expect(sheet.entries).toBe(0);
    expect(await enterOnSheet(at(130), { id, strikes })).toEqual(sheet);
    const elsewhere = [{ trialId: randomUUID(), reason: "Not there." }];
    await expect(enterOnSheet(at(140), { id, strikes: elsewhere })).rejects.toMatchObject({
      pointer: "/strikes/0/trialId",
    });
  });

  it("must fit the sheet", async () => {
    const ladder = await start("acceleration_ladder");
    const heat = await start("heat_record");
    const enter = (id: string, one: Trial) => enterOnSheet(at(110), { id, trials: [one] });
    await expect(enter(ladder.id, trial())).rejects.toMatchObject({ pointer: "/trials/0" });
    await expect(enter(heat.id, trial())).rejects.toMatchObject({ pointer: "/trials/0" });
    const reading = trial({
      result: null,
      ambientC: 24,
      minutes: 30,
      temperatures: [{ place: "case", celsius: 51, by: "sensor" }],
    });
    const sheet = await enter(heat.id, reading);
    expect(sheet.result.sentences[0]).toMatch(/^Motor case: 27 K above 24 °C after 30 min/);
    await expect(enter(ladder.id, reading)).rejects.toMatchObject({ pointer: "/trials/0" });
  });

  it("of another sheet are refused", async () => {
    const [one, other] = [await start("move_run"), await start("move_run")];
    const entry = trial();
    await enterOnSheet(at(110), { id: one.id, trials: [entry] });
    await expect(enterOnSheet(at(120), { id: other.id, trials: [entry] })).rejects.toMatchObject({
      code: "conflict",
    });
  });

  it("cannot be changed or removed in the database", async () => {
    const { id } = await start("move_run");
    await enterOnSheet(at(110), { id, trials: [trial()] });
    const where = `where sheet_id = '${id}'`;
    await expect(sequelize.query(`delete from test_trials ${where}`)).rejects.toThrow("append-only");
    await expect(sequelize.query(`update test_trials set data = '{}' ${where}`)).rejects.toThrow(
      "append-only",
    );
  });
});

describe("closing a sheet", () => {
  it("keeps the result, and takes what comes in later without changing it", async () => {
    const { id } = await start("move_run");
    await enterOnSheet(at(110), { id, trials: Array.from({ length: 29 }, () => trial()) });
    const closed = await closeSheet(at(200), { id, outcome: "finished", note: "" });
    expect(closed.state).toBe("finished");
    expect(closed.result.sentences[0]).toContain("Steps lost in 0 of 29 trials: at least 90.1 %");
    expect(closed.result.sentences[1]).toBe("The demanded 90 % is shown.");
    const sheet = await enterOnSheet(at(300), { id, trials: [trial({ result: "fail" })] });
    expect(sheet.trials.filter(({ late }) => late)).toHaveLength(1);
    expect(sheet.result).toEqual(closed.result);
    await expect(closeSheet(at(400), { id, outcome: "broken_off" })).rejects.toMatchObject({
      code: "conflict",
    });
  });

  it("takes it off the open sheets", async () => {
    const { id } = await start("hold_run");
    const ids = async (state: "open" | "closed") =>
      (await listSheets(at(500), { machineId, state, page: 1, pageSize: 200 })).items.map((row) => row.id);
    expect(await ids("open")).toContain(id);
    await closeSheet(at(510), { id, outcome: "broken_off", note: "The belt came off." });
    expect(await ids("open")).not.toContain(id);
    expect(await ids("closed")).toContain(id);
  });
});

describe("the tests of a change", () => {
  it("are those whose prediction it moves, with what to expect, and their sheets", async () => {
    const change = await draft(world, textOf({ current: 900 }));
    const asked = { changeId: change.id, machineId };
    const { items } = await testsOfChange(at(600), asked);
    const heat = items.find(({ axis, test }) => axis === "x" && test === "heat_record")!;
    expect(heat.because.join()).toMatch(/motor case .+ → .+ °C/);
    expect(heat.expected[0]).toContain("K above ambient once settled");
    expect(items.some(({ test }) => test === "corner_run")).toBe(false);
    const sheet = await start("heat_record", { changeId: change.id });
    const again = await testsOfChange(at(700), asked);
    const own = again.items.find(({ axis, test }) => axis === "x" && test === "heat_record")!;
    expect(own.sheets.map(({ id }) => id)).toEqual([sheet.id]);
  });

  it("stay in sight once the change is released", async () => {
    const other = await floor(1);
    const change = await draft(other, textOf());
    await approve(other, change.id);
    await releaseChange(later(other.engineer, 10), act(change.id));
    const { items } = await testsOfChange(later(other.technician, 20), {
      changeId: change.id,
      machineId: other.machines[0]!.id,
    });
    expect(items.length).toBeGreaterThan(0);
  });
});
