import { describe, expect, test } from "vitest";
import type { Action } from "@/lib/domain/actions";
import { ACTIONS } from "@/lib/domain/actions";
import type { Actor, Role, Scope } from "@/lib/domain/roles";
import { ROLES, SCOPES, SYSTEM } from "@/lib/domain/roles";
import { decide } from "@/lib/policies/decide";
import { scopesOf } from "@/lib/policies/scopes";

/** One letter a role: Viewer, Technician, Engineer, aPprover, Admin; then the scope in which a token may do it. */
const EXPECTED: Record<Action, readonly [letters: string, scope: Scope | null]> = {
  "floor.read": ["VTEPA", "read"],
  "machines.read": ["VTEPA", "read"],
  "machines.write": ["EPA", null],
  "machines.hardware": ["TEPA", null],
  "readings.read": ["VTEPA", "read"],
  "readings.create": ["TEP", "readings"],
  "check.run": ["VTEPA", "check"],
  "changes.read": ["VTEPA", "read"],
  "changes.create": ["EP", "propose"],
  "changes.edit": ["EP", "propose"],
  "changes.comment": ["TEP", "propose"],
  "changes.submit": ["EP", "propose"],
  "changes.take_back": ["EP", "propose"],
  "changes.decide": ["P", null],
  "changes.resume": ["EP", null],
  "changes.withdraw": ["EP", null],
  "changes.release": ["EP", null],
  "changes.back_out": ["P", null],
  "verifications.create": ["TEP", null],
  "test_sheets.read": ["VTEPA", "read"],
  "test_sheets.write": ["TEP", null],
  "catalog.read": ["VTEPA", "read"],
  "catalog.write": ["EPA", null],
  "models.write": ["EPA", null],
  "key_tables.write": ["EPA", null],
  "checks.read": ["VTEPA", "read"],
  "rehearsals.read": ["VTEPA", "read"],
  "rehearsals.start": ["EP", null],
  "record.read": ["VTEPA", "read"],
  "sites.write": ["A", null],
  "policies.read": ["VTEPA", "read"],
  "policies.write": ["A", null],
  "users.read": ["A", null],
  "users.write": ["A", null],
  "tokens.read": ["A", null],
  "tokens.write": ["A", null],
  "mail.read": ["VTEPA", null],
  "account.write": ["VTEPA", null],
  "search.read": ["VTEPA", "read"],
};

const LETTERS: Record<Role, string> = {
  viewer: "V",
  technician: "T",
  engineer: "E",
  approver: "P",
  admin: "A",
};
const person = (role: Role): Actor => ({ kind: "person", id: "p", name: "P", role, sessionId: "s" });
const token = (role: Role, scopes: readonly Scope[]): Actor => ({
  kind: "token",
  id: "t",
  name: "T",
  role,
  scopes,
  ownerId: "o",
});

describe.each(ACTIONS)("%s", (action) => {
  const [letters, scope] = EXPECTED[action];

  test.each(ROLES)("is decided for a person with the role %s", (role) => {
    expect(decide(person(role), action).allowed).toBe(letters.includes(LETTERS[role]));
  });

  test.each(SCOPES)("is decided for a token with the scope %s alone", (one) => {
    for (const role of ROLES)
      expect(decide(token(role, [one]), action).allowed).toBe(
        letters.includes(LETTERS[role]) && one === scope,
      );
  });

  test("is refused to nobody and to a token without a scope, and open to the system", () => {
    expect(decide(null, action)).toEqual({ allowed: false, reason: "Sign in first." });
    expect(decide(token("approver", []), action).allowed).toBe(false);
    expect(decide(SYSTEM, action).allowed).toBe(true);
  });
});

test("an admin signs nothing and changes no configuration", () => {
  const acts = ACTIONS.filter((action) => action.startsWith("changes.") && action !== "changes.read");
  expect(acts.filter((action) => decide(person("admin"), action).allowed)).toEqual([]);
  expect(decide(person("admin"), "verifications.create").allowed).toBe(false);
});

test("a role has the scopes in which it may do anything at all", () => {
  expect(scopesOf("viewer")).toEqual(["check", "read"]);
  expect(scopesOf("technician")).toEqual(["check", "read", "readings", "propose"]);
  expect(scopesOf("engineer")).toEqual(["check", "read", "readings", "propose"]);
  expect(scopesOf("admin")).toEqual(["check", "read"]);
});
