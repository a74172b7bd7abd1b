import { describe, expect, it } from "vitest";
import type { Assembly, AxisAssembly } from "@/lib/domain/assembly";
import { assemblyWith, texts, world, worldOf } from "./world";

/** 4 kg straight down a belt behind a gear of 3: 400 mm/s over 1 m on 1 A, 4700 µF on the bus. */
const FAST = texts({
  max_speed: { typed: 400, unit: "mm/s", factor: 1e-3 },
  run_current: { typed: 1, unit: "A", basis: "rms" },
});
const lowered = (change: (axis: AxisAssembly, machine: Assembly) => void = () => undefined, text = FAST) =>
  world(
    text,
    assemblyWith((axis, machine) => {
      Object.assign(axis.load!, { mass_kg: 4, incline_deg: 90 });
      axis.drive_train!.ratio = 3;
      axis.travel_mm = 1000;
      machine.supply!.bus_capacitance_uf = 4700;
      change(axis, machine);
    }),
  );

/** By hand: (39.2266 N − 4 N) · 0.4 m/s · 0.95 − 2 · 2.1 Ω · 1 A² − (2 · 0.25 Ω · 1 A² + 0.1 W), for 2.5 s. */
const POWER = 35.2266 * 0.38 - 4.2 - 0.6;

describe("a load that is lowered", () => {
  it("feeds 8.6 W back for 2.5 s, and lifts 25.2 V to 98.8 V: over", () => {
    expect(POWER).toBeCloseTo(8.586, 3);
    const finding = lowered().finding("lowering-voltage", null);
    expect(finding).toMatchObject({ level: "over", limit: 33, unit: "V" });
    expect(finding.value).toBeCloseTo(Math.sqrt(25.2 ** 2 + (2 * POWER * 2.5) / 4.7e-3), 9);
    expect(finding.value).toBeCloseTo(98.84, 2);
    expect(finding.sentence).toContain("The load of axis x feeds 21.47 J back");
    // Its kinetic energy alone says nothing of it.
    expect(lowered().finding("braking-voltage", null).level).toBe("within");
  });

  it("is cleared by less speed, where copper and drivers take it all", () => {
    const found = lowered();
    const { parameter, value } = found.finding("lowering-voltage", null).clearingValue!;
    expect(parameter).toBe("max_speed");
    const slower = worldOf({
      ...found.input,
      parameters: found.input.parameters.map((stated) =>
        stated.parameter === parameter ? { ...stated, value } : stated,
      ),
    });
    expect(slower.finding("lowering-voltage", null).level).not.toBe("over");
    const slow = texts({ ...FAST, max_speed: { typed: 140, unit: "mm/s", factor: 1e-3 } });
    const still = lowered(() => undefined, slow).finding("lowering-voltage", null);
    expect(still.level).toBe("within");
    expect(still.value).toBeCloseTo(25.2, 9);
    expect(still.sentence).toContain("feeds nothing back");
  });

  it("needs no capacitor to be known where nothing comes back", () => {
    const slow = texts({ ...FAST, max_speed: { typed: 140, unit: "mm/s", factor: 1e-3 } });
    const bare = lowered((_axis, machine) => delete machine.supply!.bus_capacitance_uf, slow);
    expect(bare.finding("lowering-voltage", null).level).toBe("within");
  });

  it("is pulled by an external force that adds to its weight, and not spared by one that carries it", () => {
    const value = (newton: number) =>
      lowered((axis) => (axis.load!.external_force_n = newton)).finding("lowering-voltage", null).value!;
    expect(value(10)).toBeGreaterThan(value(0));
    expect(value(-10)).toBe(value(0));
  });

  it("adds the loads of all axes up", () => {
    const found = lowered((axis, machine) => machine.axes.push({ ...structuredClone(axis), axis: "y" }));
    const parameters = found.input.parameters.flatMap((one) => [one, { ...one, axis: "y" }]);
    const both = worldOf({ ...found.input, parameters }).finding("lowering-voltage", null);
    expect(both.value).toBeCloseTo(Math.sqrt(25.2 ** 2 + (4 * POWER * 2.5) / 4.7e-3), 9);
    expect(both.sentence).toContain("The load of axes x and y");
  });

  it("is nobody's matter on level axes", () => {
    expect(world().has("lowering-voltage", null)).toBe(false);
  });

  it.each([
    ["axes.x.load.incline_deg", (axis: AxisAssembly) => delete axis.load!.incline_deg],
    ["axes.x.drive_train.efficiency", (axis: AxisAssembly) => delete axis.drive_train!.efficiency],
    ["axes.x.motor.resistance_ohm", (axis: AxisAssembly) => delete axis.motor!.resistance_ohm],
    ["axes.x.driver.quiescent_power_w", (axis: AxisAssembly) => delete axis.driver!.quiescent_power_w],
    ["axes.x.driver.absolute_max_v", (axis: AxisAssembly) => delete axis.driver!.absolute_max_v],
    ["axes.x.travel_mm", (axis: AxisAssembly) => delete axis.travel_mm],
    [
      "supply.bus_capacitance_uf",
      (_axis: AxisAssembly, machine: Assembly) => delete machine.supply!.bus_capacitance_uf,
    ],
  ])("cannot be checked without %s", (path, change) => {
    const { level, needs } = lowered(change).finding("lowering-voltage", null);
    expect([level, needs]).toEqual(["cannot", [path]]);
  });

  it("is not covered where a drive closes its own loop and sets its current itself", () => {
    const closed = lowered((axis) => (axis.driver!.feedback = "closed_loop"));
    expect(closed.finding("lowering-voltage", null).needs).toEqual(["axes.x.driver.feedback"]);
  });
});
