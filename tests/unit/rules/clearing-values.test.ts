import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { AxisAssembly } from "@/lib/domain/assembly";
import type { Finding } from "@/lib/domain/findings";
import type { ParameterName } from "@/lib/domain/parameters";
import { assemblyWith, EXAMPLE_TEXT, texts, textsWithout, world, worldOf } from "./world";
import type { Texts, World } from "./world";

/** The same machine with the finding's clearing value in its text. */
function cleared(found: World, { clearingValue }: Finding, factor = 1): World {
  const { axis, parameter, value } = clearingValue!;
  return worldOf({
    ...found.input,
    parameters: found.input.parameters.map((stated) =>
      stated.parameter === parameter && stated.axis === axis ? { ...stated, value: value * factor } : stated,
    ),
  });
}

function clearingOf(ruleId: string, text: Texts, change: (axis: AxisAssembly) => void = () => {}) {
  const found = world(text, assemblyWith(change));
  const finding = found.finding(ruleId);
  expect(finding.level).toBe("over");
  const { clearingValue } = finding;
  if (clearingValue !== null)
    expect(["near", "within"]).toContain(cleared(found, finding).finding(ruleId, finding.axis).level);
  return clearingValue;
}

const amps = (typed: number, basis: "rms" | "peak" = "rms"): Texts =>
  texts({ run_current: { typed: typed * 1000, unit: "mA", factor: 1e-3, basis } });
const value = (parameter: ParameterName, inside: number, unit: string) => ({
  axis: "x",
  parameter,
  value: inside,
  unit,
});

describe("a clearing value", () => {
  it("lowers the run current to the motor's rating", () => {
    expect(clearingOf("run-current-motor", amps(1.8))).toEqual(value("run_current", 1.5, "A"));
  });

  it("keeps the text's basis", () => {
    expect(clearingOf("run-current-motor", amps(3, "peak"))).toEqual(value("run_current", 2.12, "A"));
  });

  it("is rounded down to three digits, four after a leading 1, in the text's own unit", () => {
    const fast = texts({ max_speed: { typed: 90000, unit: "mm/min", factor: 1e-3 / 60 } });
    // 100 kHz / 80 per mm = 1250 mm/s = 75000 mm/min.
    expect(clearingOf("step-rate", fast)).toEqual(value("max_speed", 1.25, "m/s"));
    expect(clearingOf("sense-resistor", amps(1.2))).toEqual(value("run_current", 0.866, "A"));
  });

  it("lowers the reference voltage or the register step where they set the current", () => {
    const reference = { ...textsWithout("run_current"), reference_voltage: { typed: 1.9, unit: "V" } };
    expect(clearingOf("run-current-motor", reference)).toEqual(value("reference_voltage", 1.697, "V"));
    const register = { ...textsWithout("run_current"), current_scale: { typed: 31, unit: null } };
    const scaled = clearingOf("run-current-motor", register, (axis) => {
      axis.driver!.set_point = {
        method: "digital_scale",
        full_scale_v: 0.325,
        internal_resistance_ohm: 0.02,
        steps: 32,
        sense_resistance_ohm: 0.11,
      };
    });
    // 1.5 A · √2 / (2.5 A / 32) = 27.15 steps, counted from 0.
    expect(scaled).toEqual(value("current_scale", 26, ""));
  });

  it("lowers a current of which heat is the matter, also where the heat never settles", () => {
    for (const id of ["driver-junction", "winding-temperature", "mount-temperature"])
      expect(clearingOf(id, amps(4))).toMatchObject({ parameter: "run_current" });
  });

  it("sets the scale of the geometry, direction kept", () => {
    const scale = (typed: number) => texts({ steps_per_mm: { typed, unit: "steps/mm" } });
    expect(clearingOf("steps-per-mm", scale(160))).toEqual(value("steps_per_mm", 80, "1/mm"));
    expect(clearingOf("steps-per-mm", scale(-40))).toEqual(value("steps_per_mm", -80, "1/mm"));
  });

  it("lengthens a pulse that is too short to what the driver needs", () => {
    const short = texts({ pulse_width: { typed: 0.4, unit: "us", factor: 1e-6 } });
    expect(clearingOf("step-rate", short)).toEqual(value("pulse_width", 1e-6, "s"));
  });

  it("prefers less acceleration over less speed, and less speed over more current", () => {
    const heavy = (axis: AxisAssembly) => (axis.load!.mass_kg = 20);
    expect(clearingOf("torque-margin", EXAMPLE_TEXT, heavy)).toMatchObject({ parameter: "acceleration" });
    const rough = (axis: AxisAssembly) => (axis.load!.friction_n = 20);
    const fast = texts({ max_speed: { typed: 900, unit: "mm/s", factor: 1e-3 } });
    expect(clearingOf("torque-margin", fast, rough)).toMatchObject({ parameter: "max_speed" });
    const stiff = (axis: AxisAssembly) => (axis.load!.friction_n = 25);
    expect(clearingOf("torque-margin", EXAMPLE_TEXT, stiff)).toMatchObject({ parameter: "run_current" });
  });

  it("never raises a current above what motor and driver are rated for", () => {
    const stuck = (axis: AxisAssembly) => (axis.load!.friction_n = 60);
    expect(clearingOf("torque-margin", EXAMPLE_TEXT, stuck)).toBeNull();
    const weak = (axis: AxisAssembly) => {
      axis.load!.friction_n = 25;
      axis.driver!.max_current_a = 0.85;
    };
    expect(clearingOf("torque-margin", EXAMPLE_TEXT, weak)).toBeNull();
  });

  it("lowers the corner speed to the start-stop speed", () => {
    const found = world(texts({ corner_speed: { typed: 200, unit: "mm/s", factor: 1e-3 } }));
    const { clearingValue } = found.finding("corner-speed");
    const limit = found.quantity("start_stop_speed")!;
    expect(clearingValue!.parameter).toBe("corner_speed");
    expect(clearingValue!.value).toBeLessThanOrEqual(limit);
    expect(clearingValue!.value).toBeGreaterThan(0.99 * limit);
  });

  it("raises the hold current of a raised load, from nothing too and in per cent", () => {
    const raised = (axis: AxisAssembly) => {
      axis.load!.incline_deg = 90;
      axis.load!.mass_kg = 2;
    };
    // Twice the weight's torque: 2 · 2 kg · 9.80665 m/s² · 40 mm / 2π = 249.7 mN·m of 450 mN·m at 1.5 A.
    const needed = (2 * 2 * 9.80665 * 0.04) / (2 * Math.PI) / 0.3;
    const hold = (typed: number, unit: string) =>
      texts({ hold_current: { typed, unit, basis: unit === "%" ? null : "rms" } });
    const fromNothing = clearingOf("hold-torque", hold(0, "A"), raised)!;
    expect(fromNothing.value).toBeGreaterThanOrEqual(needed);
    expect(fromNothing.value).toBeLessThan(1.005 * needed);
    const share = clearingOf("hold-torque", { ...hold(30, "%"), ...pick(amps(1.2), "run_current") }, raised)!;
    expect(share).toMatchObject({ parameter: "hold_current", unit: "%" });
    expect(share.value).toBeGreaterThanOrEqual((needed / 1.2) * 100);
    // At 0.8 A even the whole run current is not enough: it is the run current that has to rise.
    expect(clearingOf("hold-torque", hold(100, "%"), raised)).toMatchObject({ parameter: "run_current" });
  });

  it("slows the axis that carries the most energy so that the bus stays below the absolute maximum", () => {
    const text = texts({
      max_speed: { typed: 1.2, unit: "m/s" },
      acceleration: { typed: 30, unit: "m/s^2" },
    });
    expect(clearingOf("braking-voltage", text)).toMatchObject({ axis: "x", parameter: "max_speed" });
  });

  it("does not exist where only hardware helps", () => {
    expect(
      clearingOf("supply-voltage", EXAMPLE_TEXT, (axis) => (axis.driver!.operating_max_v = 20)),
    ).toBeNull();
    expect(
      clearingOf("braking-voltage", EXAMPLE_TEXT, (axis) => (axis.driver!.absolute_max_v = 20)),
    ).toBeNull();
    expect(
      clearingOf("winding-temperature", amps(0.8), (axis) => (axis.motor!.winding_limit_c = 30)),
    ).toBeNull();
  });

  it("stands only beside what is over its limit", () => {
    for (const { level, clearingValue } of world().result.findings)
      if (level !== "over") expect(clearingValue).toBeNull();
  });
});

function pick(text: Texts, name: ParameterName): Texts {
  return { [name]: text[name] };
}

/** Texts around and far beyond the example's. */
const wildText = fc
  .record({
    run: fc.double({ min: 0.05, max: 5, noNaN: true }),
    basis: fc.constantFrom("rms" as const, "peak" as const),
    hold: fc.double({ min: 0, max: 100, noNaN: true }),
    scale: fc.constantFrom(40, 79.7, 80, 80.5, 160, 3200),
    speed: fc.double({ min: 1, max: 3000, noNaN: true }),
    acceleration: fc.double({ min: 10, max: 60000, noNaN: true }),
    corner: fc.double({ min: 0, max: 400, noNaN: true }),
    pulse: fc.constantFrom(0.5, 1, 4, 40),
    jerk: fc.constantFrom(0, 5, 500),
    end: fc.constantFrom(380, 400, 410),
    seeking: fc.double({ min: 1, max: 500, noNaN: true }),
  })
  .map(({ run, basis, hold, scale, speed, acceleration, corner, pulse, jerk, end, seeking }): Texts => ({
    run_current: { typed: run, unit: "A", basis },
    hold_current: { typed: hold, unit: "%" },
    microsteps: { typed: 16, unit: null },
    steps_per_mm: { typed: scale, unit: "steps/mm" },
    max_speed: { typed: speed, unit: "mm/s", factor: 1e-3 },
    acceleration: { typed: acceleration, unit: "mm/s^2", factor: 1e-3 },
    corner_speed: { typed: corner, unit: "mm/s", factor: 1e-3 },
    pulse_width: { typed: pulse, unit: "µs", factor: 1e-6 },
    jerk: { typed: jerk, unit: "m/s³" },
    travel_min: { typed: 0, unit: "mm", factor: 1e-3 },
    travel_max: { typed: end, unit: "mm", factor: 1e-3 },
    reference_run_speed: { typed: seeking, unit: "mm/s", factor: 1e-3 },
  }));

const wildAxis = fc.record({
  mass: fc.double({ min: 0.05, max: 30, noNaN: true }),
  friction: fc.double({ min: 0, max: 60, noNaN: true }),
  incline: fc.constantFrom(0, 30, 90),
});

/** Checks whose value grows with the one parameter that is lowered: a slightly larger value is over again. */
const TIGHT: Readonly<Record<string, ParameterName>> = {
  "run-current-motor": "run_current",
  "sense-resistor": "run_current",
  "step-rate": "max_speed",
  "corner-speed": "corner_speed",
  "reference-run": "reference_run_speed",
};

describe("every clearing value", () => {
  it("ends over, and hardly a larger one would where it lowers", () => {
    const seen = new Set<string>();
    fc.assert(
      fc.property(wildText, wildAxis, (text, { mass, friction, incline }) => {
        const found = world(
          text,
          assemblyWith((axis) => {
            axis.load = { ...axis.load!, mass_kg: mass, friction_n: friction, incline_deg: incline };
            axis.load.reference_overtravel_mm = 3;
            axis.motor!.thermal_class = "E";
          }),
        );
        for (const finding of found.result.findings) {
          if (finding.clearingValue === null) continue;
          seen.add(finding.ruleId);
          const { level } = cleared(found, finding).finding(finding.ruleId, finding.axis);
          if (level !== "near" && level !== "within") throw new Error(`${finding.ruleId} stays ${level}`);
          const { parameter } = finding.clearingValue;
          if (TIGHT[finding.ruleId] !== parameter) continue;
          const slightlyMore = cleared(found, finding, 1.011).finding(finding.ruleId, finding.axis);
          if (slightlyMore.level !== "over") throw new Error(`${finding.ruleId} gives away more than 1 %`);
        }
      }),
      { numRuns: 100, seed: 11 },
    );
    expect([...seen].sort()).toEqual(
      [
        "braking-voltage",
        "corner-speed",
        "driver-junction",
        "hold-torque",
        "lowering-voltage",
        "mount-temperature",
        "ramp-torque-margin",
        "reference-run",
        "run-current-driver",
        "run-current-motor",
        "sense-resistor",
        "soft-travel",
        "static-position",
        "step-rate",
        "steps-per-mm",
        "supply-power",
        "torque-margin",
        "winding-class",
        "winding-temperature",
      ].sort(),
    );
  }, 60_000);
});
