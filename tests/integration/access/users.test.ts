import { afterEach, beforeAll, describe, expect, test } from "vitest";
import { Op } from "sequelize";
import { changePassword } from "@/lib/services/account/change-password";
import { showAccount } from "@/lib/services/account/show";
import { createUser } from "@/lib/services/users/create";
import { deactivateUser } from "@/lib/services/users/deactivate";
import { listUsers } from "@/lib/services/users/list";
import { resetPassword } from "@/lib/services/users/reset-password";
import { updateUser } from "@/lib/services/users/update";
import { User } from "@/models/people";
import type { TestPerson } from "@/tests/support/world";
import { person, site, unique } from "@/tests/support/world";
import { lastEvent } from "../catalog/support";

const PASSWORD = "four words in a row";
const REASON = "for this test";

let admin: TestPerson;
beforeAll(async () => {
  admin = await person("admin");
});

const newcomer = (more: Partial<Parameters<typeof createUser>[1]> = {}) =>
  createUser(admin, {
    email: `${unique("nora")}@example.test`,
    name: "Nora Velten",
    role: "technician",
    siteId: null,
    password: PASSWORD,
    ...more,
  });

describe("a person", () => {
  test("is added with a role and a site, and the record has no password", async () => {
    const { id: siteId, name: siteName } = await site();
    const made = await newcomer({ siteId });
    expect(made).toMatchObject({ role: "technician", siteId, active: true, lastSignInAt: null });
    const event = await lastEvent(made.id);
    expect(event).toMatchObject({ action: "person.added", actorId: admin.actor.id });
    expect(JSON.stringify(event)).not.toMatch(/four words|argon2/);
    const actor = { kind: "person", id: made.id, name: made.name, role: made.role, sessionId: "s" } as const;
    expect(await showAccount({ actor, now: new Date() })).toMatchObject({ siteId, siteName });
  });

  test("keeps a hash by argon2id, never the password", async () => {
    const { id } = await newcomer();
    expect((await User.findByPk(id))?.passwordHash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
  });

  test("needs an address that nobody else signs in with, whatever its capitals", async () => {
    const { email } = await newcomer();
    await expect(newcomer({ email: email.toUpperCase() })).rejects.toMatchObject({
      code: "conflict",
      pointer: "/email",
    });
    const other = await newcomer();
    await expect(updateUser(admin, { ...other, email })).rejects.toMatchObject({ pointer: "/email" });
  });

  test("gets no password that would be guessed, neither at first nor later", async () => {
    const refused = { code: "invalid", pointer: "/password" };
    await expect(newcomer({ password: "Nora Velten 2026" })).rejects.toMatchObject(refused);
    const { id } = await newcomer();
    const guess = { id, password: "Nora Velten 2026", reason: REASON };
    await expect(resetPassword(admin, guess)).rejects.toMatchObject(refused);
  });

  test("is found by a part of the name or address, page by page", async () => {
    const word = unique("zeta");
    for (const one of ["a", "b", "c"]) await newcomer({ name: `${word} ${one}` });
    const query = { q: word.toUpperCase(), active: "all", page: 2, pageSize: 2 } as const;
    const found = await listUsers(admin, query);
    expect([found.total, found.items.map(({ name }) => name)]).toEqual([3, [`${word} c`]]);
    expect((await listUsers(admin, { ...query, q: "100%_", page: 1 })).total).toBe(0);
  });

  test("with the role changed leaves both roles on the record", async () => {
    const made = await newcomer();
    await updateUser(admin, { ...made, role: "engineer" });
    expect(await lastEvent(made.id)).toMatchObject({
      action: "person.changed",
      before: { role: "technician" },
      after: { role: "engineer" },
    });
  });

  test("is not placed at a site that is not there or out of use", async () => {
    await expect(newcomer({ siteId: crypto.randomUUID() })).rejects.toMatchObject({ pointer: "/siteId" });
    const closed = await site();
    await closed.update({ retiredAt: new Date() });
    await expect(newcomer({ siteId: closed.id })).rejects.toMatchObject({ pointer: "/siteId" });
  });
});

describe("one's own password", () => {
  const asPerson = ({ id, name }: { id: string; name: string }) => ({
    actor: { kind: "person", id, name, role: "technician", sessionId: crypto.randomUUID() } as const,
    now: new Date(),
  });

  test("takes the one of now, and another one", async () => {
    const context = asPerson(await newcomer());
    const fresh = "five other words in a row";
    await expect(
      changePassword(context, { currentPassword: "no such", password: fresh }),
    ).rejects.toMatchObject({
      code: "invalid",
      pointer: "/currentPassword",
    });
    await expect(
      changePassword(context, { currentPassword: PASSWORD, password: PASSWORD }),
    ).rejects.toMatchObject({ pointer: "/password" });
    expect(await changePassword(context, { currentPassword: PASSWORD, password: fresh })).toEqual({
      endedSessions: 0,
    });
  });

  test("is not found out by trying: wrong ones are counted as at the sign-in", async () => {
    const context = asPerson(await newcomer());
    const guess = { currentPassword: "a wrong password", password: "five other words in a row" };
    for (let tries = 0; tries < 10; tries += 1)
      await expect(changePassword(context, guess)).rejects.toMatchObject({ code: "invalid" });
    await expect(changePassword(context, { ...guess, currentPassword: PASSWORD })).rejects.toMatchObject({
      code: "throttled",
    });
  });

  test("is not reset past the one of now by an admin", async () => {
    const reset = { id: admin.actor.id, password: "five other words in a row", reason: REASON };
    await expect(resetPassword(admin, reset)).rejects.toMatchObject({ code: "invalid" });
  });
});

describe("the last active admin", () => {
  const setAside = async (keep: readonly string[]) => {
    const others = await User.findAll({
      where: { role: "admin", active: true, id: { [Op.notIn]: [...keep] } },
    });
    for (const other of others) await other.update({ active: false });
    return others;
  };
  let aside: User[] = [];
  afterEach(async () => {
    for (const other of aside) await other.update({ active: true });
  });

  test("is neither deactivated nor given another role", async () => {
    const last = await person("admin");
    aside = await setAside([last.actor.id]);
    const { id } = last.actor;
    const { email, name } = (await User.findByPk(id))!;
    await expect(deactivateUser(last, { id, deactivated: true, reason: REASON })).rejects.toMatchObject({
      code: "conflict",
      message: expect.stringContaining("last active admin"),
    });
    await expect(updateUser(last, { id, email, name, role: "approver", siteId: null })).rejects.toMatchObject(
      { code: "conflict" },
    );
    expect(await User.findByPk(id)).toMatchObject({ role: "admin", active: true });
  });

  test("remains where two admins put each other out at the same moment", async () => {
    const [one, two] = [await person("admin"), await person("admin")];
    aside = await setAside([one.actor.id, two.actor.id]);
    const results = await Promise.allSettled([
      deactivateUser(one, { id: two.actor.id, deactivated: true, reason: REASON }),
      deactivateUser(two, { id: one.actor.id, deactivated: true, reason: REASON }),
    ]);
    expect(results.map(({ status }) => status).sort()).toEqual(["fulfilled", "rejected"]);
    const left = await User.count({ where: { id: [one.actor.id, two.actor.id], active: true } });
    expect(left).toBe(1);
  });
});
