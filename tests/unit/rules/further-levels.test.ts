import { describe, expect, it } from "vitest";
import type { Assembly, AxisAssembly } from "@/lib/domain/assembly";
import type { Level } from "@/lib/domain/levels";
import { SUDDEN_LOAD_SHARE } from "@/lib/physics/static-torque";
import {
  assemblyWith,
  EXAMPLE_TEXT,
  exampleAssembly,
  exampleAxis,
  parametersOf,
  texts,
  world,
  worldOf,
} from "./world";
import { DEFAULT_POLICY } from "@/lib/domain/policy";
import type { Texts, World } from "./world";

type Change = (axis: AxisAssembly, assembly: Assembly) => void;

function on(change: Change, text: Texts = EXAMPLE_TEXT): World {
  return world(text, assemblyWith(change));
}

/** One row a step: what is set, and the level that follows. */
function steps(ruleId: string, rows: readonly (readonly [string, () => World, Level])[], axis?: null) {
  describe(ruleId, () => {
    it.each(rows.map(([words, make, level]) => ({ words, make, level })))(
      "$words: $level",
      ({ make, level }) => {
        expect(make().finding(ruleId, axis).level).toBe(level);
      },
    );
  });
}

const mm = (typed: number) => ({ typed, unit: "mm", factor: 1e-3 });

/** Friction that takes a share of the torque at standstill: 0.4/1.5 of 0.45 N·m, at 6.366 mm for each radian. */
const STANDSTILL = (0.45 * 0.4) / 1.5;
const RADIUS = 0.04 / (2 * Math.PI);
const pushed = (share: number, brake = false) =>
  on((axis) => {
    axis.load!.friction_n = 0;
    axis.load!.external_force_n = (share * STANDSTILL) / RADIUS;
    axis.load!.holding_brake = brake;
  });
steps("static-position", [
  ["half of the torque at standstill", () => pushed(0.5), "within"],
  ["just above half", () => pushed(0.501), "near"],
  ["what may come suddenly", () => pushed(SUDDEN_LOAD_SHARE), "near"],
  ["just above that", () => pushed(SUDDEN_LOAD_SHARE + 0.001), "over"],
  ["more than the motor holds, on a brake", () => pushed(1.2, true), "near"],
  [
    "friction alone of that size",
    () => on((axis) => (axis.load!.friction_n = (0.9 * STANDSTILL) / RADIUS)),
    "near",
  ],
]);

/** A quarter of a full step: asin(T_f/T) = 22.5°; on run current the motor gives 0.24 N·m. */
const rubbing = (share: number) => on((axis) => (axis.load!.friction_n = (share * 0.24) / RADIUS));
steps("microstep-friction", [
  ["friction that a quarter of a full step overcomes", () => rubbing(Math.sin(Math.PI / 8)), "within"],
  ["a little more", () => rubbing(Math.sin(Math.PI / 8) * 1.001), "near"],
  ["more than the motor gives", () => rubbing(1.1), "near"],
]);

const loaded = (ratio: number) => on((axis) => (axis.load!.mass_kg = (ratio * 54e-7) / RADIUS ** 2));
steps("inertia-ratio", [
  ["ten times the rotor", () => loaded(10), "within"],
  ["a little more", () => loaded(10.01), "near"],
]);

const classed = (letter: "A" | "B" | "H", kelvinPerWatt: number) =>
  on((axis) => {
    axis.motor!.thermal_class = letter;
    axis.motor!.winding_to_ambient_k_per_w = kelvinPerWatt;
  });
steps("winding-class", [
  ["class B at rest", () => classed("B", 8.5), "within"],
  ["class A, 96 °C in the mean", () => classed("A", 18), "near"],
  ["class A, above 100 °C in the mean", () => classed("A", 20), "over"],
  ["class H with the same winding", () => classed("H", 20), "within"],
  ["a winding that never settles", () => classed("H", 95), "over"],
]);

const softEnds = (span: number) => world(texts({ travel_min: mm(-10), travel_max: mm(span - 10) }));
steps("soft-travel", [
  ["the machine's travel", () => softEnds(400), "within"],
  ["a little more", () => softEnds(400.1), "over"],
]);

/** 60 mm/s from 3 m/s²: 0.6 mm to stop. */
const seeking = (free: number) =>
  on(
    (axis) => (axis.load!.reference_overtravel_mm = free),
    texts({ reference_run_speed: { typed: 60, unit: "mm/s", factor: 1e-3 } }),
  );
steps("reference-run", [
  ["80 % of the free travel", () => seeking(0.75), "within"],
  ["more than 80 %", () => seeking(0.74), "near"],
  ["more than is free", () => seeking(0.59), "over"],
]);

const raised = (change: Change) =>
  on((axis, machine) => {
    axis.load!.incline_deg = 90;
    axis.load!.mass_kg = 3;
    change(axis, machine);
  });
/** Detent torque of the motor, as times the torque of 3 kg. */
const detent = (axis: AxisAssembly, times?: number) => {
  if (times === undefined) delete axis.motor!.detent_torque_nm;
  else axis.motor!.detent_torque_nm = times * 3 * 9.80665 * RADIUS;
};
steps("fall-after-power-loss", [
  ["no brake", () => raised(() => undefined), "near"],
  ["friction that holds it", () => raised((axis) => (axis.load!.friction_n = 30)), "near"],
  ["detent torque of twice the weight", () => raised((axis) => detent(axis, 2)), "within"],
  ["a little less detent torque", () => raised((axis) => detent(axis, 1.999)), "near"],
  ["detent torque that nobody has stated", () => raised((axis) => detent(axis)), "cannot"],
  [
    "friction that holds it until the brake does",
    () =>
      raised((axis) =>
        Object.assign(axis.load!, { friction_n: 30, holding_brake: true, brake_delay_ms: 40 }),
      ),
    "near",
  ],
  [
    "a brake that holds at once",
    () => raised((axis) => Object.assign(axis.load!, { holding_brake: true, brake_delay_ms: 0 })),
    "within",
  ],
  [
    "a brake that takes its time",
    () => raised((axis) => Object.assign(axis.load!, { holding_brake: true, brake_delay_ms: 40 })),
    "near",
  ],
  ["a brake whose time is not known", () => raised((axis) => (axis.load!.holding_brake = true)), "cannot"],
]);

describe("a load that falls", () => {
  // 3 kg against 4 N of friction, with a rotor of 54 g·cm² at 6.366 mm for each radian.
  const acceleration = (3 * 9.80665 - 4) / (3 + 54e-7 / RADIUS ** 2);

  it("is not slowed by detent torque, which may only keep it at rest", () => {
    const found = raised((axis) => {
      detent(axis, 1.5);
      Object.assign(axis.load!, { holding_brake: true, brake_delay_ms: 40 });
    });
    expect(found.quantity("fall_distance")).toBeCloseTo((acceleration * 0.04 ** 2) / 2, 12);
    const unbraked = raised((axis) => detent(axis, 1.5)).finding("fall-after-power-loss");
    expect(unbraked.sentence).toContain("may keep it while it rests");
  });

  it("names what it takes for granted", () => {
    const found = raised((axis) => {
      delete axis.motor_count;
      delete axis.load!.counterbalance_n;
    });
    expect(found.finding("fall-after-power-loss").assumed).toEqual(
      expect.arrayContaining(["axes.x.motor_count", "axes.x.load.counterbalance_n"]),
    );
  });
});

const railed = (voltage: number) => on((_axis, machine) => (machine.supply!.voltage_v = voltage));
steps("supply-overdrive", [
  ["a motor of 3.15 V on 12 V (common practice, no source)", () => railed(12), "within"],
  ["on 24 V (common practice, no source)", () => railed(24), "within"],
  ["on less than twice its voltage", () => railed(6.2), "near"],
  ["on more than 25 times its voltage", () => railed(79), "near"],
]);
steps("inductance-rule", [
  ["32 · √3 = 55.4 V", () => railed(55.4), "within"],
  ["above it", () => railed(55.5), "near"],
]);

const rated = (share: number) => {
  const load = world().quantity("supply_load", null)!;
  return on((_axis, machine) => (machine.supply!.rated_power_w = load / share));
};
steps(
  "supply-power",
  [
    ["80 % of the rating", () => rated(0.8), "within"],
    ["a little more", () => rated(0.801), "near"],
    ["more than the rating", () => rated(1.001), "over"],
  ],
  null,
);

const wired = (share: number) => {
  const cable = (length: number) =>
    on((_axis, machine) =>
      Object.assign(machine.supply!, { cable_length_m: length, cable_ohm_per_km: 19.5 }),
    );
  return cable((share * 0.03 * 24) / cable(1).quantity("cable_drop", null)!);
};
steps(
  "cable-drop",
  [
    ["2.4 % of the supply voltage", () => wired(0.8), "within"],
    ["a little more", () => wired(0.801), "near"],
    ["more than 3 %", () => wired(1.001), "over"],
    ["a cable that nobody has described", () => world(), "cannot"],
  ],
  null,
);

/** A belt whose load swings at a share of the full-step rate of the cruise, 300 mm/s on 40 mm a turn. */
const swinging = (share: number) =>
  on((axis) => {
    const frequency = share * (0.3 / 0.04) * 200;
    axis.drive_train!.axial_stiffness_n_per_um = 0.6 * (2 * Math.PI * frequency) ** 2 * 1e-6;
  });
steps("axis-resonance", [
  ["the full steps of the cruise", () => swinging(1), "near"],
  ["a fifth beside them", () => swinging(1 / 1.19), "near"],
  ["far above them", () => swinging(1.3), "within"],
  ["a fourth of them", () => swinging(0.25), "near"],
  ["a stiffness that nobody has stated", () => world(), "cannot"],
]);

describe("ramp-torque-margin", () => {
  it("finds a ramp without jerk weakest at its end, as torque-margin does", () => {
    const found = world(
      texts({ max_speed: { typed: 1.2, unit: "m/s" }, acceleration: { typed: 8, unit: "m/s²" } }),
    );
    expect(found.quantity("ramp_torque_margin")).toBeCloseTo(found.quantity("torque_margin")!, 9);
    expect(found.finding("ramp-torque-margin").level).toBe(found.finding("torque-margin").level);
  });

  it("spares the end of a ramp whose acceleration has died away there", () => {
    const hard = texts({ max_speed: { typed: 1.2, unit: "m/s" }, acceleration: { typed: 8, unit: "m/s²" } });
    const soft = world({ ...hard, jerk: { typed: 60, unit: "m/s³" } });
    expect(soft.quantity("ramp_torque_margin")!).toBeGreaterThan(soft.quantity("torque_margin")!);
    expect(soft.finding("ramp-torque-margin").sentence).toContain("still accelerating");
  });
});

/** Two equal axes on crossed belts. */
function crossed(coupled: boolean, change: Change = () => undefined, text: Texts = EXAMPLE_TEXT): World {
  const assembly: Assembly = { ...exampleAssembly(), axes: [exampleAxis("x"), exampleAxis("y")] };
  if (coupled) assembly.axes[0]!.coupled_with = ["Y"];
  for (const axis of assembly.axes) change(axis, assembly);
  const parameters = ["x", "y"].flatMap((axis) => parametersOf(text, assembly, axis));
  return worldOf({ parameters, assembly, policy: DEFAULT_POLICY });
}

describe("motors shared by two axes", () => {
  it("are nobody's matter where no axes are coupled", () => {
    expect(crossed(false).has("coupled-motors", null)).toBe(false);
    expect(crossed(false).has("coupled-jump", null)).toBe(false);
  });

  it("turn with the sum of both speeds and carry the mean of both forces", () => {
    // At 100 mm/s the supply does not limit the torque yet.
    const slow = texts({ max_speed: { typed: 100, unit: "mm/s", factor: 1e-3 } });
    const found = crossed(true, () => undefined, slow);
    const force = 4 + 0.6 * 3;
    const required = (2 * force * RADIUS) / (2 * 0.95) + (54e-7 * 6) / RADIUS;
    const { sentence, level } = found.finding("coupled-motors", null);
    expect(level).toBe("within");
    expect(sentence).toContain(`${Number((0.2 / RADIUS).toPrecision(4))} rad/s`);
    const margin = found.quantity("coupled_torque_margin", null)!;
    expect((0.45 * 0.8) / 1.5 / required - 1).toBeCloseTo(margin, 6);
  });

  it("are over where the jump of both axes is more than one motor follows, and less corner speed clears it", () => {
    const quick = texts({ corner_speed: { typed: 55, unit: "mm/s", factor: 1e-3 } });
    const found = crossed(true, () => undefined, quick);
    const finding = found.finding("coupled-jump", null);
    expect(finding.level).toBe("over");
    const { axis, parameter, value } = finding.clearingValue!;
    expect([axis, parameter]).toEqual(["x", "corner_speed"]);
    const after = worldOf({
      ...found.input,
      parameters: found.input.parameters.map((stated) =>
        stated.parameter === parameter && stated.axis === axis ? { ...stated, value } : stated,
      ),
    });
    expect(after.finding("coupled-jump", null).level).toBe("near");
  });
});

describe("a drive that closes its own loop", () => {
  const closed = on((axis) => (axis.driver!.feedback = "closed_loop"));
  it.each([
    "torque-margin",
    "ramp-torque-margin",
    "corner-speed",
    "winding-temperature",
    "driver-junction",
    "resonance",
    "static-position",
  ])("is not covered by %s, which says so", (ruleId) => {
    expect(closed.finding(ruleId)).toMatchObject({ level: "cannot", needs: ["axes.x.driver.feedback"] });
    expect(closed.finding(ruleId).sentence).toContain("Not covered");
  });

  it("keeps the checks that do not presume open loop", () => {
    for (const ruleId of ["run-current-motor", "step-rate", "supply-voltage", "steps-per-mm"])
      expect(closed.finding(ruleId).level).toBe("within");
  });
});

describe("the rating of a half coil", () => {
  const wiredAs = (connection?: "series" | "parallel" | "half_coil") =>
    on((axis) => {
      axis.motor!.rating_of = "half_coil";
      if (connection) axis.motor!.connection = connection;
    });
  it.each([
    ["series", 1.5 / Math.SQRT2],
    ["parallel", 1.5 * Math.SQRT2],
    ["half_coil", 1.5],
  ] as const)("allows %s its own rms current", (connection, limit) => {
    expect(wiredAs(connection).finding("run-current-motor").limit).toBeCloseTo(limit, 12);
  });

  it("cannot be checked until somebody says how the coils are wired", () => {
    expect(wiredAs().finding("run-current-motor")).toMatchObject({
      level: "cannot",
      needs: ["axes.x.motor.connection"],
    });
  });

  it("heats series coils as much as a half coil at their own ratings", () => {
    const heat = (connection: "series" | "half_coil", amps: number) =>
      world(
        texts({ run_current: { typed: amps, unit: "A", basis: "rms" } }),
        wiredAs(connection).input.assembly,
      ).quantity("winding_c");
    expect(heat("series", 1 / Math.SQRT2)).toBeCloseTo(heat("half_coil", 1)!, 9);
  });
});

describe("a preloaded nut", () => {
  it("takes μ0·F0·lead/2π of each motor, and names its friction where that is missing", () => {
    const screw = (preload?: number, friction?: number) =>
      on((axis) => {
        axis.drive_train = { kind: "screw", lead_mm: 5, efficiency: 0.9 };
        if (preload !== undefined) axis.drive_train.preload_n = preload;
        if (friction !== undefined) axis.drive_train.preload_friction = friction;
      });
    const more = screw(300, 0.2).quantity("torque_required")! - screw().quantity("torque_required")!;
    expect(more).toBeCloseTo((0.2 * 300 * 0.005) / (2 * Math.PI), 12);
    expect(screw(300).finding("torque-margin").needs).toContain("axes.x.drive_train.preload_friction");
  });
});

describe("facts of the trade", () => {
  it("the same reference voltage on boards with two sense resistors gives two currents (common practice, no source)", () => {
    const current = (sense: number) => {
      const { run_current: _, ...rest } = EXAMPLE_TEXT;
      const text: Texts = { ...rest, reference_voltage: { typed: 0.9, unit: "V" } };
      const found = world(
        text,
        assemblyWith((axis) => (axis.driver!.set_point!.sense_resistance_ohm = sense)),
      );
      return found.quantity("winding_current_rms")!;
    };
    expect(current(0.1) / current(0.15)).toBeCloseTo(1.5, 12);
  });

  it("a 130 °C motor is over in a thermoplastic mount long before its winding is (common practice, no source)", () => {
    const level = (ruleId: string, milliamps: number) =>
      world(texts({ run_current: { typed: milliamps, unit: "mA", factor: 1e-3, basis: "rms" } })).finding(
        ruleId,
      ).level;
    const first = (ruleId: string) =>
      Array.from({ length: 150 }, (_, index) => 100 + 10 * index).find(
        (current) => level(ruleId, current) === "over",
      )!;
    expect(level("winding-temperature", first("mount-temperature"))).toBe("within");
    expect(first("winding-temperature") / first("mount-temperature")).toBeGreaterThan(1.4);
  });
});
