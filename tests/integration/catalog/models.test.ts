import { beforeAll, describe, expect, it } from "vitest";
import { retireItem } from "@/lib/services/catalog/retire";
import { showItem } from "@/lib/services/catalog/show";
import { showKeyTable } from "@/lib/services/key-tables/show";
import { copyModel } from "@/lib/services/models/copy";
import { createModel } from "@/lib/services/models/create";
import { listModels } from "@/lib/services/models/list";
import { retireModel } from "@/lib/services/models/retire";
import { showModel } from "@/lib/services/models/show";
import { updateModel } from "@/lib/services/models/update";
import type { TestHardware, TestPerson } from "@/tests/support/world";
import {
  hardwareItems,
  item,
  KEY_RULES,
  machine,
  model,
  modelHardwareOf,
  person,
  site,
  unique,
} from "@/tests/support/world";
import { queuedRechecks } from "./support";

let engineer: TestPerson;
let items: TestHardware;
beforeAll(async () => {
  engineer = await person("engineer");
  items = await hardwareItems(engineer);
});

const make = (hardware = modelHardwareOf(items)) =>
  createModel(engineer, { code: unique("m").slice(0, 40), name: "Gantry", hardware });

describe("a machine model", () => {
  it("gives back its axes in order with everything they have", async () => {
    const hardware = modelHardwareOf(items, ["x", "y", "z"]);
    const made = await make(hardware);
    expect(made.hardware).toEqual(hardware);
    expect(made.axes).toEqual(["x", "y", "z"]);
    expect(made.items.map(({ id }) => id).sort()).toEqual(Object.values(items).sort());
  });

  it("keeps each saved version readable and has its machines checked again", async () => {
    const made = await make();
    const hardware = { ...modelHardwareOf(items, ["x", "y", "c"]), enclosure_rise_k: undefined };
    const saved = await updateModel(engineer, { id: made.id, name: "Gantry 2", hardware, ifMatch: 1 });
    expect(saved.version).toBe(2);
    expect(saved.versions.map((version) => version.hardware.axes.map(({ axis }) => axis))).toEqual([
      ["x", "y", "c"],
      ["x", "y"],
    ]);
    expect(saved.hardware.enclosure_rise_k).toBeUndefined();
    expect(await queuedRechecks({ modelId: made.id })).toBe(1);
  });

  it("refuses a save upon a version that no longer stands", async () => {
    const made = await make();
    const save = { id: made.id, name: made.name, hardware: made.hardware };
    await updateModel(engineer, { ...save, ifMatch: 1 });
    await expect(updateModel(engineer, { ...save, ifMatch: 1 })).rejects.toMatchObject({
      code: "precondition_failed",
    });
  });

  it("refuses an item of the wrong kind and one that is not there, at its place", async () => {
    const hardware = modelHardwareOf(items);
    const [x, y] = hardware.axes;
    const wrong = { ...hardware, axes: [x!, { ...y!, motor: items.driver }] };
    await expect(make(wrong)).rejects.toMatchObject({
      code: "invalid",
      pointer: "/hardware/axes/1/motor",
      message: expect.stringContaining("is a driver; a motor belongs here") as string,
    });
    const missing = { ...hardware, supply: engineer.actor.id };
    await expect(make(missing)).rejects.toMatchObject({ pointer: "/hardware/supply" });
  });

  it("takes no retired item anew but keeps one that it has", async () => {
    const mount = (await item(engineer, "mount")).id;
    const hardware = modelHardwareOf({ ...items, mount });
    const made = await make(hardware);
    await retireItem(engineer, { kind: "mount", id: mount, retired: true });
    await expect(make(hardware)).rejects.toMatchObject({ pointer: "/hardware/axes/0/mount" });
    const saved = await updateModel(engineer, { id: made.id, name: "Kept", hardware, ifMatch: 1 });
    expect(saved.hardware.axes[0]?.mount).toBe(mount);
  });

  it("has axes of different names, coupled only with each other", async () => {
    await expect(make(modelHardwareOf(items, ["x", "X"]))).rejects.toThrow(/two axes named/);
    const hardware = modelHardwareOf(items, ["x", "y"]);
    const [x, y] = hardware.axes;
    const coupled = (other: string) => ({ ...hardware, axes: [{ ...x!, coupled_with: [other] }, y!] });
    await expect(make(coupled("z"))).rejects.toThrow(/not another axis/);
    expect((await make(coupled("y"))).hardware.axes[0]?.coupled_with).toEqual(["y"]);
  });

  it("counts its machines and the version of its key table in the list", async () => {
    const { id, code } = await model(engineer);
    const { id: siteId } = await site();
    await machine(engineer, { modelId: id, siteId });
    const { items: rows } = await listModels(engineer, { q: code, retired: "no", page: 1, pageSize: 10 });
    expect(rows).toMatchObject([{ id, axes: ["x", "y"], machines: 1, keyTableVersion: 1 }]);
  });

  it("takes no machines while it is retired", async () => {
    const { id } = await model(engineer);
    const { id: siteId } = await site();
    await retireModel(engineer, { id, retired: true });
    await expect(machine(engineer, { modelId: id, siteId })).rejects.toMatchObject({ pointer: "/modelId" });
    await retireModel(engineer, { id, retired: false });
    expect((await machine(engineer, { modelId: id, siteId })).modelId).toBe(id);
  });

  it("is copied with its hardware and, if wanted, its key table", async () => {
    const { id } = await model(engineer);
    const copy = (withKeyTable: boolean) =>
      copyModel(engineer, { id, code: unique("c").slice(0, 40), name: "Copy", withKeyTable });
    const full = await copy(true);
    expect(full.hardware).toEqual((await showModel(engineer, id)).hardware);
    expect((await showKeyTable(engineer, full.id)).rules).toEqual(KEY_RULES);
    expect((await copy(false)).keyTableVersion).toBe(0);
  });

  it("is named where an item is used, with the axes", async () => {
    const motor = (await item(engineer, "motor")).id;
    const made = await make(modelHardwareOf({ ...items, motor }, ["x", "y"]));
    const shown = await showItem(engineer, { kind: "motor", id: motor });
    expect(shown.usedBy.models).toEqual([
      { id: made.id, code: made.code, name: made.name, axes: ["x", "y"] },
    ]);
  });
});
