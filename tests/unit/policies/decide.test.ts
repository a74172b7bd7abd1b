import { expect, test } from "vitest";
import type { Actor, Role } from "@/lib/domain/roles";
import { decide, may } from "@/lib/policies/decide";

const person = (id: string, role: Role): Actor => ({ kind: "person", id, name: id, role, sessionId: "s" });
const change = { authorId: "author", lastEditorId: "editor" };

test("whoever wrote a change does not decide on it, nor on its return", () => {
  for (const action of ["changes.decide", "changes.back_out"] as const)
    expect(decide(person("author", "approver"), action, change)).toEqual({
      allowed: false,
      reason: "You wrote this change: somebody else must decide on it.",
    });
});

test("whoever edited the proposal last does not decide on it", () => {
  expect(decide(person("editor", "approver"), "changes.decide", change)).toEqual({
    allowed: false,
    reason: "You edited this proposal last: somebody else must decide on it.",
  });
});

test("an approver who is neither decides", () => {
  expect(may(person("third", "approver"), "changes.decide", change)).toBe(true);
  expect(may(person("third", "engineer"), "changes.decide", change)).toBe(false);
});

test("the person behind a token that wrote a change does not decide on it", () => {
  const written = { authorId: "owner", lastEditorId: "owner" };
  expect(may(person("owner", "approver"), "changes.decide", written)).toBe(false);
});

test("only the author takes a proposal back, by hand or through a token", () => {
  const token: Actor = {
    kind: "token",
    id: "t",
    name: "t",
    role: "engineer",
    scopes: ["propose"],
    ownerId: "author",
  };
  expect(may(person("author", "engineer"), "changes.take_back", change)).toBe(true);
  expect(may(token, "changes.take_back", change)).toBe(true);
  expect(may({ ...token, ownerId: "third" }, "changes.take_back", change)).toBe(false);
  expect(may(person("third", "approver"), "changes.take_back", change)).toBe(false);
});

test("the author or an approver withdraws a change, another engineer does not", () => {
  expect(may(person("author", "engineer"), "changes.withdraw", change)).toBe(true);
  expect(may(person("third", "approver"), "changes.withdraw", change)).toBe(true);
  expect(may(person("third", "engineer"), "changes.withdraw", change)).toBe(false);
});

test("a refusal says which role or scope it takes", () => {
  const token: Actor = { kind: "token", id: "t", name: "t", role: "viewer", scopes: ["check"], ownerId: "o" };
  expect(decide(person("v", "viewer"), "changes.create")).toMatchObject({
    reason: "The role viewer may not do this (changes.create).",
  });
  expect(decide(token, "floor.read")).toMatchObject({ reason: "This token lacks the scope read." });
  expect(decide(token, "mail.read")).toMatchObject({
    reason: "A token may not do this: it takes a person who signs in.",
  });
});
