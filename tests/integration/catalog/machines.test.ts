import { beforeAll, describe, expect, it } from "vitest";
import { retireItem } from "@/lib/services/catalog/retire";
import { machineAssembly } from "@/lib/services/machines/assembly";
import { copyMachine } from "@/lib/services/machines/copy";
import { listHardware } from "@/lib/services/machines/list-hardware";
import { moveMachine } from "@/lib/services/machines/move";
import { removeHardware } from "@/lib/services/machines/remove-hardware";
import { retireMachine } from "@/lib/services/machines/retire";
import { setMachineState } from "@/lib/services/machines/set-state";
import { updateMachine } from "@/lib/services/machines/update";
import { showItem } from "@/lib/services/catalog/show";
import type { TestModel, TestPerson } from "@/tests/support/world";
import { EVIDENCE, item, machine, model, person, site, swapped, unique } from "@/tests/support/world";
import { lastEvent, queuedRechecks } from "./support";

let engineer: TestPerson;
let design: TestModel;
let siteId: string;
beforeAll(async () => {
  engineer = await person("engineer");
  design = await model(engineer);
  siteId = (await site(35)).id;
});

const make = () => machine(engineer, { modelId: design.id, siteId });

describe("a machine", () => {
  it("joins the fleet in service and is checked", async () => {
    const made = await make();
    expect(made).toMatchObject({ state: "in_service", version: 1, siteId, modelId: design.id });
    expect(await queuedRechecks({ machineIds: [made.id] })).toBe(1);
  });

  it("has a serial number of its own", async () => {
    const [one, other] = [await make(), await make()];
    const rename = { id: other.id, serial: one.serial, note: "", ifMatch: 1 };
    await expect(updateMachine(engineer, rename)).rejects.toMatchObject({
      code: "conflict",
      pointer: "/serial",
    });
    await expect(copyMachine(engineer, { id: one.id, serial: one.serial })).rejects.toMatchObject({
      code: "conflict",
    });
  });

  it("refuses an update upon a version that no longer stands", async () => {
    const { id, serial } = await make();
    const updated = await updateMachine(engineer, { id, serial, note: "Left bay", ifMatch: 1 });
    expect(updated).toMatchObject({ note: "Left bay", version: 2 });
    await expect(
      updateMachine(engineer, { id, serial, note: "Right bay", ifMatch: 1 }),
    ).rejects.toMatchObject({
      code: "precondition_failed",
      details: { current: { note: "Left bay" } },
    });
  });

  it("moves to another site with a reason and is checked at its ambient", async () => {
    const { id } = await make();
    const warm = await site(41);
    await moveMachine(engineer, { id, siteId: warm.id, reason: "New line", ifMatch: null });
    expect((await machineAssembly(id)).assembly.ambient_c).toBe(41);
    expect(await queuedRechecks({ machineIds: [id] })).toBe(2);
    expect(await lastEvent(id)).toMatchObject({ action: "machine.moved", reason: "New line" });
  });

  it("moves to no site that is retired", async () => {
    const { id } = await make();
    const closed = await site();
    await closed.update({ retiredAt: new Date() });
    const move = { id, siteId: closed.id, reason: "New line", ifMatch: null };
    await expect(moveMachine(engineer, move)).rejects.toMatchObject({ pointer: "/siteId" });
  });

  it("goes out of service and back with reasons, and comes back from being retired", async () => {
    const { id } = await make();
    const set = (state: "in_service" | "out_of_service", reason: string) =>
      setMachineState(engineer, { id, state, reason, ifMatch: null });
    expect(await set("out_of_service", "Belt torn")).toMatchObject({
      state: "out_of_service",
      stateReason: "Belt torn",
    });
    expect((await retireMachine(engineer, { id, reason: "Scrapped", ifMatch: null })).state).toBe("retired");
    expect((await set("in_service", "Scrapped by mistake")).state).toBe("in_service");
    await expect(set("out_of_service", " ")).rejects.toThrow(/Say why/);
  });

  it("is copied without its recorded hardware unless there is evidence for it", async () => {
    const original = await make();
    await swapped(engineer, {
      id: original.id,
      part: "sense_resistor",
      data: { sense_resistance_ohm: 0.22 },
    });
    const bare = await copyMachine(engineer, { id: original.id, serial: unique("SN") });
    expect((await listHardware(engineer, bare.id)).facts).toEqual([]);
    const hardwareEvidence = "Same batch, marking R220 read on this board";
    const full = await copyMachine(engineer, { id: original.id, serial: unique("SN"), hardwareEvidence });
    expect((await listHardware(engineer, full.id)).facts).toMatchObject([
      { part: "sense_resistor", data: { sense_resistance_ohm: 0.22 }, evidence: hardwareEvidence },
    ]);
  });
});

describe("hardware that differs from the model", () => {
  it("counts for the machine, on one axis", async () => {
    const { id } = await make();
    const strong = await item(engineer, "motor", { rated_current_a: 2.8, rated_current_basis: "rms" });
    await swapped(engineer, { id, part: "motor", axis: "X", itemId: strong.id });
    const { assembly } = await machineAssembly(id);
    expect(assembly.axes.map(({ motor }) => motor?.rated_current_a)).toEqual([2.8, 1.5]);
    expect((await listHardware(engineer, id)).facts[0]).toMatchObject({
      axis: "x",
      item: { id: strong.id, code: strong.code },
      recordedByName: engineer.actor.name,
    });
    const shown = await showItem(engineer, { kind: "motor", id: strong.id });
    expect(shown.usedBy.machines).toMatchObject([{ id, axis: "x", part: "motor" }]);
  });

  it("stands once for an axis and a part: the fact before it ends and stays readable", async () => {
    const { id } = await make();
    const resistor = (ohm: number) =>
      swapped(engineer, { id, part: "sense_resistor", axis: "x", data: { sense_resistance_ohm: ohm } });
    await resistor(0.22);
    const { facts } = await resistor(0.15);
    expect(facts.map(({ data, endedAt }) => [data.sense_resistance_ohm, endedAt !== null])).toEqual([
      [0.15, false],
      [0.22, true],
    ]);
    expect(await lastEvent(id)).toMatchObject({
      before: { data: { sense_resistance_ohm: 0.22 } },
      after: { data: { sense_resistance_ohm: 0.15 } },
    });
  });

  it("ends when it is removed: the model's hardware counts again and the machine is checked", async () => {
    const { id } = await make();
    const { facts } = await swapped(engineer, { id, part: "supply", data: { voltage_v: 36 } });
    expect((await machineAssembly(id)).assembly.supply?.voltage_v).toBe(36);
    await removeHardware(engineer, { id, factId: facts[0]!.id });
    expect((await machineAssembly(id)).assembly.supply?.voltage_v).toBe(24);
    expect(await queuedRechecks({ machineIds: [id] })).toBe(3);
    await expect(removeHardware(engineer, { id, factId: facts[0]!.id })).rejects.toMatchObject({
      code: "not_found",
    });
  });

  it("takes no fact without evidence, without content, or on an axis that is not there", async () => {
    const { id } = await make();
    const data = { sense_resistance_ohm: 0.22 };
    const record = (fact: Partial<Parameters<typeof swapped>[1]>) =>
      swapped(engineer, { id, part: "sense_resistor", data, ...fact });
    await expect(record({ evidence: "" })).rejects.toThrow(/who read or measured it/);
    await expect(record({ data: {} })).rejects.toMatchObject({ pointer: "/itemId" });
    await expect(record({ axis: "q" })).rejects.toMatchObject({ pointer: "/axis" });
    await expect(record({ part: "supply", axis: "x", data: { voltage_v: 36 } })).rejects.toMatchObject({
      pointer: "/axis",
    });
  });

  it("refuses data of another part, values out of range and items of the wrong kind", async () => {
    const { id } = await make();
    const record = (fact: Parameters<typeof swapped>[1]) => swapped(engineer, fact);
    await expect(record({ id, part: "motor", data: { lead_mm: 8 } })).rejects.toMatchObject({
      pointer: "/data/lead_mm",
    });
    await expect(record({ id, part: "load", data: { mass_kg: -1 } })).rejects.toMatchObject({
      pointer: "/data/mass_kg",
    });
    await expect(record({ id, part: "motor", itemId: design.items.driver })).rejects.toMatchObject({
      code: "invalid",
      pointer: "/itemId",
    });
    const gain = await record({ id, part: "driver", data: { "set_point.gain": 5 } });
    expect(gain.facts).toHaveLength(1);
  });

  it("may be an item that is retired, since what is fitted is fitted", async () => {
    const { id } = await make();
    const old = await item(engineer, "motor");
    await retireItem(engineer, { kind: "motor", id: old.id, retired: true });
    const { facts } = await swapped(engineer, { id, part: "motor", axis: "y", itemId: old.id });
    expect(facts[0]?.item?.id).toBe(old.id);
  });

  it("is recorded by a technician, who may not change the machine itself", async () => {
    const technician = await person("technician");
    const { id, serial } = await make();
    const view = await swapped(technician, { id, part: "load", axis: "x", data: { mass_kg: 0.9 } });
    expect(view.facts[0]?.evidence).toBe(EVIDENCE);
    await expect(
      updateMachine(technician, { id, serial, note: "", ifMatch: view.machineVersion }),
    ).rejects.toMatchObject({ code: "forbidden" });
  });
});
