import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { stopQueue } from "@/lib/server/queue";
import { sequelize } from "@/lib/server/sequelize";
import { verifyChain } from "@/lib/services/record/verify-chain";
import { ChangeRequest } from "@/models/changes";
import { Machine, MachineStatus } from "@/models/machines";
import { Site } from "@/models/catalog";
import { loadFleet } from "../../../scripts/demo/load";
import { DEMO_MODELS } from "../../../scripts/demo/models";
import { loadPeople } from "../../../scripts/demo/people";
import { SYSTEM } from "@/lib/domain/roles";

const now = new Date();
const standings = new Map<string, MachineStatus>();

beforeAll(async () => {
  await loadFleet({ people: await loadPeople(now), now }, () => undefined);
  const machines = await Machine.findAll({ include: [{ model: MachineStatus, as: "status" }] });
  for (const { serial, status } of machines) if (status) standings.set(serial, status);
}, 600_000);

afterAll(async () => {
  await stopQueue();
  await sequelize.close();
});

describe("the demo fleet", () => {
  it("has at least forty machines of three models with two to five axes, on two sites of different ambient", async () => {
    expect(standings.size).toBeGreaterThanOrEqual(40);
    expect(DEMO_MODELS.map(({ axes }) => axes.length)).toEqual([5, 3, 2]);
    const sites = await Site.findAll({ where: { code: ["north-hall", "foundry-annex"] } });
    expect(new Set(sites.map(({ ambientC }) => ambientC)).size).toBe(2);
  });

  it.each([
    ["LD-107", "over", /X torque margin/],
    ["DG-104", "over", /Z hold/],
    ["DG-111", "near", /Y motor case/],
    ["DG-112", "near", /X .*0\.3 %/],
    ["DG-103", "near", /X/],
    ["DG-109", "within", /Y slower/],
    ["LD-103", "within", /X corner/],
    ["LD-110", "within", /accelerates more slowly/],
    ["TS-108", "cannot", /not read for (39|40) days/],
    ["TS-114", "cannot", /not read/],
  ])("shows %s as %s", (serial, level, sentence) => {
    const status = standings.get(serial);
    expect(status?.level).toBe(level);
    expect(status?.sentence).toMatch(sentence);
  });

  it("has the others on baseline, those with a permitted deviation among them", () => {
    for (const serial of ["DG-101", "DG-106", "LD-105", "TS-107"])
      expect(standings.get(serial)?.level).toBeNull();
    expect(JSON.stringify(standings.get("DG-106")?.cells)).toContain("deviation");
  });

  it("has a change in every state worth seeing, and a record whose chain holds", async () => {
    const states = new Set((await ChangeRequest.findAll()).map(({ state }) => state));
    expect([...states]).toEqual(
      expect.arrayContaining(["declined", "deferred", "draft", "evaluation", "implementation", "verified"]),
    );
    expect((await verifyChain({ actor: SYSTEM, now })).brokenAt).toBeNull();
  });
});
