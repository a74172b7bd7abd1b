import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { NameSplitter } from "@/lib/keytable/split-name";
import { suggestParameters } from "@/lib/keytable/suggest";
import { parseText } from "@/lib/parsers/parse-text";
import { garbage, RUNS, TIMEOUT } from "../parsers/arbitrary-texts";
import { AXES, map } from "./support";

function suggestions(line: string, axes = AXES) {
  const { entries } = parseText({ path: "a.conf", text: line, format: "lines" });
  const { key, raw, value, comment } = entries[0]!;
  return suggestParameters({ key, raw, value, comment, axes });
}

/** "parameter axis unit basis" of the best suggestion. */
function best(line: string): string {
  const [first] = suggestions(line);
  if (!first) return "";
  const { parameter, axis, unit, basis } = first;
  return [parameter, axis, unit, basis].filter((part) => part !== null).join(" ");
}

describe("a name of the trade (common practice, no source)", () => {
  it.each([
    ["axis.x.run_ma = 800", "run_current X mA"],
    ["x.irun = 0.8", "run_current X A"],
    ["motor_current_y = 900", "run_current Y mA"],
    ["rms_current_y = 0.9 A", "run_current Y A rms"],
    ["peakCurrentX = 1.2", "run_current X A peak"],
    ["x.run_ma = 800 ; rms in each winding", "run_current X mA rms"],
    ["axis.x.hold_ma = 300", "hold_current X mA"],
    ["x_ihold = 0.4", "hold_current X A"],
    ["idle_current = 50 %", "hold_current %"],
    ["x.vref_mv = 640", "reference_voltage X mV"],
    ["reference voltage = 0.8 V", "reference_voltage V"],
    ["x.irun_scale = 20", "current_scale X"],
    ["cs = 16", "current_scale"],
    ["ihold_scale = 9", "hold_scale"],
    ["rsense_mohm = 110", "sense_resistance mΩ"],
    ["x.r_sense = 0.11", "sense_resistance X"],
    ["x_usteps = 16", "microsteps X"],
    ["micro_steps.y = 16", "microsteps Y"],
    ["subdivide = 8", "microsteps"],
    ["X_STEPS_PER_MM = 80", "steps_per_mm X 1/mm"],
    ["stepsPerMmY = 80", "steps_per_mm Y 1/mm"],
    ["steps_deg_c = 26", "steps_per_mm C 1/deg"],
    ["pulses_per_mm = 100", "steps_per_mm 1/mm"],
    ["vmax.x = 300", "max_speed X"],
    ["maxspeed = 300", "max_speed"],
    ["max_feedrate_x = 300", "max_speed X"],
    ["x.max_speed = 18000 ; mm/min", "max_speed X mm/min"],
    ["X_MAX_ACCEL = 3000", "acceleration X"],
    ["accelx = 3000", "acceleration X"],
    ["acceleration_y = 2 m/s^2", "acceleration Y m/s²"],
    ["jerk = 40000 mm/s^3", "jerk mm/s³"],
    ["jerk_x = 10", "corner_speed X"],
    ["corner_speed_mm_s = 8", "corner_speed mm/s"],
    ["square_corner_velocity = 5", "corner_speed"],
    ["junction_deviation = 0.02", "corner_deviation"],
    ["x_min = -2", "travel_min X"],
    ["soft_limit_max_x = 300", "travel_max X"],
    ["x.position_max = 300 mm", "travel_max X mm"],
    ["homing_feedrate_x = 20", "reference_run_speed X"],
    ["step_pulse_us = 10", "pulse_width µs"],
    ["step_time_us = 3", "pulse_width µs"],
    ["dir_setup_ns = 200", "direction_setup ns"],
    ["invert_x = true", "direction_reversed X"],
    ["x.reversed = yes", "direction_reversed X"],
    ["interpolate = on", "driver_interpolation"],
    ["standstill_delay_ms = 100", "standstill_delay ms"],
    ["bus_voltage = 36 V", "supply_voltage V"],
    ["max_step_rate = 100 kHz", "max_step_rate kHz"],
  ])("%s suggests %s", (line, suggestion) => expect(best(line)).toBe(suggestion));

  it.each([
    "baud = 115200",
    "version = 3",
    "name = gantry",
    "enabled = true",
    "fan_speed_curve = a, b",
    "probe_offset_x = 1.2",
    "temp_max = 250",
    "accel = fast",
    "run_current = 3 mm",
    "microsteps = 16 mm",
    "invert_x = 7",
  ])("is not seen in %s", (line) => expect(suggestions(line)).toEqual([]));
});

describe("suggestions", () => {
  it(
    "are three at most, best first, each with a score of 0.35 at least and a reason",
    { timeout: TIMEOUT },
    () => {
      const words = fc.constantFrom(
        "run",
        "hold",
        "max",
        "min",
        "speed",
        "accel",
        "jerk",
        "step",
        "pulse",
        "x",
        "ma",
        "mm",
        "rate",
        "home",
        "zzz",
      );
      const key = fc.array(words, { minLength: 1, maxLength: 5 }).map((parts) => parts.join("_"));
      fc.assert(
        fc.property(key, fc.constantFrom("1", "800", "3 mm/s", "true", "80, 80"), (name, raw) => {
          const found = suggestions(`${name} = ${raw}`);
          expect(found.length).toBeLessThanOrEqual(3);
          const scores = found.map(({ score }) => score);
          expect(scores).toEqual([...scores].sort((a, b) => b - a));
          for (const { score, reason } of found) {
            expect(score).toBeGreaterThanOrEqual(0.35);
            expect(score).toBeLessThan(1);
            expect(reason).toMatch(/^The name says “.*\.$/);
          }
        }),
        RUNS,
      );
    },
  );

  it("say why", () => {
    expect(suggestions("axis.x.run_ma = 800")[0]?.reason).toBe(
      "The name says “run” and “ma”, the name ends in “ma” and its size is usual.",
    );
    expect(suggestions("vmax = 300 mm/s")[0]?.reason).toContain("the value has the unit mm/s");
    expect(suggestions("vmax = 300 # mm/s")[0]?.reason).toContain("the comment says “mm/s”");
  });

  it("weigh the size of the value", () => {
    const usual = suggestions("x.run_current = 0.8 A")[0]!.score;
    const unusual = suggestions("x.run_current = 800 A")[0]!.score;
    expect(usual - unusual).toBeGreaterThan(0.15);
  });

  it("name the only axis of a machine that has one", () => {
    expect(suggestions("accel = 3000", AXES.slice(0, 1))[0]?.axis).toBe("X");
    expect(suggestions("accel = 3000")[0]?.axis).toBeNull();
  });

  it("for a list look at its first element", () => {
    expect(best("max_accel = 3000, 3000")).toBe("acceleration");
  });

  it("of a mapping are worked out once, and stay when it is copied or sent", () => {
    const [row] = map({ text: "x.accel = 3000", rules: [] }).unmapped;
    expect(row?.suggestions).toBe(row?.suggestions);
    expect(structuredClone(row)?.suggestions[0]?.parameter).toBe("acceleration");
    expect({ ...row }.suggestions?.[0]?.parameter).toBe("acceleration");
    expect(JSON.stringify(row)).toContain('"acceleration"');
  });

  it("throw on no key, and are none for names without a word of the trade", { timeout: TIMEOUT }, () => {
    fc.assert(
      fc.property(garbage, (key) => {
        suggestParameters({
          key,
          raw: "1",
          value: { kind: "number", value: 1, unit: null },
          comment: key,
          axes: AXES,
        });
      }),
      RUNS,
    );
    expect(suggestions("__proto__ = 1")).toEqual([]);
    expect(suggestions("constructor = 1")).toEqual([]);
  });
});

describe("a name", () => {
  it.each([
    ["axis.x.run_mA", ["axis", "x", "run", "ma"]],
    ["XMaxSpeed2", ["x", "max", "speed", "2"]],
    ["stepsPerMM", ["steps", "per", "mm"]],
    ["maxspeed", ["max", "speed"]],
    ["yaccel", ["y", "accel"]],
    ["unknownword", ["unknownword"]],
    ["Max speed (mm/s)", ["max", "speed", "mm", "s"]],
    ["", []],
  ])("%s has the words %j", (name, words) => expect(new NameSplitter(["x", "y"]).split(name)).toEqual(words));

  it("keeps an axis that is named with a number", () => {
    expect(new NameSplitter(["e0", "z2"]).split("accel_e0.Z2_max")).toEqual(["accel", "e0", "z2", "max"]);
  });
});
