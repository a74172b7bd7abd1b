import { afterAll, beforeAll, describe, expect, test, vi } from "vitest";
import type { Actor } from "@/lib/domain/roles";
import { decide } from "@/lib/policies/decide";
import { ALL_OPERATIONS } from "@/lib/schemas/operations/all";
import { stopQueue } from "@/lib/server/queue";
import { allCallers, allDoors, type Caller, type Door } from "./support";

const asking: { actor: Actor | null } = { actor: null };
vi.mock("@/lib/http/actor", () => ({ requestActor: async () => asking.actor }));

/** Only these answer anybody. */
const OPEN = ["GET /health", "GET /openapi.json"];
/** Whatever else a path asks for is the number of an object that does not exist. */
const KNOWN_PARAMS: Readonly<Record<string, string>> = { kind: "motor" };

let doors: Door[];
let callers: Caller[];
beforeAll(async () => {
  doors = await allDoors();
  callers = await allCallers();
}, 120_000);
afterAll(() => stopQueue());

const nameOf = ({ method, path }: { method: string; path: string }) => `${method} ${path}`;

async function knock({ method, path, handler }: Door, actor: Actor | null): Promise<Response> {
  asking.actor = actor;
  const names = [...path.matchAll(/\{(\w+)\}/g)].map((match) => match[1] ?? "");
  const params = Object.fromEntries(names.map((name) => [name, KNOWN_PARAMS[name] ?? crypto.randomUUID()]));
  const body = method === "GET" || method === "DELETE" ? null : "{}";
  const request = new Request(`http://127.0.0.1/api/v1${path}`, {
    method,
    body,
    headers: { "content-type": "application/json", "if-match": '"1"' },
  });
  return handler(request, { params: Promise.resolve(params) });
}

describe("routes and operations", () => {
  test("every exported method answers for exactly one operation, and every operation has its route", () => {
    expect(doors.map(nameOf).sort()).toEqual(ALL_OPERATIONS.map(nameOf).sort());
    for (const door of doors) expect(nameOf(door.handler.operation)).toBe(nameOf(door));
  });

  test("no two operations share a name", () => {
    const ids = ALL_OPERATIONS.map(({ id }) => id);
    expect(ids.filter((id, index) => ids.indexOf(id) !== index)).toEqual([]);
  });

  test("only the health and the description of the API are open to anybody", () => {
    expect(
      ALL_OPERATIONS.filter(({ action }) => action === null)
        .map(nameOf)
        .sort(),
    ).toEqual(OPEN);
  });
});

describe("who is let in", () => {
  test("nobody gets 401 everywhere but at the open doors", async () => {
    const wrong: string[] = [];
    for (const door of doors) {
      const { status } = await knock(door, null);
      if ((status === 401) === OPEN.includes(nameOf(door))) wrong.push(`${nameOf(door)}: ${status}`);
    }
    expect(wrong).toEqual([]);
  });

  test("everybody else gets 403 exactly where the policy table says no", async () => {
    const wrong: string[] = [];
    for (const door of doors)
      for (const { name, actor } of callers.filter((caller) => caller.actor !== null)) {
        const { action } = door.handler.operation;
        const allowed = action === null || decide(actor, action).allowed;
        const { status } = await knock(door, actor);
        const fits = allowed ? status !== 401 && status !== 403 && status < 500 : status === 403;
        if (!fits) wrong.push(`${nameOf(door)} for ${name}: ${status}, the table says ${allowed}`);
      }
    expect(wrong).toEqual([]);
  }, 300_000);
});

describe("what a browser may send", () => {
  const door = (name: string) => doors.find((one) => nameOf(one) === name)!;
  const post = (headers: Record<string, string>) =>
    door("POST /sites").handler(
      new Request("http://desk.test/api/v1/sites", {
        method: "POST",
        body: "{}",
        headers: { "content-type": "application/json", host: "desk.test", ...headers },
      }),
      { params: Promise.resolve({}) },
    );

  test.each<Record<string, string>>([
    { origin: "https://elsewhere.test" },
    { origin: "null" },
    { "sec-fetch-site": "cross-site" },
    { "sec-fetch-site": "same-site" },
  ])("a write with the cookie from %o is refused", async (headers) => {
    asking.actor = callers.find(({ name }) => name === "admin")!.actor;
    const response = await post(headers);
    expect(response.status).toBe(403);
    expect(await response.json()).toMatchObject({ detail: expect.stringContaining("another site") });
  });

  test("a write from our own page goes on to its schema", async () => {
    asking.actor = callers.find(({ name }) => name === "admin")!.actor;
    const response = await post({ origin: "http://desk.test", "sec-fetch-site": "same-origin" });
    expect(response.status).toBe(422);
    expect(response.headers.get("content-type")).toBe("application/problem+json");
    expect(await response.json()).toMatchObject({ pointer: "/code" });
  });
});
