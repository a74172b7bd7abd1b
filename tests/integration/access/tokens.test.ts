import { beforeAll, expect, test } from "vitest";
import { tokenHash } from "@/lib/services/sessions/resolve";
import { createToken } from "@/lib/services/tokens/create";
import { listTokens } from "@/lib/services/tokens/list";
import { revokeToken } from "@/lib/services/tokens/revoke";
import { Token } from "@/models/people";
import { RecordEvent } from "@/models/record";
import type { TestPerson } from "@/tests/support/world";
import { person } from "@/tests/support/world";
import { lastEvent } from "../catalog/support";

let admin: TestPerson;
beforeAll(async () => {
  admin = await person("admin");
});

test("a token is shown once; its hash is kept and the record has neither", async () => {
  const made = await createToken(admin, { name: "reporter", role: "technician", days: 30 });
  expect(made.token).toMatch(/^ks_[A-Za-z0-9_-]{43}$/);
  expect(made.hint).toBe(made.token.slice(-4));
  expect((await Token.findByPk(made.id))?.tokenHash).toBe(tokenHash(made.token));
  const kept = JSON.stringify([await listTokens(admin, { state: "all" }), await RecordEvent.findAll()]);
  expect(kept).not.toContain(made.token);
  expect(kept).not.toContain(tokenHash(made.token));
  expect(await lastEvent(made.id)).toMatchObject({ action: "token.made", actorId: admin.actor.id });
});

test("scopes are cut to what the role can do, and a token that could do nothing is not made", async () => {
  const made = await createToken(admin, { name: "a", role: "viewer", scopes: ["propose", "read", "check"] });
  expect(made.scopes).toEqual(["check", "read"]);
  await expect(
    createToken(admin, { name: "b", role: "viewer", scopes: ["propose", "readings"] }),
  ).rejects.toMatchObject({ code: "invalid", pointer: "/scopes" });
});

test("a token stands for 366 days at most, to the second", async () => {
  const made = await createToken(admin, { name: "a year", role: "viewer", days: 366 });
  expect(Date.parse(made.expiresAt) - admin.now.getTime()).toBe(366 * 86_400_000);
  await expect(createToken(admin, { name: "more", role: "viewer", days: 367 })).rejects.toThrow(
    /At most 366 days/,
  );
});

test("the list says which stand, which are revoked and which have expired", async () => {
  const make = (name: string) => createToken(admin, { name, role: "viewer", days: 1 });
  const [stands, revoked] = [await make("stands"), await make("revoked")];
  await revokeToken(admin, { id: revoked.id });
  const states = async (context: TestPerson) =>
    new Map((await listTokens(context, { state: "all" })).items.map(({ id, state }) => [id, state]));
  expect((await states(admin)).get(stands.id)).toBe("standing");
  expect((await states(admin)).get(revoked.id)).toBe("revoked");
  const tomorrow = { ...admin, now: new Date(admin.now.getTime() + 86_400_000) };
  expect((await states(tomorrow)).get(stands.id)).toBe("expired");
  const standing = await listTokens(admin, { state: "standing" });
  expect(standing.items.map(({ id }) => id)).toContain(stands.id);
  expect(standing.items.map(({ id }) => id)).not.toContain(revoked.id);
});

test("a token is revoked once: a second time changes nothing and records nothing", async () => {
  const { id } = await createToken(admin, { name: "twice", role: "viewer" });
  const first = await revokeToken(admin, { id });
  const later = { ...admin, now: new Date(admin.now.getTime() + 1000) };
  expect(await revokeToken(later, { id })).toEqual(first);
  expect(await RecordEvent.count({ where: { objectId: id, action: "token.revoked" } })).toBe(1);
});
