import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Assembly } from "@/lib/domain/assembly";
import { effects } from "@/lib/review/effects";
import { parameterChanges } from "@/lib/review/parameter-changes";
import type { CheckReport, Effect } from "@/lib/review/types";
import { ASSEMBLY, TEXT, check, edited } from "./support/gantry";

function effectsOf(before: CheckReport, after: CheckReport): Effect[] {
  return effects({ before, after, changes: parameterChanges(before, after) });
}

const quantity = (report: CheckReport, axis: string | null, name: string) =>
  report.quantities.find((own) => own.axis === axis && own.name === name)?.value ?? null;

function withMount(softening: number): Assembly {
  const axes = ASSEMBLY.axes.map((axis) => ({ ...axis, mount: { softening_c: softening } }));
  return { ...ASSEMBLY, axes };
}

const FASTER = edited(
  "x",
  "acc = 6000",
  "acc = 8000",
  edited("x", "vmax = 300", "vmax = 500", edited("x", "amps = 0.85", "amps = 1.05")),
);

describe("parameterChanges", () => {
  it("letters what changed in the order of axes and of the parameter list", () => {
    const changes = parameterChanges(check(TEXT), check(FASTER));
    expect(changes.map(({ letter, axis, parameter }) => [letter, axis, parameter])).toEqual([
      ["A", "x", "run_current"],
      ["B", "x", "max_speed"],
      ["C", "x", "acceleration"],
    ]);
    expect(changes[0]).toMatchObject({
      was: { value: 0.85, unit: "A", basis: "rms", line: 6, path: "gantry.conf" },
      toBe: { value: 1.05, line: 6 },
      change: expect.closeTo(0.2353, 4),
    });
  });

  it("takes another spelling of the same value for no change", () => {
    const same = edited("x", "vmax = 300 ", "vmax = 18 m/min ", edited("x", "acc = 6000", "acc = 6e3"));
    expect(parameterChanges(check(TEXT), check(same))).toEqual([]);
  });

  it("letters a parameter that only one side states", () => {
    const [change] = parameterChanges(check(TEXT), check(edited("x", "corner = 12", "# corner = 12")));
    expect(change).toMatchObject({ letter: "A", parameter: "corner_speed", toBe: null, change: null });
  });
});

describe("effects", () => {
  const before = check(TEXT);
  const after = check(FASTER);
  const list = effectsOf(before, after);
  const row = (name: string, axis: string | null = "x") =>
    list.find((effect) => effect.quantity === name && effect.axis === axis);

  it("is what moves, in the order of the table, on the axis that was changed and on the machine", () => {
    const names = list.filter(({ axis }) => axis === "x").map((effect) => effect.quantity);
    expect(names.slice(0, 7)).toEqual([
      "torque_margin",
      "ramp_torque_margin",
      "case_c",
      "winding_c",
      "driver_junction_c",
      "step_rate",
      "start_stop_speed",
    ]);
    expect(list.some(({ axis }) => axis === "z")).toBe(false);
    expect(row("bus_voltage_after_braking", null)).toMatchObject({ letters: expect.arrayContaining(["B"]) });
  });

  it("carries the numbers, limits and levels of the two evaluations", () => {
    expect(row("step_rate")).toMatchObject({
      label: "Step rate",
      unit: "Hz",
      was: expect.closeTo(24_000, 6),
      toBe: expect.closeTo(40_000, 6),
      limit: 50_000,
      limitSense: "upper",
      levelWas: "within",
      levelToBe: "within",
      ruleId: "step-rate",
      letters: ["B"],
      missing: [],
    });
    const margin = row("torque_margin");
    expect(margin?.was).toBe(quantity(before, "x", "torque_margin"));
    expect(margin?.toBe).toBe(quantity(after, "x", "torque_margin"));
    expect(margin).toMatchObject({ limitSense: "lower", ruleId: "torque-margin", letters: ["A", "B", "C"] });
    expect(row("case_c")).toMatchObject({ limit: 70, ruleId: "mount-temperature", letters: ["A"] });
    expect(row("driver_junction_c")?.letters).toEqual(["A"]);
  });

  it("holds the start-stop speed against the corner speed", () => {
    const [x] = effectsOf(before, check(edited("x", "corner = 12", "corner = 14"))).filter(
      (effect) => effect.quantity === "start_stop_speed",
    );
    expect(x).toMatchObject({
      was: quantity(before, "x", "start_stop_speed"),
      toBe: quantity(before, "x", "start_stop_speed"),
      limit: expect.closeTo(0.014, 9),
      nearLimit: expect.closeTo(0.014 / 0.8, 9),
      limitSense: "lower",
      letters: ["A"],
      ruleId: "corner-speed",
    });
  });

  it("keeps what cannot be checked on the changed axis in sight, with what is missing", () => {
    const assembly = { ...ASSEMBLY, supply: { voltage_v: 24 } };
    const bus = effectsOf(check(TEXT, { assembly }), check(FASTER, { assembly })).find(
      (effect) => effect.quantity === "bus_voltage_after_braking",
    );
    expect(bus).toMatchObject({ was: null, toBe: null, levelToBe: "cannot", limit: null });
    expect(bus?.missing).toContain("supply.bus_capacitance_uf");
  });

  it("is empty where nothing changed, whatever cannot be checked", () => {
    const bare = { axes: [{ axis: "x" }, { axis: "z" }] };
    expect(effectsOf(before, before)).toEqual([]);
    expect(effectsOf(check(TEXT, { assembly: bare }), check(TEXT, { assembly: bare }))).toEqual([]);
  });

  it("takes the limit from the mount and the start of near from the touch limit that decides the level", () => {
    const assembly = withMount(100);
    const hot = check(edited("x", "amps = 0.85", "amps = 1.05"), { assembly });
    const effect = effectsOf(check(TEXT, { assembly }), hot).find((own) => own.quantity === "case_c");
    expect(effect).toMatchObject({ limit: 90, nearLimit: 60, levelWas: "within", levelToBe: "near" });
    expect(effect?.toBe).toBeCloseTo(64.1, 1);
  });
});

describe("laws of effects", { timeout: 60_000 }, () => {
  const START = edited(
    "x",
    "colour = grey",
    "lower = 0\nupper = 400",
    edited("z", "standby = 1.0   # A", "standby = 80 %", edited("z", "steps_mm = 400", "# steps_mm = 400")),
  );
  const edit = fc.constantFrom<[string, string, string]>(
    ["x", "amps = 0.85", "amps = 1.05"],
    ["x", "standby = 0.5", "standby = 0.3"],
    ["x", "subdivide = 16", "subdivide = 32"],
    ["x", "steps_mm = 80", "steps_mm = 81"],
    ["x", "vmax = 300", "vmax = 500"],
    ["x", "acc = 6000", "acc = 3000"],
    ["x", "corner = 12", "corner = 30"],
    ["x", "upper = 400", "upper = 10"],
    ["z", "amps = 1.2", "amps = 1.0"],
    ["z", "standby = 80", "standby = 30"],
    ["z", "subdivide = 16", "subdivide = 8"],
    ["z", "vmax = 20", "vmax = 90"],
    ["z", "acc = 200", "acc = 20"],
  );
  const before = check(START);

  it("lays every quantity that moves to a change, and gives no letter twice", () => {
    fc.assert(
      fc.property(fc.uniqueArray(edit, { minLength: 1, maxLength: 5 }), (edits) => {
        const text = edits.reduce((own, [axis, was, toBe]) => edited(axis, was, toBe, own), START);
        const after = check(text);
        const changes = parameterChanges(before, after);
        expect(new Set(changes.map(({ letter }) => letter)).size).toBe(edits.length);
        for (const effect of effects({ before, after, changes })) {
          const moved = effect.was !== effect.toBe;
          if (moved) expect(effect.letters.length, effect.quantity).toBeGreaterThan(0);
        }
      }),
      { numRuns: 60 },
    );
  });

  it("gives a lone change the letter of everything it moves", () => {
    fc.assert(
      fc.property(edit, ([axis, was, toBe]) => {
        const after = check(edited(axis, was, toBe, START));
        for (const { name, value, axis: own } of after.quantities) {
          if (value === quantity(before, own, name)) continue;
          const effect = effectsOf(before, after).find((row) => row.quantity === name && row.axis === own);
          expect(effect?.letters, `${name} by ${toBe}`).toEqual(["A"]);
        }
      }),
      { numRuns: 30 },
    );
  });

  it("gives a change no letter at what it cannot move and has no limit for", () => {
    const after = check(
      edited("x", "subdivide = 16", "subdivide = 32", edited("x", "vmax = 300", "vmax = 500", START)),
    );
    const rows = effectsOf(before, after);
    expect(rows.find((row) => row.quantity === "step_rate")?.letters).toEqual(["B"]);
    expect(rows.find((row) => row.quantity === "steps_per_mm_expected")?.letters).toEqual(["A"]);
    expect(rows.find((row) => row.quantity === "full_step_rate")?.letters).toEqual(["B"]);
  });
});
