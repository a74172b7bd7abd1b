import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Assembly } from "@/lib/domain/assembly";
import type { ParameterName } from "@/lib/domain/parameters";
import { axisModel } from "@/lib/rules/axis-model";
import { RULES } from "@/lib/rules/table";
import { assemblyWith, EXAMPLE_TEXT, exampleAssembly, texts, textsWithout, world } from "./world";
import type { Texts, World } from "./world";

/** Every hardware field of an assembly as path keys, e.g. ["axes", "0", "motor", "inductance_mh"]. */
function fieldsOf(value: unknown, path: readonly string[] = []): string[][] {
  if (typeof value !== "object" || value === null) return [[...path]];
  return Object.entries(value).flatMap(([key, inner]) => fieldsOf(inner, [...path, key]));
}

function without(assembly: Assembly, ...paths: readonly (readonly string[])[]): Assembly {
  const copy = structuredClone(assembly);
  for (const path of paths) {
    const holder = path
      .slice(0, -1)
      .reduce<Record<string, unknown>>(
        (object, key) => object[key] as Record<string, unknown>,
        copy as unknown as Record<string, unknown>,
      );
    delete holder[path.at(-1)!];
  }
  return copy;
}

/** As findings spell it: axes by name. */
function spelt(path: readonly string[]): string {
  return path.map((key, index) => (index === 1 && path[0] === "axes" ? "x" : key)).join(".");
}

/** A raised belt axis whose driver has a register step: the fields of every path of the checks, defaults included. */
const RAISED = assemblyWith((axis, machine) => {
  axis.load!.incline_deg = 90;
  axis.motor!.thermal_class = "B";
  Object.assign(axis.drive_train!, {
    belt_stiffness_n_per_mm: 10_000,
    belt_width_mm: 6,
    belt_length_mm: 1000,
  });
  Object.assign(machine.supply!, { other_load_w: 20, cable_length_m: 2, cable_ohm_per_km: 19.5 });
  axis.driver!.switching_edge_ns = 100;
  axis.driver!.set_point = {
    method: "digital_scale",
    full_scale_v: 0.325,
    internal_resistance_ohm: 0.02,
    steps: 32,
    overall_scale: 1,
    sense_resistance_ohm: 0.11,
    sense_resistor_rating_w: 0.5,
  };
});
const SCALE_TEXT: Texts = { ...textsWithout("run_current"), current_scale: { typed: 18, unit: null } };

/** Fields that no check of this set can use. */
const UNUSED = ["axes.x.motor.thermal_time_constant_s", "axes.x.driver.min_direction_setup_us"];
/** Fields with a default, which is named where a finding rests on it. */
const DEFAULTED = [
  "axes.x.motor_count",
  "axes.x.drive_train.ratio",
  "axes.x.drive_train.inertia_kgm2",
  "axes.x.load.external_force_n",
  "axes.x.load.counterbalance_n",
  "axes.x.driver.switching_edge_ns",
  "axes.x.driver.set_point.overall_scale",
  "supply.tolerance",
  "supply.other_load_w",
  "enclosure_rise_k",
];
/** Fields of which one is enough, or whose absence only leaves the graver verdict. */
const ONE_OF = [
  "controller_board.max_step_rate_hz",
  "axes.x.driver.min_pulse_high_us",
  "axes.x.driver.min_pulse_low_us",
  "axes.x.load.holding_brake",
];

const FIELDS = fieldsOf(RAISED).filter((path) => path.at(-1) !== "axis");

function needsOf({ result }: World): Set<string> {
  return new Set(result.findings.filter(({ level }) => level === "cannot").flatMap(({ needs }) => needs));
}

function assumedOf({ result }: World): Set<string> {
  return new Set(result.findings.flatMap(({ assumed }) => assumed));
}

describe("a missing hardware field", () => {
  const needed = FIELDS.filter((path) => ![...UNUSED, ...DEFAULTED, ...ONE_OF].includes(spelt(path)));
  it.each(needed.map((path) => [spelt(path), path] as const))(
    "%s leads to a finding that names it",
    (name, path) => {
      expect(needsOf(world(SCALE_TEXT, RAISED))).not.toContain(name);
      expect(needsOf(world(SCALE_TEXT, without(RAISED, path)))).toContain(name);
    },
  );

  it.each(DEFAULTED)("%s has a default, which the findings that rest on it name", (name) => {
    const path = FIELDS.find((field) => spelt(field) === name)!;
    expect(assumedOf(world(SCALE_TEXT, RAISED))).not.toContain(name);
    const found = world(SCALE_TEXT, without(RAISED, path));
    expect(assumedOf(found)).toContain(name);
    expect(needsOf(found)).not.toContain(name);
  });

  it.each(["gain", "basis", "sense_resistance_ohm"] as const)(
    "a reference voltage without %s gives no current (common practice, no source)",
    (field) => {
      const assembly = assemblyWith((axis) => delete axis.driver!.set_point![field]);
      const text: Texts = {
        ...textsWithout("run_current"),
        reference_voltage: { typed: 0.9, unit: "V" },
      };
      const found = world(text, assembly);
      expect(found.quantity("winding_current_rms")).toBeUndefined();
      expect(found.finding("run-current-motor")).toMatchObject({
        level: "cannot",
        needs: [`axes.x.driver.set_point.${field}`],
      });
    },
  );

  it("names all three pulse and rate limits where none of them is known", () => {
    const assembly = assemblyWith((axis, machine) => {
      delete machine.controller_board;
      delete axis.driver!.min_pulse_high_us;
      delete axis.driver!.min_pulse_low_us;
    });
    expect(world(EXAMPLE_TEXT, assembly).finding("step-rate")).toMatchObject({
      level: "cannot",
      needs: [
        "controller_board.max_step_rate_hz",
        "axes.x.driver.min_pulse_high_us",
        "axes.x.driver.min_pulse_low_us",
      ],
    });
  });

  it("of the incline is not level: what needs the weight cannot be checked", () => {
    const found = world(
      EXAMPLE_TEXT,
      assemblyWith((axis) => delete axis.load!.incline_deg),
    );
    for (const id of ["hold-torque", "torque-margin", "corner-speed"])
      expect(found.finding(id)).toMatchObject({
        level: "cannot",
        needs: expect.arrayContaining(["axes.x.load.incline_deg"]),
      });
  });

  it("of the thermal resistance leaves the driver's loss at the stated temperature, and says so", () => {
    const found = world(
      EXAMPLE_TEXT,
      assemblyWith((axis) => delete axis.driver!.junction_to_ambient_k_per_w),
    );
    expect(found.quantity("driver_power")).toBeCloseTo(2 * 0.8 ** 2 * 0.25 + 0.1, 12);
    expect(found.finding("driver-junction").needs).toEqual(["axes.x.driver.junction_to_ambient_k_per_w"]);
  });

  it("of the motor's thermal resistance leaves the torque at a winding of 20 °C, and says so", () => {
    const found = world(
      EXAMPLE_TEXT,
      assemblyWith((axis) => delete axis.motor!.winding_to_ambient_k_per_w),
    );
    const torque = found.finding("torque-margin");
    expect(torque.level).toBe("within");
    expect(torque.assumed).toEqual(["axes.x.motor.winding_to_ambient_k_per_w"]);
    expect(torque.formula).toContain("winding at 20 °C");
  });

  it("of the junction's own limit still allows the verdict over", () => {
    const hot = assemblyWith((axis) => {
      delete axis.driver!.junction_limit_c;
      axis.driver!.junction_to_ambient_k_per_w = 200;
    });
    expect(world(EXAMPLE_TEXT, hot).finding("driver-junction").level).toBe("over");
    const cool = assemblyWith((axis) => delete axis.driver!.junction_limit_c);
    expect(world(EXAMPLE_TEXT, cool).finding("driver-junction").needs).toEqual([
      "axes.x.driver.junction_limit_c",
    ]);
  });

  it("of one axis makes the bus voltage absent and names the axis", () => {
    const assembly = exampleAssembly();
    assembly.axes.push({ axis: "Y2" });
    const found = world(EXAMPLE_TEXT, assembly);
    expect(found.quantity("bus_voltage_after_braking")).toBeUndefined();
    const { needs, sentence } = found.finding("braking-voltage");
    expect(needs).toEqual(
      expect.arrayContaining(["axes.Y2.max_speed", "axes.Y2.load.mass_kg", "axes.Y2.driver.absolute_max_v"]),
    );
    expect(sentence).toContain("the load's moving mass of axis Y2");
  });
});

describe("a parameter that the text lacks", () => {
  const LEADING: readonly (readonly [string, ParameterName])[] = [
    ["run-current-motor", "run_current"],
    ["steps-per-mm", "steps_per_mm"],
    ["steps-per-mm", "microsteps"],
    ["step-rate", "max_speed"],
    ["torque-margin", "acceleration"],
    ["torque-margin", "max_speed"],
    ["corner-speed", "corner_speed"],
    ["speed-reached", "max_speed"],
    ["resonance", "run_current"],
    ["microstep-current", "microsteps"],
  ];
  it.each(LEADING)("%s without %s cannot be checked and names it", (ruleId, name) => {
    const { level, needs, sentence } = world(textsWithout(name)).finding(ruleId);
    expect(level).toBe("cannot");
    expect(needs).toContain(`axes.x.${name}`);
    expect(sentence).toContain("Not in the text:");
  });

  it.each(["run_current", "hold_current"] as const)("%s without a basis is never used", (name) => {
    const assembly = assemblyWith((axis) => (axis.load!.incline_deg = 90));
    const found = world(texts({ [name]: { typed: 0.8, unit: "A", basis: null } }), assembly);
    const quantity = name === "run_current" ? "winding_current_rms" : "hold_current_rms";
    expect(found.quantity(quantity)).toBeUndefined();
    const { level, needs, sentence } = found.finding(
      name === "run_current" ? "run-current-motor" : "hold-torque",
    );
    expect([level, needs]).toEqual(["cannot", [`axes.x.${name}.basis`]]);
    expect(sentence).toMatch(/whether the (run|hold) current in the text is peak or rms/);
  });

  it("is not made up for a corner deviation", () => {
    const text: Texts = {
      ...textsWithout("corner_speed"),
      corner_deviation: { typed: 0.02, unit: "mm", factor: 1e-3 },
    };
    expect(world(text).finding("corner-speed")).toMatchObject({ needs: ["axes.x.corner_speed"] });
  });

  it("is as good as missing where its sign makes no sense, and the sentence says so", () => {
    const { level, needs, sentence } = world(
      texts({ acceleration: { typed: -3000, unit: "mm/s^2", factor: 1e-3 } }),
    ).finding("torque-margin");
    expect([level, needs]).toEqual(["cannot", ["axes.x.acceleration"]]);
    expect(sentence).toContain("Acceleration is -3000 mm/s^2 in the text; it must be 0 or more.");
    expect(sentence).not.toContain("Not in the text");
  });

  it("is as good as missing where a scale or the microsteps are 0", () => {
    const scale = world(texts({ steps_per_mm: { typed: 0, unit: "steps/mm" } }));
    expect(scale.finding("steps-per-mm").sentence).toContain("Steps per mm is 0 steps/mm in the text");
    expect(scale.finding("step-rate").level).toBe("cannot");
    const microsteps = world(texts({ microsteps: { typed: 0, unit: null } }));
    expect(microsteps.finding("microstep-current").sentence).toContain("it must be more than 0");
  });

  it("is as good as missing where microsteps are not a whole number", () => {
    const found = world(texts({ microsteps: { typed: 16.5, unit: null } }));
    for (const ruleId of ["steps-per-mm", "microstep-current", "microstep-friction"])
      expect(found.finding(ruleId)).toMatchObject({
        level: "cannot",
        needs: ["axes.x.microsteps"],
        sentence: expect.stringContaining("Microsteps is 16.5 in the text; it must be a whole number."),
      });
    expect(found.quantity("steps_per_mm_expected")).toBeUndefined();
    const model = axisModel(found.input, "x");
    expect(model.ok && model.value.microsteps).toBeNull();
  });
});

/** Checks of what a text or a machine need not have: software ends, a reference run, motors shared by two axes. */
const WITHOUT_SUBJECT = ["soft-travel", "reference-run", "coupled-motors", "coupled-jump"];

describe("any data missing", () => {
  it("never throws, names only what is missing, and never shows cannot as anything else", () => {
    const names = Object.keys(SCALE_TEXT) as ParameterName[];
    fc.assert(
      fc.property(fc.subarray(FIELDS), fc.subarray(names), (fields, dropped) => {
        const text = Object.fromEntries(
          Object.entries(SCALE_TEXT).filter(([name]) => !dropped.includes(name as ParameterName)),
        );
        const { findings } = world(text, without(RAISED, ...fields)).result;
        const gone = new Set([...fields.map(spelt), ...dropped.map((name) => `axes.x.${name}`)]);
        // A text without any current is told so in the words of the current itself.
        gone.add("axes.x.run_current");
        const wrong = findings.filter(
          ({ level, needs, assumed, value, sentence }) =>
            [...needs, ...assumed].some((path) => !gone.has(path)) ||
            /undefined|NaN|null/.test(sentence) ||
            (level === "cannot" ? value !== null || needs.length === 0 : needs.length > 0),
        );
        expect(wrong).toEqual([]);
      }),
      { numRuns: 100, seed: 7 },
    );
  }, 60_000);

  it("leaves a finding of every check on a machine of which nothing is known", () => {
    const { result } = world({}, { axes: [{ axis: "x" }] });
    const spoken = RULES.map(({ id }) => id).filter((id) => !WITHOUT_SUBJECT.includes(id));
    expect(result.findings.map(({ ruleId }) => ruleId).sort()).toEqual(spoken.sort());
    expect(new Set(result.findings.map(({ level }) => level))).toEqual(new Set(["cannot"]));
    expect(result.quantities).toEqual([]);
  });

  it("is nothing to say on a machine without axes", () => {
    expect(world({}, { axes: [] }).result.findings).toEqual([]);
  });
});

describe("the needs of a check", () => {
  it("cover every field that one of its findings ever names", () => {
    fc.assert(
      fc.property(fc.subarray(FIELDS), (fields) => {
        const { result } = world(SCALE_TEXT, without(RAISED, ...fields));
        const untold = result.findings.flatMap(({ ruleId, needs, assumed }) => {
          const rule = RULES.find(({ id }) => id === ruleId)!;
          return [...needs, ...assumed].filter((path) => !rule.needs.includes(tabled(path)));
        });
        expect(untold).toEqual([]);
      }),
      { numRuns: 100, seed: 7 },
    );
  }, 60_000);
});

/** A path as `Rule.needs` spells it: "axes.x.motor.r" is "motor.r", "axes.x.travel_mm" is "axis.travel_mm". */
function tabled(path: string): string {
  const field = path.replace(/^axes\.x\./, "");
  if (path === field) return path.includes(".") ? path : `machine.${path}`;
  if (field.includes(".")) return field;
  return /^(travel_mm|travel_deg|motor_count)$/.test(field) ? `axis.${field}` : field;
}
