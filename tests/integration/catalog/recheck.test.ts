import { beforeAll, describe, expect, it, vi } from "vitest";
import { SYSTEM } from "@/lib/domain/roles";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { retireMachine } from "@/lib/services/machines/retire";
import { machinesConcerned } from "@/lib/services/recheck/concerned";
import { enqueueRecheck } from "@/lib/services/recheck/enqueue";
import { runRecheck } from "@/lib/services/recheck/run";
import { MachineStatus } from "@/models/machines";
import type { TestPerson } from "@/tests/support/world";
import { item, machine, model, person, site, swapped } from "@/tests/support/world";
import { queuedRechecks } from "./support";

let engineer: TestPerson;
beforeAll(async () => {
  engineer = await person("engineer");
});

async function fleet() {
  const design = await model(engineer);
  const { id: siteId } = await site();
  const [one, other] = [
    await machine(engineer, { modelId: design.id, siteId }),
    await machine(engineer, { modelId: design.id, siteId }),
  ];
  return { design, siteId, one, other };
}

describe("the machines that an act bears on", () => {
  it("are those of a model, of a site, and of an item that the model names", async () => {
    const { design, siteId, one, other } = await fleet();
    const both = [one.id, other.id].sort();
    const concerned = async (concern: Parameters<typeof machinesConcerned>[0]) =>
      (await machinesConcerned(concern)).sort();
    expect(await concerned({ modelId: design.id })).toEqual(both);
    expect(await concerned({ siteId })).toEqual(both);
    for (const itemId of Object.values(design.items)) expect(await concerned({ itemId })).toEqual(both);
    expect(await concerned({ all: true })).toEqual(expect.arrayContaining(both));
  });

  it("are those that have an item recorded as their own", async () => {
    const { one } = await fleet();
    const motor = await item(engineer, "motor");
    expect(await machinesConcerned({ itemId: motor.id })).toEqual([]);
    await swapped(engineer, { id: one.id, part: "motor", axis: "x", itemId: motor.id });
    expect(await machinesConcerned({ itemId: motor.id })).toEqual([one.id]);
  });

  it("leave retired machines out", async () => {
    const { design, one, other } = await fleet();
    await retireMachine(engineer, { id: one.id, reason: "Scrapped", ifMatch: null });
    expect(await machinesConcerned({ modelId: design.id })).toEqual([other.id]);
  });
});

describe("a re-check", () => {
  it("waits only if its act commits", async () => {
    const { design } = await fleet();
    const before = await queuedRechecks({ modelId: design.id });
    const failing = withTransaction(engineer, async (tx) => {
      await enqueueRecheck(tx, { modelId: design.id });
      throw new Error("the act fails");
    });
    await expect(failing).rejects.toThrow("the act fails");
    expect(await queuedRechecks({ modelId: design.id })).toBe(before);
  });

  it("works out anew where each machine stands", async () => {
    const { design, one, other } = await fleet();
    expect(await runRecheck({ actor: SYSTEM, now: new Date() }, { modelId: design.id })).toBe(2);
    expect(await MachineStatus.count({ where: { machineId: [one.id, other.id] } })).toBe(2);
  });

  it("goes on after a machine that fails and fails at the end", async () => {
    const { design, one, other } = await fleet();
    const status = vi.spyOn(MachineStatus, "upsert").mockRejectedValueOnce(new Error("no room"));
    const run = runRecheck({ actor: SYSTEM, now: new Date() }, { modelId: design.id });
    await expect(run).rejects.toThrow("1 of 2 machines failed");
    status.mockRestore();
    expect(await MachineStatus.count({ where: { machineId: [one.id, other.id] } })).toBe(1);
  });
});
