import { readFileSync } from "node:fs";
import { pathToFileURL } from "node:url";
import { beforeAll, describe, expect, test, vi } from "vitest";
import type { Action } from "@/lib/domain/actions";
import { ACTIONS } from "@/lib/domain/actions";
import type { Actor } from "@/lib/domain/roles";
import { ROLES } from "@/lib/domain/roles";
import { pageActor } from "@/lib/http/page-actor";
import { POLICY_TABLE } from "@/lib/policies/table";
import { filesNamed } from "@/tests/support/files";
import { person } from "@/tests/support/world";

const asking: { actor: Actor | null } = { actor: null };
vi.mock("@/lib/http/actor", () => ({ cookieActor: async () => asking.actor }));
vi.mock("next/headers", () => ({
  headers: async () => new Headers({ "x-keepstep-path": "/changes?page=2" }),
}));
vi.mock("next/navigation", async (original) => ({
  ...(await original<object>()),
  redirect: (to: string) => {
    throw new Error(`to ${to}`);
  },
}));

const pages = filesNamed("app/(desk)", "page.tsx").map((file) => {
  const calls = [...readFileSync(file, "utf8").matchAll(/pageActor\(\s*"([a-z_.]+)"/g)];
  return { file, actions: calls.map((call) => call[1] as Action) };
});

const people = new Map<string, Actor>();
beforeAll(async () => {
  for (const role of ROLES) people.set(role, (await person(role)).actor);
});

type Page = (given: { params: Promise<object>; searchParams: Promise<object> }) => Promise<unknown>;

async function open(file: string): Promise<unknown> {
  const { default: page } = (await import(pathToFileURL(file).href)) as { default: Page };
  return page({ params: Promise.resolve({}), searchParams: Promise.resolve({}) });
}

test("there are pages to walk", () => {
  expect(pages.map(({ file }) => file)).toContain("app/(desk)/record/page.tsx");
});

describe.each(pages)("$file", ({ file, actions }) => {
  test("asks lib/policies for exactly one act that exists", () => {
    expect(actions).toHaveLength(1);
    expect(ACTIONS).toContain(actions[0]);
  });

  test("sends nobody to sign in and back, before anything is loaded", async () => {
    asking.actor = null;
    await expect(open(file)).rejects.toThrow(`to /sign-in?next=${encodeURIComponent("/changes?page=2")}`);
  }, 60_000);

  test("turns away the roles that the table does not name, before anything is loaded", async () => {
    const [action] = actions as [Action];
    for (const role of ROLES.filter((one) => !POLICY_TABLE[action].roles.includes(one))) {
      asking.actor = people.get(role)!;
      await expect(open(file), role).rejects.toThrow(`to /not-allowed?why=${action}`);
    }
  });

  test("lets the roles in that the table names", async () => {
    const [action] = actions as [Action];
    for (const role of POLICY_TABLE[action].roles) {
      asking.actor = people.get(role)!;
      await expect(pageActor(action)).resolves.toMatchObject({ actor: { role } });
    }
  });
});
