import { describe, expect, it } from "vitest";
import { CONTINUOUS, temperatureCourse } from "@/lib/review/temperature-course";
import type { DutyCycle, HeatedPart, TemperatureCourse } from "@/lib/review/temperature-course";
import type { Assembly } from "@/lib/domain/assembly";
import { ruleContext } from "@/lib/rules/view";
import { assemblyWith, exampleAssembly, EXAMPLE_TEXT, texts, textsWithout, world } from "../rules/world";
import type { Texts } from "../rules/world";

function courseOf(
  text: Texts = EXAMPLE_TEXT,
  duty: DutyCycle = CONTINUOUS,
  assembly: Assembly = exampleAssembly(),
): TemperatureCourse {
  return temperatureCourse({ axis: "x", was: null, toBe: ruleContext(world(text, assembly).input), duty });
}

function part(course: TemperatureCourse, name: HeatedPart) {
  if (!course.toBe.ok) throw new Error(course.toBe.sentence);
  return course.toBe.parts.find((one) => one.part === name)!;
}

describe("the temperature course", () => {
  it("starts at the ambient and settles where the checks say, with their levels and limits", () => {
    const { quantity, finding } = world();
    const course = courseOf();
    const winding = part(course, "winding");
    const motorCase = part(course, "case");
    const junction = part(course, "junction");
    expect(winding.temperatures[0]).toBe(35);
    expect(winding.settled).toBeCloseTo(quantity("winding_c") ?? Number.NaN, 12);
    expect(motorCase.settled).toBeCloseTo(quantity("case_c") ?? Number.NaN, 12);
    expect(junction.settled).toBeCloseTo(quantity("driver_junction_c") ?? Number.NaN, 12);
    expect(winding.limit).toBe(120);
    expect(winding.level).toBe(finding("winding-temperature").level);
    expect(motorCase.level).toBe(finding("mount-temperature").level);
    expect(junction.level).toBe(finding("driver-junction").level);
    // Five time constants: 1 − e⁻⁵ of the rise.
    const rise = (winding.temperatures.at(-1) ?? 0) - 35;
    expect(rise / ((winding.settled ?? 0) - 35)).toBeCloseTo(1 - Math.exp(-5), 12);
  });

  it("says when the limit is passed", () => {
    const course = courseOf();
    const { passesLimit, limit, temperatures } = part(course, "case");
    expect(limit).toBe(50);
    const index = course.times.findIndex((time) => time >= (passesLimit ?? Infinity));
    expect(temperatures[index]).toBeGreaterThanOrEqual(50);
    expect(temperatures[index - 1]).toBeLessThan(50);
    expect(part(course, "winding").passesLimit).toBeNull();
  });

  it("heats less the less it moves, down to the hold current", () => {
    const settledAt = (share: number) =>
      part(courseOf(EXAMPLE_TEXT, { share, span: null }), "winding").settled;
    const shares = [0, 0.25, 0.5, 0.75, 1].map((share) => settledAt(share) ?? Number.NaN);
    expect(shares).toEqual([...shares].sort((one, other) => one - other));
    const held = texts({ run_current: { typed: 400, unit: "mA", factor: 1e-3, basis: "rms" } });
    expect(shares[0]).toBeCloseTo(world(held).quantity("winding_c") ?? Number.NaN, 9);
  });

  it("needs the hold current only where the axis stands at all", () => {
    const text = textsWithout("hold_current");
    expect(courseOf(text).toBe.ok).toBe(true);
    expect(courseOf(text, { share: 0.5, span: null }).toBe).toMatchObject({
      ok: false,
      sentence: "Not in the text: hold current.",
    });
  });

  it("draws the settled values alone where the time constant is not known, and says so", () => {
    const assembly = assemblyWith((axis) => delete axis.motor?.thermal_time_constant_s);
    const winding = part(courseOf(EXAMPLE_TEXT, CONTINUOUS, assembly), "winding");
    expect(winding.temperatures).toEqual([]);
    expect(winding.settled).toBeGreaterThan(35);
    expect(winding.note).toBe("Not known: the motor's thermal time constant.");
  });

  it("names what is missing for one part and draws the others", () => {
    const assembly = assemblyWith((axis) => {
      delete axis.motor?.case_to_ambient_k_per_w;
      delete axis.mount;
    });
    const course = courseOf(EXAMPLE_TEXT, CONTINUOUS, assembly);
    expect(part(course, "case")).toMatchObject({
      settled: null,
      level: "cannot",
      note: "Not known: the motor's thermal resistance (case to ambient).",
    });
    expect(part(course, "winding").temperatures.length).toBe(course.times.length);
  });

  it("calls a motor that never settles over limit", () => {
    const text = texts({ run_current: { typed: 5, unit: "A", basis: "rms" } });
    const winding = part(courseOf(text), "winding");
    expect(winding).toMatchObject({ settled: null, level: "over" });
    expect(winding.note).toMatch(/never settles/);
  });
});
