import { afterAll, describe, expect, it } from "vitest";
import { sequelize } from "@/lib/server/sequelize";
import { backOutChange } from "@/lib/services/changes/back-out";
import { releaseChange } from "@/lib/services/changes/release";
import { showChange } from "@/lib/services/changes/show";
import { downloadForMachine } from "@/lib/services/implementation/download";
import { recordVerification } from "@/lib/services/implementation/verify";
import { machineCondition } from "@/lib/services/machines/condition";
import { refreshMachineStatus } from "@/lib/services/machines/refresh-status";
import { ChangeRequest } from "@/models/changes";
import { MachineStatus } from "@/models/machines";
import { act, approve, baseline, draft, floor, later, PASSWORD, read, textOf } from "../../support/changes";
import { person } from "../../support/world";

afterAll(() => sequelize.close());

const TEST = {
  tested: "Ten reference returns at full speed",
  result: "pass" as const,
  ambientC: 24,
  note: "",
  statement: null,
};

async function stateOf(id: string): Promise<string | undefined> {
  return (await ChangeRequest.findByPk(id))?.state;
}

describe("a change from draft to verified", () => {
  it("moves what a machine requires at the release and not at the approval", async () => {
    const world = await floor(1);
    const [machine] = world.machines;
    await baseline(world, textOf());
    const change = await draft(world, textOf({ current: 900 }));
    // The first baseline is still unproved on the machine, so it is backed out of the way by proving it.
    await prove(world, machine!, textOf());
    await approve(world, change.id);
    const before = await machineCondition(machine!.id, new Date());
    expect(before.required?.files[0]?.text).toBe(textOf());
    await releaseChange(later(world.engineer, 60), act(change.id));
    const after = await machineCondition(machine!.id, later(world.engineer, 120).now);
    expect(after.required?.files[0]?.text).toBe(textOf({ current: 900 }));
    expect(after.drift?.level).not.toBeNull();
  });

  it("is verified by itself with its last machine, and not before", async () => {
    const world = await floor(2);
    const change = await baseline(world, textOf());
    const [one, two] = world.machines;
    await prove(world, one!, textOf());
    expect(await stateOf(change.id)).toBe("implementation");
    await prove(world, two!, textOf());
    expect(await stateOf(change.id)).toBe("verified");
    const view = await showChange(world.engineer, change.id);
    expect(view.machines.map(({ missing }) => missing)).toEqual([null, null]);
    expect((await MachineStatus.findByPk(one!.id))?.sentence).toBe("on baseline");
  });

  it("asks for each proof that is missing, in words", async () => {
    const world = await floor(1);
    const [machine] = world.machines;
    const change = await baseline(world, textOf());
    const missing = async () =>
      (await showChange(later(world.engineer, 900), change.id)).machines[0]?.missing;
    expect(await missing()).toContain("not been downloaded");
    await downloadForMachine(later(world.technician, 10), { changeId: change.id, machineId: machine!.id });
    expect(await missing()).toContain("read back since the download");
    await read(later(world.technician, 20), { ...machine!, text: textOf(), layer: "file" });
    expect(await missing()).toContain("read back since the download");
    await read(later(world.technician, 30), { ...machine!, text: textOf({ current: 850 }) });
    expect(await missing()).toContain("not as required: X run current and Y run current");
    await read(later(world.technician, 40), { ...machine!, serial: "", text: textOf() });
    expect(await missing()).toContain("serial number");
    await read(later(world.technician, 50), { ...machine!, text: textOf() });
    expect(await missing()).toContain("test on the machine is not recorded");
    const failed = {
      ...TEST,
      machineId: machine!.id,
      result: "fail" as const,
      temperatures: [],
      attachments: [],
    };
    await recordVerification(later(world.technician, 60), {
      changeId: change.id,
      request: failed,
      idempotencyKey: null,
    });
    expect(await missing()).toContain("failed");
    const passed = await recordVerification(later(world.technician, 70), {
      changeId: change.id,
      request: { ...failed, result: "pass" },
      idempotencyKey: null,
    });
    expect(passed).toMatchObject({ state: "verified", machineVerified: true, missing: null });
  });

  it("does not count a read-back that was taken before the download", async () => {
    const world = await floor(1);
    const [machine] = world.machines;
    const change = await baseline(world, textOf());
    await read(later(world.technician, 5), { ...machine!, text: textOf() });
    await downloadForMachine(later(world.technician, 10), { changeId: change.id, machineId: machine!.id });
    const answer = await recordVerification(later(world.technician, 20), {
      changeId: change.id,
      request: { ...TEST, machineId: machine!.id, temperatures: [], attachments: [] },
      idempotencyKey: null,
    });
    expect(answer).toMatchObject({ machineVerified: false, state: "implementation" });
  });

  it("gives the machines back what they required before when it is backed out", async () => {
    const world = await floor(1);
    const [machine] = world.machines;
    await baseline(world, textOf());
    await prove(world, machine!, textOf());
    const change = await draft(world, textOf({ current: 900 }));
    await approve(world, change.id);
    await releaseChange(later(world.engineer, 200), act(change.id));
    const request = { reason: "It rattles.", password: PASSWORD };
    await backOutChange(later(world.approver, 300), { id: change.id, request, ifMatch: null });
    expect(await stateOf(change.id)).toBe("backed_out");
    const after = await machineCondition(machine!.id, later(world.engineer, 400).now);
    expect(after.required?.files[0]?.text).toBe(textOf());
    await refreshMachineStatus(later(world.engineer, 400), machine!.id);
    expect((await MachineStatus.findByPk(machine!.id))?.sentence).toBe("on baseline");
  });
});

describe("a permitted deviation", () => {
  it("is required on its machine until its last day and no longer", async () => {
    const world = await floor(2);
    const [one, two] = world.machines;
    await baseline(world, textOf());
    await prove(world, one!, textOf());
    await prove(world, two!, textOf());
    const until = new Date(world.engineer.now.getTime() + 3 * 86_400_000).toISOString().slice(0, 10);
    const change = await draft(world, textOf({ current: 700 }), {
      modelId: undefined,
      machineId: one!.id,
      deviationUntil: until,
    });
    await approve(world, change.id);
    await releaseChange(later(world.engineer, 300), act(change.id));
    const required = async (id: string, days: number) =>
      (await machineCondition(id, later(world.engineer, 400 + days * 86_400).now)).required?.files[0]?.text;
    expect(await required(one!.id, 0)).toBe(textOf({ current: 700 }));
    expect(await required(two!.id, 0)).toBe(textOf());
    expect(await required(one!.id, 5)).toBe(textOf());
  });

  it("keeps its values when the baseline moves under it", async () => {
    const world = await floor(1);
    const [machine] = world.machines;
    await baseline(world, textOf());
    await prove(world, machine!, textOf());
    const until = new Date(world.engineer.now.getTime() + 30 * 86_400_000).toISOString().slice(0, 10);
    const deviation = await draft(world, textOf({ current: 700 }), {
      modelId: undefined,
      machineId: machine!.id,
      deviationUntil: until,
    });
    await approve(world, deviation.id);
    await releaseChange(later(world.engineer, 200), act(deviation.id));
    await prove(world, machine!, textOf({ current: 700 }), { changeId: deviation.id, from: 300 });
    const change = await draft(world, textOf({ accel: 2500 }));
    await approve(world, change.id);
    await releaseChange(later(world.engineer, 600), act(change.id));
    const { required } = await machineCondition(machine!.id, later(world.engineer, 700).now);
    expect(required?.files[0]?.text).toBe(textOf({ accel: 2500, current: 700 }));
  });
});

/** Download, read back, test: seconds after the floor was made, so that times are in order. */
async function prove(
  world: Awaited<ReturnType<typeof floor>>,
  machine: { id: string; serial: string },
  text: string,
  { changeId, from = 10 }: { changeId?: string; from?: number } = {},
): Promise<void> {
  const place = changeId ?? (await openChange(machine.id));
  await downloadForMachine(later(world.technician, from), { changeId: place, machineId: machine.id });
  await read(later(world.technician, from + 10), { ...machine, text });
  const request = { ...TEST, machineId: machine.id, temperatures: [], attachments: [] };
  await recordVerification(later(world.technician, from + 20), {
    changeId: place,
    request,
    idempotencyKey: null,
  });
}

async function openChange(machineId: string): Promise<string> {
  const { LotMachine } = await import("@/models/implementation");
  const place = await LotMachine.findOne({ where: { machineId, verifiedAt: null, endedAt: null } });
  return place!.changeId;
}

it("lets a viewer look at a change and nothing else", async () => {
  const world = await floor(1);
  const change = await baseline(world, textOf());
  const viewer = await person("viewer");
  expect((await showChange(viewer, change.id)).label).toMatch(/^CR-\d{4}$/);
  const download = downloadForMachine(viewer, { changeId: change.id, machineId: world.machines[0]!.id });
  await expect(download).rejects.toMatchObject({ code: "forbidden" });
});
