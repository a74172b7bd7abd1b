import { beforeAll, describe, expect, it } from "vitest";
import { createItem } from "@/lib/services/catalog/create";
import { copyItem } from "@/lib/services/catalog/copy";
import { listItems } from "@/lib/services/catalog/list";
import { retireItem } from "@/lib/services/catalog/retire";
import { showItem } from "@/lib/services/catalog/show";
import { updateItem } from "@/lib/services/catalog/update";
import type { TestPerson } from "@/tests/support/world";
import { CATALOG_SAMPLE, EVIDENCE, item, person, unique } from "@/tests/support/world";
import { lastEvent, queuedRechecks } from "./support";

let engineer: TestPerson;
beforeAll(async () => {
  engineer = await person("engineer");
});

describe("a catalog item", () => {
  it("keeps each saved version readable, newest first, with who saved it", async () => {
    const made = await item(engineer, "motor");
    const data = { ...CATALOG_SAMPLE.motor, resistance_ohm: 2.4 };
    const saved = await updateItem(engineer, {
      kind: "motor",
      id: made.id,
      name: made.name,
      data,
      evidence: "Measured with a four-wire meter",
      ifMatch: 1,
    });
    expect(saved.version).toBe(2);
    expect(saved.versions.map(({ version, data: kept }) => [version, kept.resistance_ohm])).toEqual([
      [2, 2.4],
      [1, 2.1],
    ]);
    expect(saved.versions[0]?.createdByName).toBe(engineer.actor.name);
    expect(await lastEvent(made.id)).toMatchObject({
      action: "catalog.saved",
      before: { version: 1, data: { resistance_ohm: 2.1 } },
      after: { version: 2, data: { resistance_ohm: 2.4 } },
    });
  });

  it("refuses a save upon a version that no longer stands, and says what stands", async () => {
    const { id, name, data, evidence } = await item(engineer, "mount");
    const save = { kind: "mount" as const, id, name, data, evidence };
    await updateItem(engineer, { ...save, ifMatch: 1 });
    await expect(updateItem(engineer, { ...save, name: "Late", ifMatch: 1 })).rejects.toMatchObject({
      code: "precondition_failed",
      details: { current: { version: 2, name } },
    });
    expect((await showItem(engineer, { kind: "mount", id })).name).toBe(name);
  });

  it("has the machines concerned checked again when it is saved", async () => {
    const { id, name, data, evidence } = await item(engineer, "supply");
    await updateItem(engineer, { kind: "supply", id, name, data, evidence, ifMatch: 1 });
    expect(await queuedRechecks({ itemId: id })).toBe(1);
  });

  it("keeps a missing field missing and a nought a nought", async () => {
    const made = await item(engineer, "motor", { resistance_ohm: 2.1, detent_torque_nm: 0 });
    expect(made.data).toEqual({ resistance_ohm: 2.1, detent_torque_nm: 0 });
  });

  it("refuses a value out of range, a field of another kind and one inside the set-point, by name", async () => {
    const make = (kind: "motor" | "driver", data: Record<string, unknown>) =>
      createItem(engineer, { kind, code: unique("bad"), name: "Bad", data, evidence: EVIDENCE });
    await expect(make("motor", { resistance_ohm: 0 })).rejects.toMatchObject({
      code: "invalid",
      pointer: "/data/resistance_ohm",
    });
    await expect(make("motor", { lead_mm: 8 })).rejects.toMatchObject({ pointer: "/data/lead_mm" });
    await expect(make("driver", { set_point: { gian: 8 } })).rejects.toMatchObject({
      pointer: "/data/set_point/gian",
    });
  });

  it("takes no item without evidence", async () => {
    const bare = { kind: "mount" as const, code: unique("bare"), name: "Bare", data: {}, evidence: " " };
    await expect(createItem(engineer, bare)).rejects.toThrow(/where this comes from/);
  });

  it("has a code of its own within its kind", async () => {
    const { code, name } = await item(engineer, "mount");
    const again = { code, name: "Again", data: {}, evidence: EVIDENCE };
    await expect(createItem(engineer, { kind: "mount", ...again })).rejects.toMatchObject({
      code: "conflict",
      pointer: "/code",
      message: expect.stringContaining(name) as string,
    });
    expect((await createItem(engineer, { kind: "supply", ...again })).code).toBe(code);
  });

  it("is not found under another kind", async () => {
    const { id } = await item(engineer, "motor");
    await expect(showItem(engineer, { kind: "driver", id })).rejects.toMatchObject({ code: "not_found" });
  });

  it("leaves the list when retired and comes back", async () => {
    const { id, code } = await item(engineer, "controller_board");
    const found = async (retired: "yes" | "no") =>
      (await listItems(engineer, { kind: "controller_board", q: code, retired, page: 1, pageSize: 10 }))
        .total;
    await retireItem(engineer, { kind: "controller_board", id, retired: true });
    expect([await found("no"), await found("yes")]).toEqual([0, 1]);
    const back = await retireItem(engineer, { kind: "controller_board", id, retired: false });
    expect(back.retiredAt).toBeNull();
    expect([await found("no"), await found("yes")]).toEqual([1, 0]);
  });

  it("is copied with its data and says where they come from", async () => {
    const original = await item(engineer, "drive_train");
    const copy = await copyItem(engineer, {
      kind: "drive_train",
      id: original.id,
      code: unique("copy"),
      name: "Copy",
    });
    expect(copy.data).toEqual(original.data);
    expect(copy.version).toBe(1);
    expect(copy.evidence).toContain(`Copied from ${original.code}, version 1`);
  });

  it("is found by a part of its code, where % stands for itself", async () => {
    const { code } = await item(engineer, "motor");
    const search = (q: string) =>
      listItems(engineer, { kind: "motor", q, retired: "all", page: 1, pageSize: 10 });
    expect((await search(code.slice(2, 20).toUpperCase())).items.map((row) => row.code)).toContain(code);
    expect((await search("%")).total).toBe(0);
  });

  it("is not for a technician to write", async () => {
    const technician = await person("technician");
    await expect(item(technician, "motor")).rejects.toMatchObject({ code: "forbidden" });
  });
});
