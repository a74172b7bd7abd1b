import { afterAll, beforeAll, describe, expect, test, vi } from "vitest";
import { SYSTEM } from "@/lib/domain/roles";
import { ServiceError } from "@/lib/services/kernel/errors";
import { listRehearsalMachines } from "@/lib/services/rehearsals/list-machines";
import { listRehearsals } from "@/lib/services/rehearsals/list";
import * as outcome from "@/lib/services/rehearsals/outcome";
import { runRehearsal } from "@/lib/services/rehearsals/run";
import { showRehearsal } from "@/lib/services/rehearsals/show";
import { startRehearsal } from "@/lib/services/rehearsals/start";
import { stopQueue } from "@/lib/server/queue";
import { RecordEvent } from "@/models/record";
import { RehearsalMachine } from "@/models/rehearsals";
import { configuration, requireText } from "@/tests/support/fleet";
import type { TestModel, TestPerson } from "@/tests/support/world";
import { CATALOG_SAMPLE, item, machine, model, person, site } from "@/tests/support/world";

const PAGE = { page: 1, pageSize: 50 } as const;
const system = () => ({ actor: SYSTEM, now: new Date() });

let engineer: TestPerson;
beforeAll(async () => {
  engineer = await person("engineer");
});
afterAll(() => stopQueue());

interface World {
  readonly made: TestModel;
  readonly cool: { readonly id: string; readonly serial: string };
  readonly warm: { readonly id: string; readonly serial: string };
  readonly bare: { readonly id: string; readonly serial: string };
}

/** Three machines of one model: one in a cool hall, one in a warm hall, one without a baseline. */
async function world(): Promise<World> {
  const made = await model(engineer);
  const [coolHall, warmHall] = [await site(15), await site(30)];
  const [cool, warm, bare] = [
    await machine(engineer, { modelId: made.id, siteId: coolHall.id }),
    await machine(engineer, { modelId: made.id, siteId: warmHall.id }),
    await machine(engineer, { modelId: made.id, siteId: coolHall.id }),
  ];
  const files = [{ path: "machine.conf", text: configuration({ run_ma: "600" }) }];
  await requireText(engineer, { modelId: made.id, machineIds: [cool.id, warm.id], files });
  return { made, cool, warm, bare };
}

async function rehearsed(question: Parameters<typeof startRehearsal>[1]["question"], modelId: string) {
  const { id } = await startRehearsal(engineer, { question, modelId });
  await runRehearsal(system(), { rehearsalId: id });
  const view = await showRehearsal(engineer, { id });
  const machines = async (show: "newly_over" | "all") =>
    (await listRehearsalMachines(engineer, { id, show, ...PAGE })).items;
  return { id, view, over: await machines("newly_over"), all: await machines("all") };
}

const refusal = (work: Promise<unknown>) =>
  work.then(
    () => null,
    (error: unknown) => (error instanceof ServiceError ? error : null),
  );

describe("a warm day", () => {
  test("finds the machines that would be newly over limit, and the hottest room of each", async () => {
    const { made, cool, warm, bare } = await world();
    const { view, over, all } = await rehearsed({ kind: "warm_day", riseK: 10 }, made.id);
    expect(view).toMatchObject({ state: "done", machines: 3, rehearsed: 3, newlyOver: 1, withoutAnswer: 1 });
    expect(over.map(({ serial }) => serial)).toEqual([warm.serial]);
    const [found] = over;
    expect(found?.graver[0]).toMatchObject({ ruleId: "mount-temperature", toBe: "over" });
    expect(found?.hottestRoom).toMatchObject({ kind: "limited", limitedBy: { ruleId: "mount-temperature" } });
    const room = found!.hottestRoom!.ambientC!;
    expect(room).toBeGreaterThanOrEqual(30);
    expect(room).toBeLessThan(40);
    const coolOne = all.find(({ serial }) => serial === cool.serial)!;
    expect(coolOne.hottestRoom?.ambientC).toBe(room);
    expect(coolOne.graver.filter(({ toBe }) => toBe === "over")).toEqual([]);
    const bareOne = all.find(({ serial }) => serial === bare.serial)!;
    expect(bareOne).toMatchObject({ was: "cannot", toBe: "cannot", hottestRoom: null });
    expect(bareOne.trouble).toContain("No baseline");
  });

  test("is on the record when it starts and when it ends, and is listed", async () => {
    const { made } = await world();
    const { id } = await rehearsed({ kind: "warm_day", riseK: 5 }, made.id);
    const events = await RecordEvent.findAll({ where: { objectId: id }, order: [["seq", "ASC"]] });
    expect(events.map(({ action, actorKind }) => [action, actorKind])).toEqual([
      ["rehearsal.started", "person"],
      ["rehearsal.ended", "system"],
    ]);
    const { items } = await listRehearsals(engineer, PAGE);
    expect(items.map((row) => row.id)).toContain(id);
  });

  test("goes on where it was broken off, and ends once", async () => {
    const { made } = await world();
    const { id } = await startRehearsal(engineer, {
      question: { kind: "warm_day", riseK: 10 },
      modelId: made.id,
    });
    const broken = vi.spyOn(RehearsalMachine, "update").mockRejectedValueOnce(new Error("no connection"));
    await expect(runRehearsal(system(), { rehearsalId: id })).rejects.toThrow("no connection");
    broken.mockRestore();
    expect(await showRehearsal(engineer, { id })).toMatchObject({ state: "running", rehearsed: 0 });
    expect(await runRehearsal(system(), { rehearsalId: id })).toBe(3);
    expect(await runRehearsal(system(), { rehearsalId: id })).toBe(0);
    expect(await RecordEvent.count({ where: { objectId: id, action: "rehearsal.ended" } })).toBe(1);
  });

  test("names a machine that fails and goes through the others", async () => {
    const { made } = await world();
    const { id } = await startRehearsal(engineer, {
      question: { kind: "warm_day", riseK: 10 },
      modelId: made.id,
    });
    const failing = vi.spyOn(outcome, "rehearsalOutcome").mockRejectedValueOnce(new Error("odd data"));
    await runRehearsal(system(), { rehearsalId: id });
    failing.mockRestore();
    expect(await showRehearsal(engineer, { id })).toMatchObject({ state: "done", rehearsed: 3 });
    const { items } = await listRehearsalMachines(engineer, { id, show: "all", ...PAGE });
    expect(items.filter(({ trouble }) => trouble?.startsWith("Something failed"))).toHaveLength(1);
  });

  test("of a choice without machines is refused, and so is one without a rise", async () => {
    const empty = await model(engineer);
    const refused = await refusal(
      startRehearsal(engineer, { question: { kind: "warm_day", riseK: 10 }, modelId: empty.id }),
    );
    expect(refused?.message).toContain("Nothing was started");
    await expect(startRehearsal(engineer, { question: { kind: "warm_day", riseK: 0 } })).rejects.toThrow(
      "At least 1 K.",
    );
  });

  test("is started by no technician", async () => {
    const refused = await refusal(
      startRehearsal(await person("technician"), { question: { kind: "warm_day", riseK: 10 } }),
    );
    expect(refused?.code).toBe("forbidden");
  });
});

describe("a part swap", () => {
  const weakMotor = { ...CATALOG_SAMPLE.motor, holding_torque_nm: 0.05, rated_current_a: 0.5 };

  test("says which machines another motor would break, on which axes and by which check", async () => {
    const { made, cool, warm } = await world();
    const weak = await item(engineer, "motor", weakMotor);
    const question = {
      kind: "part_swap",
      part: "motor",
      itemId: weak.id,
      replacesId: made.items.motor,
    } as const;
    const { view, over } = await rehearsed(question, made.id);
    expect(view.title).toContain(weak.code);
    expect(over.map(({ serial }) => serial).sort()).toEqual([cool.serial, warm.serial].sort());
    expect(over[0]?.axes).toEqual(["x", "y"]);
    expect(over[0]?.graver.map(({ ruleId }) => ruleId)).toContain("run-current-motor");
  });

  test("does not bear on machines that carry something else", async () => {
    const { made } = await world();
    const [weak, other] = [await item(engineer, "motor", weakMotor), await item(engineer, "motor")];
    const { view, all } = await rehearsed(
      { kind: "part_swap", part: "motor", itemId: weak.id, replacesId: other.id },
      made.id,
    );
    expect(view).toMatchObject({ machines: 3, notConcerned: 3, newlyOver: 0 });
    expect(all).toEqual([]);
  });

  test("refuses a part that is not in the catalog or of another kind, and one in its own place", async () => {
    const { made } = await world();
    const start = (question: Parameters<typeof startRehearsal>[1]["question"]) =>
      refusal(startRehearsal(engineer, { question, modelId: made.id }));
    const itemId = made.items.driver;
    expect((await start({ kind: "part_swap", part: "motor", itemId }))?.pointer).toBe("/question/itemId");
    const same = await start({ kind: "part_swap", part: "driver", itemId, replacesId: itemId });
    expect(same?.message).toContain("its own place");
  });
});
