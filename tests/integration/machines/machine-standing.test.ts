import { beforeAll, describe, expect, test } from "vitest";
import { showFloor } from "@/lib/services/floor/show";
import { sha256 } from "@/lib/services/kernel/hash";
import { showDrift } from "@/lib/services/machines/drift";
import { listMachines } from "@/lib/services/machines/list";
import { parameterHistory } from "@/lib/services/machines/parameter-history";
import { requiredText } from "@/lib/services/machines/required-text";
import { setMachineState } from "@/lib/services/machines/set-state";
import { showMachine } from "@/lib/services/machines/show";
import { floorQuery } from "@/lib/schemas/floor";
import { EVIDENCE, item, machine, swapped } from "@/tests/support/world";
import { at, configuration, fleet, readingOf, requireText, type Fleet } from "@/tests/support/fleet";

const REQUIRED = "\ufeff" + configuration() + "; last line without an end";

let world: Fleet;
beforeAll(async () => {
  world = await fleet();
  const { engineer, modelId, machineId } = world;
  await requireText(engineer, {
    modelId,
    machineIds: [machineId],
    files: [{ path: "conf/machine.conf", text: REQUIRED }],
  });
});

const floorOf = (modelId: string, more: Record<string, string> = {}) =>
  showFloor(world.viewer, floorQuery.parse({ modelId, ...more }));

describe("the required text", () => {
  test("is given byte for byte", async () => {
    const { viewer, machineId } = world;
    const text = await requiredText(viewer, { id: machineId });
    expect(text.kind === "file" && sha256(text.file.bytes)).toBe(sha256(Buffer.from(REQUIRED, "utf8")));
  });

  test("of several files is a list, and each file byte for byte", async () => {
    const { engineer, viewer, modelId, machineId } = await fleet();
    const files = [
      { path: "a.conf", text: configuration() },
      {
        path: "b.conf",
        base64: Buffer.from("# gr\xfcn\r\n[axis.x]\r\naccel = 1200", "latin1").toString("base64"),
      },
    ];
    await requireText(engineer, { modelId, machineIds: [machineId], files });
    const text = await requiredText(viewer, { id: machineId });
    expect(text.kind === "index" && text.index.files.map(({ path }) => path)).toEqual(["a.conf", "b.conf"]);
    const second = await requiredText(viewer, { id: machineId, file: 1 });
    expect(second.kind === "file" && second.file.bytes.toString("base64")).toBe(files[1]!.base64);
    await expect(requiredText(viewer, { id: machineId, file: 2 })).rejects.toMatchObject({
      code: "not_found",
    });
  });

  test("of a machine without a baseline is not found", async () => {
    const { viewer, machineId } = await fleet();
    await expect(requiredText(viewer, { id: machineId })).rejects.toMatchObject({
      code: "not_found",
      message: expect.stringContaining("baseline"),
    });
  });

  test("cannot be asked for a moment that has not come", async () => {
    const { viewer, machineId } = world;
    const asOf = at(viewer, 10).now.toISOString();
    await expect(requiredText(viewer, { id: machineId, asOf })).rejects.toMatchObject({ pointer: "/asOf" });
  });
});

describe("the floor", () => {
  test("shows a machine that was never read as not read, never as on baseline", async () => {
    const { rows, counts, columns } = await floorOf(world.modelId);
    expect(rows).toHaveLength(1);
    expect(rows[0]).toMatchObject({ standing: "cannot" });
    expect(Object.values(rows[0]!.cells).every(({ kind }) => kind === "not_read")).toBe(true);
    expect(counts).toMatchObject({ inService: 1, offBaseline: 0, notRead: 1 });
    expect(columns.map(({ key }) => key).slice(0, 3)).toEqual([
      "x.run_current",
      "x.hold_current",
      "x.microsteps",
    ]);
    expect(columns.filter(({ axis }) => axis === "y")).toHaveLength(6);
  });

  test("lets the stored value beat the file's", async () => {
    const { engineer, technician, modelId, machineId, siteId } = await fleet();
    const other = await machine(engineer, { modelId, siteId });
    await requireText(engineer, {
      modelId,
      machineIds: [machineId, other.id],
      files: [{ path: "machine.conf", text: configuration() }],
    });
    const send = (minutes: number, layer: "file" | "stored", values = {}) =>
      readingOf(at(technician, minutes), { machineId, layer, text: configuration(values) });
    const fine = await send(1, "file");
    expect(fine.machine).toMatchObject({ standing: "on_baseline", level: null });
    const drifted = await send(2, "stored", { "x.run_ma": "1900" });
    expect(drifted.machine.standing).toBe("over");
    await readingOf(at(technician, 3), { machineId: other.id, text: configuration() });

    const floor = await floorOf(modelId);
    expect(floor.rows.map(({ machineId: id, standing }) => [id, standing])).toEqual([
      [machineId, "over"],
      [other.id, "on_baseline"],
    ]);
    expect(floor.rows[0]?.cells["x.run_current"]).toMatchObject({ kind: "drift", level: "over", share: 1 });
    expect(floor.counts).toMatchObject({ inService: 2, offBaseline: 1, notRead: 0, over: 1 });
    expect((await floorOf(modelId, { level: "over" })).rows).toHaveLength(1);
    expect((await floorOf(modelId, { q: other.serial })).rows.map(({ serial }) => serial)).toEqual([
      other.serial,
    ]);

    const sheet = await showMachine(at(world.viewer, 5), { id: machineId });
    const row = sheet.layers.find(({ axis, parameter }) => axis === "x" && parameter === "run_current");
    expect(row).toMatchObject({
      required: { value: 0.8 },
      file: { value: 0.8 },
      stored: { value: expect.closeTo(1.9, 9), line: 3 },
      running: null,
      counts: "stored",
      level: "over",
    });
    const drift = await showDrift(at(world.viewer, 5), { id: machineId });
    expect(drift.items[0]).toMatchObject({ kind: "differs", layer: "stored", level: "over" });
    expect(drift.items[0]?.consequences[0]?.toBe.ruleId).toBeTruthy();
  });

  test("takes a machine out of service off the count and puts it last", async () => {
    const { engineer, technician, modelId, siteId, machineId } = await fleet();
    const other = await machine(engineer, { modelId, siteId });
    await requireText(engineer, {
      modelId,
      machineIds: [machineId, other.id],
      files: [{ path: "machine.conf", text: configuration() }],
    });
    await readingOf(at(technician, 1), { machineId, text: configuration({ "x.run_ma": "1900" }) });
    await setMachineState(engineer, {
      id: machineId,
      state: "out_of_service",
      reason: "bearing",
      ifMatch: null,
    });
    const floor = await floorOf(modelId);
    expect(floor.rows.map(({ standing }) => standing)).toEqual(["cannot", "out_of_service"]);
    expect(floor.counts).toMatchObject({ inService: 1, outOfService: 1, offBaseline: 0 });
    const listed = await listMachines(world.viewer, {
      modelId,
      level: "out_of_service",
      page: 1,
      pageSize: 50,
    });
    expect(listed.items.map(({ id }) => id)).toEqual([machineId]);
  });

  test("as of a moment in the past shows what had been read and released by then", async () => {
    const { engineer, technician, viewer, modelId, machineId } = await fleet();
    const files = [{ path: "machine.conf", text: configuration() }];
    await requireText(at(engineer, 10), { modelId, machineIds: [machineId], files });
    await readingOf(at(technician, 20), { machineId, text: configuration() });
    await readingOf(at(technician, 30), { machineId, text: configuration({ "y.run_ma": "1900" }) });
    const asOf = (minutes: number) =>
      showFloor(
        at(viewer, 60),
        floorQuery.parse({ modelId, asOf: at(viewer, minutes).now.toISOString() }),
      ).then(({ rows, counts }) => [rows[0]?.standing, counts.offBaseline]);
    expect(await asOf(5)).toEqual(["cannot", 0]);
    expect(await asOf(25)).toEqual(["on_baseline", 0]);
    expect(await asOf(35)).toEqual(["over", 1]);
    expect(floorQuery.safeParse({ asOf: viewer.now.toISOString(), pageSize: "200" }).success).toBe(false);
  });
});

test("a machine's sheet shows its own hardware with the evidence for it", async () => {
  const { engineer, viewer, machineId } = await fleet();
  const motor = await item(engineer, "motor", { rated_current_a: 1, rated_current_basis: "rms" });
  await swapped(engineer, { id: machineId, axis: "x", part: "motor", itemId: motor.id });
  await swapped(engineer, {
    id: machineId,
    axis: "y",
    part: "sense_resistor",
    data: { sense_resistance_ohm: 0.15 },
  });
  const sheet = await showMachine(viewer, { id: machineId });
  expect(sheet.own).toEqual(
    expect.arrayContaining([
      { path: "axes.x.motor", evidence: EVIDENCE },
      { path: "axes.y.driver.set_point.sense_resistance_ohm", evidence: EVIDENCE },
    ]),
  );
  expect(sheet.fitted["axes.x.motor"]?.code).toBe(motor.code);
  expect(sheet.fitted["axes.y.motor"]?.code).not.toBe(motor.code);
  expect(sheet.assembly.axes[1]?.driver?.set_point?.sense_resistance_ohm).toBe(0.15);
  expect(sheet.required).toBeNull();
  expect(sheet).toMatchObject({ standing: "cannot", sentence: expect.stringContaining("baseline") });
});

test("the history of a parameter has every value, as read and as required, newest first", async () => {
  const { engineer, technician, viewer, modelId, machineId } = await fleet();
  const files = (speed: string) => [{ path: "machine.conf", text: configuration({ speed }) }];
  await requireText(engineer, { modelId, machineIds: [machineId], files: files("200") });
  await readingOf(at(technician, 1), { machineId, text: configuration({ speed: "180" }) });
  await readingOf(at(technician, 2), { machineId, layer: "stored", text: configuration({ speed: "240" }) });
  await requireText(at(engineer, 3), { modelId, machineIds: [machineId], files: files("240") });
  const { entries, truncated } = await parameterHistory(viewer, {
    id: machineId,
    axis: "X",
    parameter: "max_speed",
  });
  expect(truncated).toBe(false);
  expect(
    entries.map(({ source, value, layer, baseline }) => [source, value?.value, layer ?? baseline]),
  ).toEqual([
    ["baseline", 0.24, 2],
    ["reading", 0.24, "stored"],
    ["reading", 0.18, "file"],
    ["baseline", 0.2, 1],
  ]);
  expect(entries[3]?.until).toBe(entries[0]?.at);
  expect(entries[1]).toMatchObject({ raw: "240", line: 7, by: technician.actor.name });
});
