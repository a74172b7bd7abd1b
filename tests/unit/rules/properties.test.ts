import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Assembly } from "@/lib/domain/assembly";
import { PARAMETER_NAMES } from "@/lib/domain/parameters";
import type { QuantityName } from "@/lib/domain/quantities";
import { assemblyWith, EXAMPLE_TEXT, exampleAssembly, texts, world } from "./world";
import type { Texts } from "./world";

const NO_NOISE = 1 + 1e-9;

function amps(typed: number): Texts {
  return texts({
    run_current: { typed, unit: "A", basis: "rms" },
    hold_current: { typed, unit: "A", basis: "rms" },
  });
}

/** Holds `lesser ≤ greater` for a quantity at two ascending values of something. */
function never(
  words: string,
  check: (low: number, high: number) => void,
  range: { min: number; max: number },
) {
  it(
    words,
    () => {
      const value = fc.double({ ...range, noNaN: true });
      fc.assert(
        fc.property(value, value, (one, other) => check(Math.min(one, other), Math.max(one, other))),
        { numRuns: 50, seed: 3 },
      );
    },
    60_000,
  );
}

function at(name: QuantityName, text: Texts, assembly: Assembly = exampleAssembly()): number {
  const found = world(text, assembly).quantity(name);
  if (found === undefined) throw new Error(`${name} is absent`);
  return found;
}

const raised = (mass = 2) =>
  assemblyWith((axis) => (axis.load = { ...axis.load!, incline_deg: 90, mass_kg: mass }));

describe("monotony", () => {
  never(
    "more current holds no less",
    (low, high) => {
      expect(at("hold_torque_margin", amps(low), raised())).toBeLessThanOrEqual(
        at("hold_torque_margin", amps(high), raised()) + 1e-9,
      );
    },
    { min: 0, max: 3 },
  );

  never(
    "more current stiffens the rotor: its resonance is no lower",
    (low, high) => {
      expect(at("resonance_hz", amps(low))).toBeLessThanOrEqual(at("resonance_hz", amps(high)) * NO_NOISE);
    },
    { min: 0.01, max: 3 },
  );

  never(
    "a warmer room leaves junction, winding and case no cooler",
    (low, high) => {
      const [cool, warm] = [low, high].map((ambient) =>
        world(
          EXAMPLE_TEXT,
          assemblyWith((_axis, machine) => (machine.ambient_c = ambient)),
        ),
      );
      for (const name of ["driver_junction_c", "winding_c", "case_c"] as const)
        expect(cool!.quantity(name)!).toBeLessThanOrEqual(warm!.quantity(name)! + 1e-9);
    },
    { min: -40, max: 80 },
  );

  never(
    "more load inertia lets no faster start",
    (low, high) => {
      const [light, heavy] = [low, high].map((mass) =>
        at(
          "start_stop_speed",
          EXAMPLE_TEXT,
          assemblyWith((axis) => (axis.load!.mass_kg = mass)),
        ),
      );
      expect(heavy!).toBeLessThanOrEqual(light! * NO_NOISE);
    },
    { min: 0.05, max: 50 },
  );

  never(
    "more speed leaves no more torque",
    (low, high) => {
      const [slow, fast] = [low, high].map((speed) =>
        at(
          "torque_available",
          texts({ max_speed: { typed: speed, unit: "m/s" }, acceleration: { typed: 1000, unit: "m/s^2" } }),
        ),
      );
      expect(fast!).toBeLessThanOrEqual(slow! * NO_NOISE);
    },
    { min: 0, max: 5 },
  );

  never(
    "a larger bus capacitor lets the voltage rise no higher",
    (low, high) => {
      const [small, large] = [low, high].map((capacitance) =>
        at(
          "bus_voltage_after_braking",
          EXAMPLE_TEXT,
          assemblyWith((_axis, machine) => (machine.supply!.bus_capacitance_uf = capacitance)),
        ),
      );
      expect(large!).toBeLessThanOrEqual(small! * NO_NOISE);
    },
    { min: 10, max: 1e5 },
  );
});

describe("facts of the trade", () => {
  it("a motor of about 3 V passes the supply checks on 24 V (common practice, no source)", () => {
    const found = world();
    expect(found.finding("supply-voltage").level).toBe("within");
    expect(found.finding("braking-voltage").level).toBe("within");
    const { resistance_ohm, rated_current_a } = found.input.assembly.axes[0]!.motor!;
    expect(resistance_ohm! * rated_current_a!).toBeCloseTo(3.15, 12);
  });

  it("half the acceleration halves the dynamic part of the torque (common practice, no source)", () => {
    const torque = (typed: number) =>
      at("torque_required", texts({ acceleration: { typed, unit: "mm/s^2", factor: 1e-3 } }));
    const friction = torque(0);
    expect(torque(1500) - friction).toBeCloseTo((torque(3000) - friction) / 2, 12);
  });

  it("a peak taken for an rms value doubles the copper loss (common practice, no source)", () => {
    const rise = (basis: "rms" | "peak") =>
      at("case_c", texts({ run_current: { typed: 0.4, unit: "A", basis } }), coldCopper()) - 35;
    expect(rise("rms") / rise("peak")).toBeCloseTo(2, 2);
  });
});

/** A motor so well cooled that its copper stays cold. */
function coldCopper(): Assembly {
  return assemblyWith((axis) => {
    axis.motor!.winding_to_ambient_k_per_w = 0.01;
    axis.motor!.case_to_ambient_k_per_w = 0.01;
  });
}

/** Numbers from a mistyped unit to nonsense. */
const anyNumber = fc.oneof(
  fc.constantFrom(0, -0, 1, -1, 1e-300, 1e300, -1e300, Number.MAX_VALUE, Number.MIN_VALUE, 1e12),
  fc.double({ noNaN: true, noDefaultInfinity: true }),
  fc.double({ min: 0, max: 1000, noNaN: true }),
);
const anyText: fc.Arbitrary<Texts> = fc
  .record(
    Object.fromEntries(
      PARAMETER_NAMES.map((name) => [
        name,
        fc.record({
          typed: anyNumber,
          unit: fc.constantFrom("%", null, "mm"),
          basis: fc.constantFrom("rms" as const, "peak" as const, null),
        }),
      ]),
    ),
    { requiredKeys: [] },
  )
  .map((text) => text as Texts);

/** Positive, as the schemas of stored hardware demand, but of any size. */
const anySize = fc.oneof(
  fc.constantFrom(Number.MIN_VALUE, 1e-30, 1e30, Number.MAX_VALUE),
  fc.double({ min: 1e-6, max: 1e6, noNaN: true }),
);

/** The example with some of its hardware numbers of any size. */
function resized(value: unknown, sizes: readonly number[], counter = { at: 0 }): unknown {
  if (typeof value === "number") {
    const size = sizes[counter.at++ % sizes.length]!;
    return size > 1e3 ? size : value * size;
  }
  if (Array.isArray(value)) return value.map((inner) => resized(inner, sizes, counter));
  if (typeof value !== "object" || value === null) return value;
  return Object.fromEntries(
    Object.entries(value).map(([key, inner]) => [key, resized(inner, sizes, counter)]),
  );
}

function numbersIn(value: unknown): number[] {
  if (typeof value === "number") return [value];
  if (typeof value !== "object" || value === null) return [];
  return Object.values(value).flatMap(numbersIn);
}

/** The example with every further field that a check can use, and a second axis on shared motors. */
function fullAssembly(): Assembly {
  return assemblyWith((axis, machine) => {
    Object.assign(axis.motor!, { thermal_class: "B", rating_of: "half_coil", connection: "series" });
    Object.assign(axis.load!, {
      incline_deg: 60,
      holding_brake: true,
      brake_delay_ms: 40,
      reference_overtravel_mm: 5,
    });
    Object.assign(axis.drive_train!, {
      preload_n: 50,
      preload_friction: 0.2,
      belt_stiffness_n_per_mm: 7500,
      belt_width_mm: 9,
      belt_length_mm: 1000,
    });
    Object.assign(machine.supply!, { other_load_w: 10, cable_length_m: 2, cable_ohm_per_km: 19.5 });
    machine.axes.push({ ...structuredClone(axis), axis: "y", coupled_with: ["x"] });
  });
}

describe("any finite numbers", () => {
  it("lead to finite numbers or to none, and never to an exception", () => {
    fc.assert(
      fc.property(anyText, fc.array(anySize, { minLength: 1, maxLength: 40 }), (text, sizes) => {
        const assembly = resized(fullAssembly(), sizes) as Assembly;
        for (const axis of assembly.axes) axis.motor_count = 1;
        const { quantities, findings, provenance } = world(text, assembly).result;
        const odd = numbersIn([quantities, findings, provenance]).filter((value) => !Number.isFinite(value));
        expect(odd).toEqual([]);
        expect(findings.filter(({ sentence }) => /NaN|Infinity|undefined/.test(sentence))).toEqual([]);
      }),
      { numRuns: 200, seed: 5 },
    );
  }, 60_000);
});
