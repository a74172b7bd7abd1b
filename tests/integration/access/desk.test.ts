import { afterAll, beforeAll, describe, expect, test, vi } from "vitest";
import { openApiDocument } from "@/lib/http/openapi";
import { ALL_OPERATIONS } from "@/lib/schemas/operations/all";
import { stopQueue } from "@/lib/server/queue";
import { sequelize } from "@/lib/server/sequelize";
import { checkHealth } from "@/lib/services/health/check";
import { search } from "@/lib/services/search/find";
import type { TestPerson } from "@/tests/support/world";
import { item, machine, model, person, site, unique } from "@/tests/support/world";

let engineer: TestPerson;
beforeAll(async () => {
  engineer = await person("engineer");
});
afterAll(() => stopQueue());

const hits = async (q: string, context: TestPerson = engineer) => {
  const { groups } = await search(context, { q });
  return new Map(groups.map(({ title, hits: found }) => [title, found.map(({ href }) => href)]));
};

describe("finding", () => {
  test("finds a machine by a part of its serial number, with model and site", async () => {
    const [made, hall] = [await model(engineer), await site()];
    const { id, serial } = await machine(engineer, { modelId: made.id, siteId: hall.id });
    const { groups } = await search(engineer, { q: serial.slice(3).toUpperCase() });
    expect(groups).toEqual([
      {
        title: "Machines",
        more: false,
        hits: [{ href: `/machines/${id}`, title: serial, note: `Test ${made.code}, ${hall.name}` }],
      },
    ]);
  });

  test("finds hardware, models and sites by code and name", async () => {
    const motor = await item(engineer, "controller_board");
    expect((await hits(motor.code)).get("Hardware")).toEqual([`/catalog/controller-board/${motor.id}`]);
    const made = await model(engineer);
    expect((await hits(`test ${made.code}`)).get("Machine models")).toEqual([`/catalog/models/${made.id}`]);
    const hall = await site();
    expect((await hits(hall.code)).get("Sites")).toEqual([`/floor?siteId=${hall.id}`]);
  });

  test("finds what can be done, as far as the role may do it", async () => {
    const add = "Acts and pages";
    expect((await hits("upload reading")).get(add)).toEqual(["/readings/new"]);
    expect((await hits("upload reading", await person("viewer"))).get(add)).toBeUndefined();
    expect((await hits("token", await person("admin"))).get(add)).toEqual(["/settings/tokens"]);
    expect((await hits("token")).get(add)).toBeUndefined();
  });

  test("finds people for an admin alone", async () => {
    const { actor } = await person("technician");
    expect((await hits(actor.name, await person("admin"))).get("People")).toEqual([
      `/settings/people/${actor.id}`,
    ]);
    expect((await hits(actor.name)).get("People")).toBeUndefined();
  });

  test("takes any signs for what they are and finds nothing for nothing", async () => {
    expect((await search(engineer, { q: "" })).groups).toEqual([]);
    expect((await search(engineer, { q: "%_\\ '; --" })).groups).toEqual([]);
    expect((await search(engineer, { q: "99999999" })).groups).toEqual([]);
  });

  test("says where there are more than it shows", async () => {
    const word = unique("many");
    const hall = await site();
    for (let count = 0; count < 9; count += 1) await site();
    await hall.update({ name: word });
    const { groups } = await search(engineer, { q: "Hall site" });
    const sites = groups.find(({ title }) => title === "Sites")!;
    expect([sites.hits.length, sites.more]).toEqual([8, true]);
  });
});

describe("health", () => {
  test("is ok while the database answers, and says so when it does not", async () => {
    expect(await checkHealth()).toEqual({ status: "ok" });
    const query = vi.spyOn(sequelize, "query").mockRejectedValueOnce(new Error("connection refused"));
    await expect(checkHealth()).rejects.toMatchObject({ code: "unavailable" });
    query.mockRestore();
  });
});

describe("the OpenAPI description", () => {
  const document = openApiDocument();
  const operations = ALL_OPERATIONS.map((operation) => {
    const item = document.paths?.[operation.path] as Record<string, Record<string, unknown>> | undefined;
    return { operation, described: item?.[operation.method.toLowerCase()] };
  });

  test("is of version 3.1 and describes every operation, with its scope", () => {
    expect(document.openapi).toMatch(/^3\.1\./);
    for (const { operation, described } of operations) {
      expect(described, operation.id).toMatchObject({ operationId: operation.id });
      expect(described?.description).toMatch(operation.action === null ? /^Open/ : /^Roles: /);
    }
  });

  test("names every path parameter, If-Match and Idempotency-Key where they are taken", () => {
    for (const { operation, described } of operations) {
      const given = (described?.parameters ?? []) as { name: string; in: string; required?: boolean }[];
      const inPath = given.filter((one) => one.in === "path").map(({ name }) => `{${name}}`);
      expect(inPath.sort(), operation.id).toEqual((operation.path.match(/\{\w+\}/g) ?? []).sort());
      const ifMatch = given.find(({ name }) => name === "If-Match");
      expect(ifMatch?.required === true, operation.id).toBe(operation.ifMatch === "required");
      expect(given.some(({ name }) => name === "Idempotency-Key")).toBe(operation.idempotent === true);
    }
  });

  test("has every schema that it refers to", () => {
    const text = JSON.stringify(document);
    const referred = [...text.matchAll(/"#\/components\/schemas\/([^"]+)"/g)].map((match) => match[1]);
    const known = Object.keys(document.components?.schemas ?? {});
    expect(referred.filter((name) => !known.includes(name ?? ""))).toEqual([]);
    expect(known).toContain("Problem");
  });
});
