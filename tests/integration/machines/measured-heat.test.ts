import { afterAll, describe, expect, test } from "vitest";
import { sequelize } from "@/lib/server/sequelize";
import { recordVerification } from "@/lib/services/implementation/verify";
import { machineAssembly } from "@/lib/services/machines/assembly";
import { machineCondition } from "@/lib/services/machines/condition";
import { machineHeat } from "@/lib/services/machines/measured-heat";
import { refreshMachineStatus } from "@/lib/services/machines/refresh-status";
import { showMeasuredHeat } from "@/lib/services/machines/show-measured-heat";
import { baseline, floor, later, textOf, type Floor } from "@/tests/support/changes";
import { item, swapped } from "@/tests/support/world";

afterAll(() => sequelize.close());

interface Measured {
  readonly place: "case" | "winding" | "mount";
  readonly celsius: number;
  readonly ambientC?: number | null;
  readonly after: number;
}

/** A machine with its first baseline released, 0.8 A rms on both axes. */
async function world() {
  const made = await floor(1);
  const { id: changeId } = await baseline(made, textOf());
  const [machine] = made.machines;
  const technician = later(made.technician, 60);
  const measure = ({ place, celsius, ambientC = 24, after }: Measured) =>
    recordVerification(later(technician, after), {
      changeId,
      idempotencyKey: null,
      request: {
        machineId: machine!.id,
        tested: "Stood on run current until the temperature was steady",
        result: "fail",
        ambientC,
        temperatures: [{ axis: "x", place, celsius }],
        note: "",
        statement: null,
        attachments: [],
      },
    });
  return { made, machineId: machine!.id, measure };
}

async function afterwards(made: Floor, machineId: string, seconds = 600) {
  const soon = later(made.engineer, seconds);
  return { heat: await machineHeat(machineId), condition: await machineCondition(machineId, soon.now), soon };
}

describe("temperatures measured at verifications", () => {
  test("refine the thermal resistance of that machine's axis, and its checks say so", async () => {
    const { made, machineId, measure } = await world();
    await measure({ place: "case", celsius: 54, after: 1 });
    await measure({ place: "case", celsius: 55, after: 2 });
    const { heat, condition } = await afterwards(made, machineId);
    const [fit] = heat.fits;
    expect(fit).toMatchObject({ axis: "x", field: "case_to_ambient_k_per_w", catalog: 7, readings: 2 });
    if (!fit?.fit.ok) throw new Error("refused");
    // By hand: P = 2·0.8²·2.1·(234.5 + T)/254.5 = 3.0 W at about 50 °C, 30.5 K above the air: about 10 K/W.
    expect(fit.fit.value).toBeGreaterThan(8.5);
    expect(fit.fit.value).toBeLessThan(10.2);
    const { assembly } = await machineAssembly(machineId);
    expect(assembly.axes[0]?.motor?.case_to_ambient_k_per_w).toBe(fit.fit.high);
    expect(assembly.axes[1]?.motor?.case_to_ambient_k_per_w).toBe(7);
    const mount = condition.requiredReport?.findings.find(
      ({ ruleId, axis }) => ruleId === "mount-temperature" && axis === "x",
    );
    expect(mount?.sentence).toContain(
      "refined from 2 temperatures measured on this machine; the catalog says 7 K/W",
    );
  });

  test("do not refine from one, nor without the ambient beside them, nor from the mount", async () => {
    const { made, machineId, measure } = await world();
    await measure({ place: "winding", celsius: 60, after: 1 });
    await measure({ place: "winding", celsius: 60, ambientC: null, after: 2 });
    await measure({ place: "mount", celsius: 40, after: 3 });
    const { heat } = await afterwards(made, machineId);
    expect(heat.fits).toEqual([
      expect.objectContaining({ readings: 1, fit: { ok: false, because: "too_few" } }),
    ]);
    expect(heat.readings.map(({ ignored }) => ignored?.split(" ").slice(0, 3).join(" ") ?? null)).toEqual([
      "Kept for the",
      "The ambient temperature",
      null,
    ]);
    expect((await machineAssembly(machineId)).assembly.axes[0]?.refined).toBeUndefined();
    expect(await showMeasuredHeat(made.technician, { id: machineId })).toEqual(heat);
  });

  test("say nothing of a motor that has taken the place of the one measured", async () => {
    const { made, machineId, measure } = await world();
    await measure({ place: "case", celsius: 54, after: 1 });
    await measure({ place: "case", celsius: 55, after: 2 });
    const motor = await item(made.engineer, "motor");
    const swapping = later(made.engineer, 300);
    await swapped(swapping, { id: machineId, part: "motor", axis: "x", itemId: motor.id });
    await refreshMachineStatus(later(made.engineer, 400), machineId);
    const { heat } = await afterwards(made, machineId);
    expect(heat.fits).toEqual([]);
    expect(heat.readings.map(({ sameMotor }) => sameMotor)).toEqual([false, false]);
    expect((await machineAssembly(machineId)).assembly.axes[0]?.motor?.case_to_ambient_k_per_w).toBe(7);
  });

  test("leave a value alone that is recorded on the machine itself", async () => {
    const { made, machineId, measure } = await world();
    await swapped(made.engineer, {
      id: machineId,
      part: "motor",
      axis: "x",
      data: { case_to_ambient_k_per_w: 7.5 },
    });
    await measure({ place: "case", celsius: 54, after: 1 });
    await measure({ place: "case", celsius: 55, after: 2 });
    expect((await machineHeat(machineId)).fits).toEqual([]);
    expect((await machineAssembly(machineId)).assembly.axes[0]?.motor?.case_to_ambient_k_per_w).toBe(7.5);
  });
});
