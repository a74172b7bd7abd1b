import { describe, expect, it } from "vitest";
import type { Assembly } from "@/lib/domain/assembly";
import type { QuantityName } from "@/lib/domain/quantities";
import { byHand } from "./by-hand";
import type { Case } from "./by-hand";
import { assemblyWith, EXAMPLE_TEXT, exampleAssembly, texts, textsWithout, world, worldOf } from "./world";
import type { Texts } from "./world";

/** The example's machine and text in SI. */
const EXAMPLE: Case = {
  run: 0.8,
  hold: 0.4,
  rated: 1.5,
  R: 2.1,
  L: 3e-3,
  Th: 0.45,
  rotor: 54e-7,
  stepAngle: 1.8,
  windingLimit: 130,
  toAmbient: 8.5,
  caseToAmbient: 7,
  motorAmbient: 35,
  rdsOn: 0.25,
  rdsOnAt: 25,
  junction: 35,
  quiescent: 0.1,
  edge: 0,
  chopping: 30e3,
  onTime: 1.5e-6,
  driverAmbient: 40,
  sense: 0.1,
  V: 24,
  tolerance: 0.05,
  C: 1e-3,
  r: 0.04 / (2 * Math.PI),
  eta: 0.95,
  shaftExtra: 0,
  n: 1,
  m: 0.6,
  friction: 4,
  external: 0,
  W: 0,
  travel: 0.4,
  v: 0.3,
  a: 3,
  microsteps: 16,
  stepsPerUnit: 80e3,
};

function expectByHand(text: Texts, assembly: Assembly, hand: Partial<Case>) {
  const { quantity } = world(text, assembly);
  for (const [name, value] of Object.entries(byHand({ ...EXAMPLE, ...hand }))) {
    const computed = quantity(name as QuantityName);
    if (value === undefined) expect(computed, name).toBeUndefined();
    else {
      expect(computed, name).toBeDefined();
      // The by-hand sums of a number of steps carry a rounding of their own.
      expect(Math.abs(computed! / value - 1), `${name}: ${computed} against ${value}`).toBeLessThan(1e-7);
    }
  }
}

describe("the worked example", () => {
  it("computes every quantity of a level belt axis as by hand", () => {
    expectByHand(EXAMPLE_TEXT, exampleAssembly(), {});
  });

  it("computes the scale of the geometry: 200 full steps · 16 / 40 mm = 80/mm", () => {
    expect(world().quantity("steps_per_mm_expected")).toBeCloseTo(80, 12);
  });

  it("computes the speeds above the voltage limit, where current and voltage both bind", () => {
    const text = texts({
      run_current: { typed: 1.9, unit: "A", basis: "peak" },
      max_speed: { typed: 60, unit: "m/min", factor: 1 / 60 },
      acceleration: { typed: 12, unit: "m/s^2" },
    });
    const run = 1.9 / Math.sqrt(2);
    expectByHand(text, exampleAssembly(), { run, hold: run / 2, v: 1, a: 12 });
    const { quantity } = world(text);
    expect(quantity("peak_speed")!).toBeGreaterThan(quantity("voltage_limit_speed")!);
  });

  it("replaces the holding torque by the pull-out where the start-stop speed lies above the voltage limit", () => {
    const assembly = assemblyWith((axis) => {
      axis.motor!.inductance_mh = 60;
      axis.load!.mass_kg = 0.01;
      axis.load!.friction_n = 1;
    });
    expectByHand(EXAMPLE_TEXT, assembly, { L: 60e-3, m: 0.01, friction: 1 });
    const { quantity } = world(EXAMPLE_TEXT, assembly);
    expect(quantity("start_stop_speed")!).toBeGreaterThan(quantity("voltage_limit_speed")!);
  });

  it("computes a steep axis on two screws with switching loss, counterbalance and an external force", () => {
    const assembly = assemblyWith((axis, machine) => {
      axis.motor_count = 2;
      axis.drive_train = { kind: "screw", lead_mm: 8, ratio: 1.5, efficiency: 0.4, inertia_kgm2: 3e-6 };
      axis.load = {
        mass_kg: 6,
        friction_n: 12,
        incline_deg: 60,
        external_force_n: -5,
        counterbalance_n: 10,
      };
      axis.driver!.switching_edge_ns = 120;
      machine.motor_ambient_c = 31;
      machine.supply!.tolerance = 0.1;
    });
    const text = texts({
      steps_per_mm: { typed: 600, unit: "1/mm" },
      max_speed: { typed: 3000, unit: "mm/min", factor: 1e-3 / 60 },
      acceleration: { typed: 400, unit: "mm/s^2", factor: 1e-3 },
      travel_min: { typed: -20, unit: "mm", factor: 1e-3 },
      travel_max: { typed: 100, unit: "mm", factor: 1e-3 },
    });
    expectByHand(text, assembly, {
      n: 2,
      r: 0.008 / (2 * Math.PI * 1.5),
      eta: 0.4,
      shaftExtra: 3e-6,
      m: 6,
      friction: 12,
      external: -5,
      W: 6 * 9.80665 * (Math.sqrt(3) / 2) - 10,
      edge: 120e-9,
      motorAmbient: 31,
      tolerance: 0.1,
      stepsPerUnit: 600e3,
      v: 0.05,
      a: 0.4,
      travel: 0.12,
    });
  });

  it("computes a rack axis without its scale in the text from the geometry", () => {
    const assembly = assemblyWith((axis) => {
      axis.drive_train = { kind: "rack", module_mm: 1, teeth: 15, ratio: 3, efficiency: 0.9 };
    });
    expectByHand(textsWithout("steps_per_mm"), assembly, {
      r: 0.015 / 2 / 3,
      eta: 0.9,
      stepsPerUnit: (200 * 16 * 3) / (Math.PI * 0.015),
    });
  });

  it("computes a rotary axis in rad, rad/s and steps per degree", () => {
    const assembly = assemblyWith((axis) => {
      axis.drive_train = { kind: "rotary", ratio: 6, efficiency: 0.9 };
      axis.load = { inertia_kgm2: 0.002, friction_nm: 0.1, external_torque_nm: 0.05, gravity_torque_nm: 0.3 };
      axis.travel_mm = undefined;
      axis.travel_deg = 270;
    });
    const deg = Math.PI / 180;
    const text = texts({
      steps_per_mm: { typed: (16 * 6) / 1.8, unit: "steps/deg" },
      max_speed: { typed: 180, unit: "deg/s", factor: deg },
      acceleration: { typed: 720, unit: "deg/s^2", factor: deg },
      corner_speed: { typed: 10, unit: "deg/s", factor: deg },
    });
    expectByHand(text, assembly, {
      r: 1 / 6,
      eta: 0.9,
      m: 0.002,
      friction: 0.1,
      external: 0.05,
      W: 0.3,
      travel: 1.5 * Math.PI,
      v: Math.PI,
      a: 4 * Math.PI,
      stepsPerUnit: ((16 * 6) / 1.8 / Math.PI) * 180,
    });
    const { result, quantity } = world(text, assembly);
    expect(quantity("steps_per_mm_expected")).toBeCloseTo(53.3333333, 6);
    const units = Object.fromEntries(result.quantities.map(({ name, unit }) => [name, unit]));
    expect(units).toMatchObject({ peak_speed: "rad/s", steps_per_mm_expected: "1/deg", step_rate: "Hz" });
  });

  it("adds up the energy of all axes for the bus voltage", () => {
    const assembly = exampleAssembly();
    assembly.axes.push({ ...assembly.axes[0]!, axis: "Y" });
    const one = world(EXAMPLE_TEXT, exampleAssembly());
    const first = one.quantity("bus_voltage_after_braking")!;
    const parameters = [
      ...one.input.parameters,
      ...one.input.parameters.map((parameter) => ({ ...parameter, axis: "y" })),
    ];
    const both = worldOf({ ...one.input, assembly, parameters }).quantity("bus_voltage_after_braking")!;
    const energy = (after: number) => (after ** 2 - 25.2 ** 2) * 0.5e-3;
    expect(energy(both)).toBeCloseTo(2 * energy(first), 10);
  });
});
