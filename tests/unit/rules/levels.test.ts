import { describe, expect, it } from "vitest";
import type { AxisAssembly, Assembly } from "@/lib/domain/assembly";
import type { Level } from "@/lib/domain/levels";
import { assemblyWith, EXAMPLE_TEXT, exampleAssembly, texts, textsWithout, world } from "./world";
import type { Texts, World } from "./world";

type Change = (axis: AxisAssembly, assembly: Assembly) => void;

function run(milliamps: number, basis: "rms" | "peak" = "rms"): Texts {
  return texts({ run_current: { typed: milliamps, unit: "mA", factor: 1e-3, basis } });
}

function on(change: Change, text: Texts = EXAMPLE_TEXT): World {
  return world(text, assemblyWith(change));
}

/** One row a step: what is set, and the level that follows. */
function steps(ruleId: string, rows: readonly (readonly [string, () => World, Level])[]) {
  describe(ruleId, () => {
    it.each(rows.map(([words, make, level]) => ({ words, make, level })))(
      "$words: $level",
      ({ make, level }) => {
        expect(make().finding(ruleId).level).toBe(level);
      },
    );
  });
}

steps("run-current-motor", [
  ["90 % of the rating", () => world(run(1350)), "within"],
  ["just above 90 %", () => world(run(1351)), "near"],
  ["the rating itself", () => world(run(1500)), "near"],
  ["just above the rating", () => world(run(1501)), "over"],
  ["a peak of √2 times the rating", () => world(run(1500 * Math.SQRT2, "peak")), "near"],
  [
    "the rms rating stated as a peak",
    () => on((axis) => (axis.motor!.rated_current_basis = "peak"), run(1062)),
    "over",
  ],
]);

const strongMotor: Change = (axis) => (axis.motor!.rated_current_a = 9);
steps("run-current-driver", [
  ["90 % of the maximum", () => on(strongMotor, run(1800)), "within"],
  ["just above 90 %", () => on(strongMotor, run(1801)), "near"],
  ["the maximum itself", () => on(strongMotor, run(2000)), "near"],
  ["just above the maximum", () => on(strongMotor, run(2001)), "over"],
  [
    "a maximum stated as a peak",
    () => on((axis) => (axis.driver!.max_current_basis = "peak"), run(1420)),
    "over",
  ],
]);

/** With no current in the bridge only the quiescent power heats the driver: 40 °C + 35 K/W · P. */
const junctionAt = (celsius: number, change: Change = () => {}) =>
  on((axis, assembly) => {
    axis.driver!.quiescent_power_w = (celsius - 40) / 35;
    change(axis, assembly);
  }, run(0));
steps("driver-junction", [
  ["15 K below the policy's 125 °C", () => junctionAt(110), "within"],
  ["less than 15 K below", () => junctionAt(110.1), "near"],
  ["at 125 °C", () => junctionAt(125), "near"],
  ["above 125 °C", () => junctionAt(125.1), "over"],
  [
    "above the driver's own limit less 25 K",
    () => junctionAt(116, (axis) => (axis.driver!.junction_limit_c = 140)),
    "over",
  ],
  [
    "a loss that outgrows its cooling",
    () => on((axis) => (axis.driver!.junction_to_ambient_k_per_w = 800)),
    "over",
  ],
]);

const rated = (watts: number) => on((axis) => (axis.driver!.set_point!.sense_resistor_rating_w = watts));
const SENSE_POWER = 2 * 0.8 ** 2 * 0.1;
steps("sense-resistor", [
  ["half of the rating", () => rated(SENSE_POWER / 0.5), "within"],
  ["just above half", () => rated(SENSE_POWER / 0.501), "near"],
  ["60 % of the rating", () => rated(SENSE_POWER / 0.6), "near"],
  ["just above 60 %", () => rated(SENSE_POWER / 0.601), "over"],
]);

const winding = world().quantity("winding_c")!;
const insulated = (above: number) => on((axis) => (axis.motor!.winding_limit_c = winding + above));
steps("winding-temperature", [
  ["20 K below the winding's limit", () => insulated(20), "within"],
  ["less than 20 K below", () => insulated(19.9), "near"],
  ["10 K below", () => insulated(10), "near"],
  ["less than 10 K below", () => insulated(9.9), "over"],
  ["a loss that outgrows its cooling", () => world(run(3500)), "over"],
]);

const motorCase = world().quantity("case_c")!;
const softening = (above: number) => on((axis) => (axis.mount!.softening_c = motorCase + above));
steps("mount-temperature", [
  ["20 K below softening", () => softening(20), "within"],
  ["less than 20 K below", () => softening(19.9), "near"],
  ["10 K below", () => softening(10), "near"],
  ["less than 10 K below", () => softening(9.9), "over"],
  ["a loss that outgrows its cooling", () => world(run(3500)), "over"],
]);

const caseAt = (celsius: number) => on((_axis, assembly) => (assembly.ambient_c = celsius), run(0));
steps("touch-temperature", [
  ["60 °C", () => caseAt(60), "within"],
  ["above 60 °C", () => caseAt(60.1), "near"],
  ["far above 60 °C", () => caseAt(200), "near"],
  ["a loss that outgrows its cooling", () => world(run(3500)), "near"],
]);

const scale = (stepsPerMm: number) => world(texts({ steps_per_mm: { typed: stepsPerMm, unit: "steps/mm" } }));
steps("steps-per-mm", [
  ["what the geometry gives", () => scale(80), "within"],
  ["0.1 % off", () => scale(80.08), "within"],
  ["more than 0.1 % off", () => scale(80.09), "near"],
  ["0.5 % off, too few", () => scale(79.6), "near"],
  ["more than 0.5 % off", () => scale(80.41), "over"],
  ["the right scale with its direction reversed", () => scale(-80), "within"],
]);

const board = (hertz: number) =>
  on((_axis, assembly) => (assembly.controller_board!.max_step_rate_hz = hertz));
steps("step-rate", [
  ["80 % of the board's rate", () => board(30000), "within"],
  ["just above 80 %", () => board(29990), "near"],
  ["the board's rate", () => board(24000), "near"],
  ["above the board's rate", () => board(23990), "over"],
  [
    "above the text's rate",
    () => world(texts({ max_step_rate: { typed: 23, unit: "kHz", factor: 1e3 } })),
    "over",
  ],
  [
    "a text's rate of 0, which sets none",
    () => world(texts({ max_step_rate: { typed: 0, unit: "Hz" } })),
    "within",
  ],
  [
    "above what a long pulse leaves",
    () => world(texts({ pulse_width: { typed: 45, unit: "µs", factor: 1e-6 } })),
    "over",
  ],
  [
    "a pulse shorter than the driver needs",
    () => world(texts({ pulse_width: { typed: 0.9, unit: "µs", factor: 1e-6 } })),
    "over",
  ],
  ["above the driver's own pulse times", () => on((axis) => (axis.driver!.min_pulse_low_us = 50)), "over"],
]);

const margin = world().quantity("torque_margin")!;
const wanted = (share: number) =>
  world(EXAMPLE_TEXT, exampleAssembly(), { torque_margin_below_limit_speed: share });
steps("torque-margin", [
  ["1.2 times what the policy wants", () => wanted(margin / 1.2), "within"],
  ["just below 1.2 times", () => wanted(margin / 1.199), "near"],
  ["what the policy wants", () => wanted(margin), "near"],
  ["less than the policy wants", () => wanted(margin * 1.001), "over"],
  [
    "nothing required",
    () => on((axis) => (axis.load!.friction_n = 0), texts({ acceleration: { typed: 0, unit: "mm/s^2" } })),
    "within",
  ],
]);

const jump = world().quantity("start_stop_speed")!;
const corner = (share: number) => world(texts({ corner_speed: { typed: jump * share, unit: "m/s" } }));
steps("corner-speed", [
  ["80 % of the start-stop speed", () => corner(0.8), "within"],
  ["just above 80 %", () => corner(0.801), "near"],
  ["the start-stop speed", () => corner(1), "near"],
  ["above it", () => corner(1.001), "over"],
  ["any jump where friction holds the rotor", () => on((axis) => (axis.load!.friction_n = 500)), "over"],
  [
    "only a corner deviation",
    () =>
      world({ ...textsWithout("corner_speed"), corner_deviation: { typed: 0.02, unit: "mm", factor: 1e-3 } }),
    "cannot",
  ],
]);

/** Hold current, A rms, that holds a vertical axis with `share` more torque than its weight asks. */
function holding(share: number, brake = false): World {
  const assembly = assemblyWith((axis) => {
    axis.load = { ...axis.load!, incline_deg: 90, mass_kg: 2, holding_brake: brake };
  });
  const weightTorque = (2 * 9.80665 * 0.04) / (2 * Math.PI);
  const amperes = ((1 + share) * weightTorque * 1.5) / 0.45;
  return world(texts({ hold_current: { typed: amperes, unit: "A", basis: "rms" } }), assembly);
}
steps("hold-torque", [
  ["a margin of 1.5", () => holding(1.5), "within"],
  ["less than 1.5", () => holding(1.499), "near"],
  ["a margin of 1.0", () => holding(1), "near"],
  ["less than 1.0", () => holding(0.999), "over"],
  ["less than the weight", () => holding(-0.1), "over"],
  ["less than the weight, with a holding brake", () => holding(-0.1, true), "near"],
]);

const operating = (volts: number) => on((axis) => (axis.driver!.operating_max_v = volts));
steps("supply-voltage", [
  ["95 % of the operating maximum", () => operating(25.2 / 0.95), "within"],
  ["just above 95 %", () => operating(25.2 / 0.951), "near"],
  ["the operating maximum", () => operating(25.2), "near"],
  ["above it", () => operating(25.19), "over"],
]);

const bus = world().quantity("bus_voltage_after_braking")!;
const standing = (volts: number) => on((axis) => (axis.driver!.absolute_max_v = volts));
steps("braking-voltage", [
  ["90 % of the absolute maximum", () => standing(bus / 0.9), "within"],
  ["just above 90 %", () => standing(bus / 0.901), "near"],
  ["the absolute maximum", () => standing(bus), "near"],
  ["above it", () => standing(bus * 0.999), "over"],
]);

const natural = world().quantity("resonance_hz")!;
/** Full steps a second at a speed: 200 for each 40 mm. */
const cruise = (hertz: number) =>
  world(texts({ max_speed: { typed: hertz * 0.2, unit: "mm/s", factor: 1e-3 } }));
steps("resonance", [
  ["at the resonance", () => cruise(natural), "near"],
  ["20 % above it", () => cruise(1.2 * natural), "near"],
  ["more than 20 % above it", () => cruise(1.201 * natural), "within"],
  ["between the resonance and half of it", () => cruise(0.7 * natural), "within"],
  ["20 % below half of it", () => cruise(0.4 * natural), "near"],
  ["far below", () => cruise(0.399 * natural), "within"],
]);

const long = (millimetres: number) => on((axis) => (axis.travel_mm = millimetres));
steps("speed-reached", [
  ["a travel of v²/a", () => long(30), "within"],
  ["a shorter travel", () => long(29.9), "near"],
  [
    "a travel of the text that is shorter",
    () =>
      world(
        texts({ travel_min: { typed: 0, unit: "mm" }, travel_max: { typed: 20, unit: "mm", factor: 1e-3 } }),
      ),
    "near",
  ],
  ["no travel", () => on((axis) => (axis.travel_mm = undefined)), "cannot"],
]);

const FIRST_MICROSTEP = Math.SQRT2 * 0.8 * Math.sin(Math.PI / 32);
const onTime = (amperes: number) =>
  on((axis) => (axis.driver!.min_on_time_us = ((amperes * 2.1) / 24 / 30e3) * 1e6));
steps("microstep-current", [
  ["a driver that reaches the first microstep", () => onTime(FIRST_MICROSTEP), "within"],
  ["a driver that does not", () => onTime(FIRST_MICROSTEP * 1.001), "near"],
]);

describe("a check without a meaning", () => {
  it("gives no finding: nothing to hold on a level axis", () => {
    expect(world().has("hold-torque")).toBe(false);
  });
  it("gives no finding: the lowest current outside slow decay", () => {
    expect(on((axis) => (axis.driver!.decay_mode = "mixed")).has("microstep-current")).toBe(false);
  });
  it("gives no finding: a set-point where the text states a current and nothing else", () => {
    expect(world().has("set-point")).toBe(false);
  });
});

describe("value, limit and margin", () => {
  it("gives the quantity itself and where over begins, the margin as a share of the value", () => {
    expect(world().finding("run-current-motor")).toMatchObject({
      value: 0.8,
      limit: 1.5,
      nearLimit: 1.35,
      limitSense: "upper",
      margin: expect.closeTo(0.875, 12),
      unit: "A",
      formula: "0.8 A rms ≤ 1.5 A rms",
    });
  });
  it("takes 0.6 of the rating as the limit of the sense resistor", () => {
    const { value, limit, unit } = world().finding("sense-resistor");
    expect([value, limit, unit]).toEqual([expect.closeTo(0.128, 12), expect.closeTo(0.15, 12), "W"]);
  });
  it("gives a temperature's margin in kelvin below the limit less its deduction", () => {
    const { value, limit, margin: kelvin } = world().finding("winding-temperature");
    expect(limit).toBe(120);
    expect(kelvin).toBeCloseTo(120 - value!, 12);
  });
  it("gives a lower limit's margin as a share of the limit", () => {
    const found = world().finding("torque-margin");
    expect(found.limit).toBe(0.5);
    expect(found.limitSense).toBe("lower");
    expect(found.margin).toBeCloseTo((found.value! - 0.5) / 0.5, 12);
  });
  it("has no margin where it would divide by zero", () => {
    expect(world(run(0)).finding("run-current-motor").margin).toBeNull();
    const free = world(EXAMPLE_TEXT, exampleAssembly(), { torque_margin_below_limit_speed: 0 });
    expect(free.finding("torque-margin").margin).toBeNull();
  });
  it.each(["touch-temperature", "resonance", "speed-reached", "microstep-current"])(
    "%s has neither limit nor margin",
    (id) => {
      expect(world().finding(id)).toMatchObject({ limit: null, margin: null, limitSense: null });
    },
  );
  it("asks for the greater margin above the voltage-limit speed", () => {
    const fast = world(texts({ max_speed: { typed: 600, unit: "mm/s", factor: 1e-3 } }));
    expect(fast.quantity("peak_speed")!).toBeGreaterThan(fast.quantity("voltage_limit_speed")!);
    expect(fast.finding("torque-margin").limit).toBe(1);
  });
});

describe("words of a finding", () => {
  it("names the likely factor of a wrong scale", () => {
    expect(scale(160).finding("steps-per-mm").sentence).toContain("a factor of 2");
    expect(scale(40).finding("steps-per-mm").sentence).toContain("a factor of ½");
    expect(scale(80 * 25.4).finding("steps-per-mm").sentence).toContain("a factor of 25.4");
    expect(scale(101).finding("steps-per-mm").sentence).not.toContain("factor");
  });
  it("shows a scale below 0 as the text has it, and says what its sign is", () => {
    const { level, sentence, formula } = scale(-80).finding("steps-per-mm");
    expect(level).toBe("within");
    expect(sentence).toContain(
      "The scale of -80 steps/mm is what the geometry gives. Its sign is the direction",
    );
    expect(formula).toMatch(/^\|\|-80\| \/ \(/);
    expect(scale(-80).finding("step-rate").formula).toContain("300 mm/s · |-80 steps/mm| = ");
    expect(scale(-160).finding("steps-per-mm").sentence).toContain("The scale of -160 steps/mm is 100 % off");
  });
  it("carries the caution about a falling load on every hold finding, also where it cannot be checked", () => {
    expect(holding(3).finding("hold-torque").caution).toContain("can fall");
    const unknown = on((axis) => (axis.load!.incline_deg = undefined));
    expect(unknown.finding("hold-torque")).toMatchObject({
      level: "cannot",
      caution: expect.stringContaining("can fall"),
    });
  });
  it("says that the load falls where the hold torque is less than its weight", () => {
    expect(holding(-0.25).finding("hold-torque").sentence).toContain(
      "the load falls: the torque is 25 % short",
    );
  });
  it("warns of a hot surface only where it is hot", () => {
    expect(caseAt(75).finding("touch-temperature").caution).toContain("Hot surface");
    expect(caseAt(25).finding("touch-temperature").caution).toBeNull();
  });
  it("says that motors move together on coupled axes", () => {
    const coupled = on((axis) => (axis.coupled_with = ["y"]));
    for (const id of ["torque-margin", "corner-speed", "step-rate", "resonance"])
      expect(coupled.finding(id).sentence).toContain("move together with those of axis y");
    expect(coupled.finding("run-current-motor").sentence).not.toContain("move together");
  });
  it("points at the lines of the text that it rests on, the leading parameter first", () => {
    const { parameters, spans } = world().finding("torque-margin");
    expect(parameters).toEqual(["acceleration", "max_speed", "run_current"]);
    expect(spans.map(({ key }) => key)).toEqual([
      "axis.x.acceleration",
      "axis.x.max_speed",
      "axis.x.run_current",
    ]);
  });
  it("shows numbers in the units of the floor", () => {
    expect(world().finding("corner-speed").sentence).toContain("10 mm/s");
    expect(world().finding("step-rate").sentence).toContain("24 kHz");
  });
});
