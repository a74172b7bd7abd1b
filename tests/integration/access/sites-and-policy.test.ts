import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { DEFAULT_POLICY } from "@/lib/domain/policy";
import { sequelize } from "@/lib/server/sequelize";
import { stopQueue } from "@/lib/server/queue";
import { ensurePolicy } from "@/lib/services/policies/ensure";
import { savePolicy } from "@/lib/services/policies/save";
import { showPolicies } from "@/lib/services/policies/show";
import { createSite } from "@/lib/services/sites/create";
import { listSites } from "@/lib/services/sites/list";
import { retireSite } from "@/lib/services/sites/retire";
import { updateSite } from "@/lib/services/sites/update";
import { PolicyVersion } from "@/models/catalog";
import { Machine } from "@/models/machines";
import type { TestPerson } from "@/tests/support/world";
import { machine, model, person, unique } from "@/tests/support/world";
import { lastEvent, queuedRechecks } from "../catalog/support";

let admin: TestPerson;
let engineer: TestPerson;
beforeAll(async () => {
  [admin, engineer] = [await person("admin"), await person("engineer")];
});
afterAll(() => stopQueue());

const hall = (ambientC: number | null = 35) =>
  createSite(admin, { code: unique("H"), name: "Hall", ambientC });

describe("a site", () => {
  test("keeps a missing ambient missing, and is listed with its machines", async () => {
    const site = await hall(null);
    const made = await model(engineer);
    await machine(engineer, { modelId: made.id, siteId: site.id });
    const { items } = await listSites(engineer, { retired: "no" });
    expect(items.find(({ id }) => id === site.id)).toMatchObject({ ambientC: null, machines: 1 });
  });

  test("has its machines checked again after another ambient, and not after another name", async () => {
    const { id } = await hall(35);
    await updateSite(admin, { id, name: "Hall north", ambientC: 35, ifMatch: 1 });
    expect(await queuedRechecks({ siteId: id })).toBe(0);
    const saved = await updateSite(admin, { id, name: "Hall north", ambientC: 31.5, ifMatch: 2 });
    expect(saved).toMatchObject({ ambientC: 31.5, version: 3 });
    expect(await queuedRechecks({ siteId: id })).toBe(1);
    expect(await lastEvent(id)).toMatchObject({
      action: "site.changed",
      before: { ambientC: 35 },
      after: { ambientC: 31.5 },
    });
  });

  test("is not saved upon a version that no longer stands", async () => {
    const { id } = await hall();
    const save = (ambientC: number) => updateSite(admin, { id, name: "Hall", ambientC, ifMatch: 1 });
    const results = await Promise.allSettled([save(30), save(40)]);
    expect(results.map(({ status }) => status).sort()).toEqual(["fulfilled", "rejected"]);
    expect(results.find(({ status }) => status === "rejected")).toMatchObject({
      reason: { code: "precondition_failed", details: { current: { version: 2 } } },
    });
  });

  test("needs a code of its own", async () => {
    const { code } = await hall();
    await expect(createSite(admin, { code, name: "Other" })).rejects.toMatchObject({ pointer: "/code" });
  });

  test("is taken out of use only without machines, and back", async () => {
    const { id } = await hall();
    const { id: machineId } = await machine(engineer, { modelId: (await model(engineer)).id, siteId: id });
    await expect(retireSite(admin, { id, retired: true })).rejects.toMatchObject({
      code: "conflict",
      message: expect.stringContaining("1 machine is still at Hall"),
    });
    await Machine.update({ state: "retired" }, { where: { id: machineId } });
    expect((await retireSite(admin, { id, retired: true })).retiredAt).not.toBeNull();
    expect((await retireSite(admin, { id, retired: false })).retiredAt).toBeNull();
  });
});

describe("the policy", () => {
  const note = "for this test";
  const current = async () => (await showPolicies(admin)).current;

  test("has the product's defaults as its first version once an evaluation refers to it", async () => {
    const { version } = await sequelize.transaction((transaction) => ensurePolicy(transaction));
    expect(version).toBeGreaterThan(0);
    expect((await PolicyVersion.findByPk(1))?.data).toEqual(DEFAULT_POLICY);
  });

  test("is saved as a new version beside the old ones, and the whole fleet is checked again", async () => {
    const before = await current();
    const queued = await queuedRechecks({ all: true });
    const policy = { ...before.policy, junction_limit_c: 118 };
    const saved = await savePolicy(admin, { policy, note, ifMatch: before.version });
    expect(saved).toMatchObject({ version: before.version + 1, policy: { junction_limit_c: 118 } });
    expect(await queuedRechecks({ all: true })).toBe(queued + 1);
    const { current: now, history } = await showPolicies(admin);
    expect(now).toEqual(saved);
    expect(history.map(({ version }) => version)).toContain(before.version);
    expect(await lastEvent(String(saved.version))).toMatchObject({ action: "policy.saved", reason: note });
  });

  test("goes to one of two who save on the same version; the other is told what stands", async () => {
    const { policy, version } = await current();
    const save = (days: number) =>
      savePolicy(admin, { policy: { ...policy, stale_after_days: days }, note, ifMatch: version });
    const results = await Promise.allSettled([save(20), save(40)]);
    expect(results.map(({ status }) => status).sort()).toEqual(["fulfilled", "rejected"]);
    expect(results.find(({ status }) => status === "rejected")).toMatchObject({
      reason: { code: "precondition_failed", details: { current: { version: version + 1 } } },
    });
  });

  test("of an earlier version is never rewritten", async () => {
    await expect(PolicyVersion.update({ note: "other" }, { where: { version: 1 } })).rejects.toThrow(
      /policies is append-only/,
    );
  });
});
