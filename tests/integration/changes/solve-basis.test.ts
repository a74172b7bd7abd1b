import { afterAll, describe, expect, it } from "vitest";
import { counterEdit } from "@/lib/review/counter-proposal";
import { sequelize } from "@/lib/server/sequelize";
import { counterBasis } from "@/lib/services/changes/counter-basis";
import { releaseChange } from "@/lib/services/changes/release";
import { orderBasis } from "@/lib/services/implementation/order-basis";
import { safeOrder } from "@/lib/solve/safe-order";
import { act, approve, baseline, draft, floor, later, read, textOf } from "../../support/changes";

afterAll(() => sequelize.close());

describe("the grounds of a counter-proposal to a change", () => {
  it("are those of its evaluation, and the answer clears what is over limit there", async () => {
    const world = await floor(1);
    const hot = await draft(world, textOf({ current: 1900 }));
    const basis = await counterBasis(world.approver, { changeId: hot.id });
    const edit = counterEdit(basis!);
    expect(edit.left).toEqual([]);
    expect(edit.moves.map(({ axis, parameter }) => [axis, parameter])).toEqual([
      ["x", "run_current"],
      ["y", "run_current"],
    ]);
    expect(edit.files[0]?.text).toMatch(/run_ma = \d{3} {3}# per winding/);
  });

  it("are not there where nothing is over limit", async () => {
    const world = await floor(1);
    const cool = await draft(world, textOf({ current: 600 }));
    expect(await counterBasis(world.approver, { changeId: cool.id })).toBeNull();
    const missing = counterBasis(world.approver, { changeId: cool.id, version: 7 });
    await expect(missing).rejects.toMatchObject({ code: "not_found" });
  });
});

describe("the values before and after a change on one machine", () => {
  it("are what was required before, until the machine is read, and then what it runs", async () => {
    const world = await floor(1);
    const [machine] = world.machines;
    const first = await baseline(world, textOf({ current: 600 }));
    const step = { changeId: first.id, machineId: machine!.id };
    expect(await orderBasis(later(world.technician, 60), step)).toBeNull();
    await read(later(world.technician, 70), { ...machine!, text: textOf({ current: 500, accel: 2000 }) });
    const basis = await orderBasis(later(world.technician, 80), step);
    expect(basis?.fromReadings).toBe(true);
    const order = safeOrder(basis!);
    expect(order.kind).toBe("found");
    expect(order.kind === "found" && order.steps).toHaveLength(4);
  });

  it("are asked for only where the change was released to the machine", async () => {
    const world = await floor(1);
    const change = await draft(world, textOf());
    await approve(world, change.id);
    const step = { changeId: change.id, machineId: world.machines[0]!.id };
    await expect(orderBasis(world.technician, step)).rejects.toMatchObject({ code: "not_found" });
    await releaseChange(later(world.engineer, 60), act(change.id));
    expect(await orderBasis(later(world.technician, 90), step)).toBeNull();
  });
});
