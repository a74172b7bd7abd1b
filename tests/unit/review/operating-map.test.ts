import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Assembly } from "@/lib/domain/assembly";
import type { Policy } from "@/lib/domain/policy";
import { mapMoves, operatingMap } from "@/lib/review/operating-map";
import type { OperatingMap, OperatingSide } from "@/lib/review/operating-map";
import { ruleContext } from "@/lib/rules/view";
import { assemblyWith, exampleAssembly, EXAMPLE_TEXT, texts, textsWithout, world } from "../rules/world";
import type { Texts } from "../rules/world";

const contextOf = (text: Texts, assembly: Assembly = exampleAssembly(), policy: Partial<Policy> = {}) =>
  ruleContext(world(text, assembly, policy).input);

function side(map: OperatingMap): OperatingSide {
  if (!map.toBe.ok) throw new Error(map.toBe.sentence);
  return map.toBe;
}

const mapOf = (text: Texts, assembly?: Assembly, policy?: Partial<Policy>) =>
  operatingMap({ axis: "X", was: null, toBe: contextOf(text, assembly, policy) });

const speedOf = (mm: number) => ({ typed: mm, unit: "mm/s", factor: 1e-3 });
const accelerationOf = (mm: number) => ({ typed: mm, unit: "mm/s^2", factor: 1e-3 });

describe("the operating map", () => {
  it("has its boundary exactly where the check of the torque margin turns over", () => {
    // Long enough that the speed is reached on the whole way.
    const assembly = assemblyWith((axis) => (axis.travel_mm = 1e7));
    const map = mapOf(texts({ max_speed: speedOf(2500) }), assembly);
    const { boundary } = side(map);
    for (const index of [10, 60, 120, map.speeds.length - 1]) {
      const speed = (map.speeds[index] ?? 0) * 1000;
      const most = (boundary[index] ?? 0) * 1000;
      if (most === 0) continue;
      const levelAt = (acceleration: number) =>
        world(
          texts({ max_speed: speedOf(speed), acceleration: accelerationOf(acceleration) }),
          assembly,
        ).finding("torque-margin").level;
      expect(levelAt(most * 0.9999), `${speed} mm/s`).not.toBe("over");
      expect(levelAt(most * 1.0001), `${speed} mm/s`).toBe("over");
    }
  });

  it("falls at the voltage-limit speed by the step of the policy's margins", () => {
    const map = mapOf(EXAMPLE_TEXT);
    const { limitSpeed, boundary } = side(map);
    const at = map.speeds.indexOf(limitSpeed);
    expect(at).toBeGreaterThan(0);
    expect(boundary[at + 1]).toBeLessThan(0.8 * (boundary[at] ?? 0));
    const even = mapOf(EXAMPLE_TEXT, exampleAssembly(), { torque_margin_above_limit_speed: 0.5 });
    const same = side(even).boundary;
    expect(same[at + 1]).toBeCloseTo(same[at] ?? 0, 3);
  });

  it("puts the point at the speed that the travel lets it reach, with margin and level of the check", () => {
    const text = texts({ max_speed: speedOf(2000) });
    const { point } = side(mapOf(text));
    const { quantity, finding } = world(text);
    expect(point?.speed).toBeCloseTo(Math.sqrt(3 * 0.4), 12);
    expect(point?.setSpeed).toBe(2);
    expect(point?.margin).toBeCloseTo(quantity("torque_margin") ?? Number.NaN, 12);
    expect(point?.level).toBe(finding("torque-margin").level);
  });

  it("holds point and boundary within its scales", () => {
    const number = (low: number, high: number) => fc.double({ min: low, max: high, noNaN: true });
    fc.assert(
      fc.property(number(1, 5000), number(10, 1e5), number(100, 2500), (speed, acceleration, current) => {
        const map = mapOf(
          texts({
            max_speed: speedOf(speed),
            acceleration: accelerationOf(acceleration),
            run_current: { typed: current, unit: "mA", factor: 1e-3, basis: "rms" },
          }),
        );
        const { point, boundary, pullOut } = side(map);
        expect(point?.speed).toBeLessThanOrEqual(map.speedEnd);
        expect(point?.acceleration).toBeLessThanOrEqual(map.accelerationEnd);
        boundary.forEach((value, index) => {
          expect(Number.isFinite(value) && value >= 0).toBe(true);
          expect(value).toBeLessThanOrEqual(pullOut[index] ?? 0);
        });
      }),
      { numRuns: 100, seed: 7 },
    );
  });

  it("draws was and to be on one grid, and tells whether anything moves", () => {
    const was = contextOf(EXAMPLE_TEXT);
    const faster = operatingMap({
      axis: "x",
      was,
      toBe: contextOf(texts({ acceleration: accelerationOf(9000) })),
    });
    expect(faster.was?.ok && faster.was.boundary.length).toBe(faster.speeds.length);
    expect(mapMoves(faster)).toBe(true);
    const corner = operatingMap({ axis: "x", was, toBe: contextOf(texts({ corner_speed: speedOf(5) })) });
    expect(mapMoves(corner)).toBe(false);
  });

  it("draws the boundary without a point where the text lacks the acceleration, and says so", () => {
    const { point, pointMissing, boundary } = side(mapOf(textsWithout("acceleration")));
    expect(point).toBeNull();
    expect(pointMissing).toContain("acceleration");
    expect(boundary[0]).toBeGreaterThan(0);
  });

  it("names what is missing for it", () => {
    const assembly = assemblyWith((axis) => {
      delete axis.motor?.inductance_mh;
      delete axis.load?.friction_n;
    });
    expect(mapOf(EXAMPLE_TEXT, assembly).toBe).toEqual({
      ok: false,
      sentence: "Not known: the motor's winding inductance, the load's friction force.",
    });
    const other = operatingMap({ axis: "q", was: null, toBe: contextOf(EXAMPLE_TEXT) });
    expect(other.toBe).toEqual({ ok: false, sentence: "Nothing is known of the hardware of axis q." });
  });
});
