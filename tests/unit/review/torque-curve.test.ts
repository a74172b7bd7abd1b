import { describe, expect, it } from "vitest";
import { torqueCurve } from "@/lib/review/torque-curve";
import type { TorqueCurve, TorqueSide } from "@/lib/review/torque-curve";
import { ruleContext } from "@/lib/rules/view";
import { assemblyWith, EXAMPLE_TEXT, texts, textsWithout, world } from "../rules/world";
import type { Texts } from "../rules/world";

const curveOf = (text: Texts): TorqueCurve =>
  torqueCurve({ axis: "x", was: null, toBe: ruleContext(world(text).input) });

function side(curve: TorqueCurve): TorqueSide {
  if (!curve.toBe.ok) throw new Error(curve.toBe.sentence);
  return curve.toBe;
}

const jerk = (mm: number) => ({ typed: mm, unit: "mm/s^3", factor: 1e-3 });

describe("the torque curve", () => {
  it("meets the quantities of the checks at the peak speed", () => {
    const curve = curveOf(EXAMPLE_TEXT);
    const { quantity } = world();
    const at = curve.speeds.indexOf(side(curve).peak ?? -1);
    expect(at).toBeGreaterThan(0);
    expect(side(curve).available[at]).toBeCloseTo(quantity("torque_available") ?? Number.NaN, 12);
    expect(side(curve).required[at]).toBeCloseTo(quantity("torque_required") ?? Number.NaN, 12);
    expect(side(curve).required[at + 1]).toBeNull();
  });

  it("shows the weakest place of the ramp as its check has it", () => {
    const text = texts({ jerk: jerk(60_000), max_speed: { typed: 900, unit: "mm/s", factor: 1e-3 } });
    const { weakest } = side(curveOf(text));
    const { quantity, finding } = world(text);
    expect(weakest?.margin).toBeCloseTo(quantity("ramp_torque_margin") ?? Number.NaN, 12);
    expect(weakest?.level).toBe(finding("ramp-torque-margin").level);
  });

  it("asks the load alone at both ends of a jerk-limited ramp, and the whole acceleration between", () => {
    const curve = curveOf(texts({ jerk: jerk(1_000_000) }));
    const { required, load, peak } = side(curve);
    const full = world().quantity("torque_required") ?? Number.NaN;
    expect(required[0]).toBeCloseTo(load, 12);
    expect(required[curve.speeds.indexOf(peak ?? -1)]).toBeCloseTo(load, 12);
    expect(Math.max(...required.map((value) => value ?? 0))).toBeCloseTo(full, 12);
  });

  it("keeps expected above conservative above allowed, all within its scales", () => {
    const curve = curveOf(texts({ max_speed: { typed: 3000, unit: "mm/s", factor: 1e-3 } }));
    const { available, expected, allowed } = side(curve);
    available.forEach((torque, index) => {
      expect(expected[index]).toBeGreaterThanOrEqual(torque * (1 - 1e-12));
      expect(allowed[index]).toBeLessThanOrEqual(torque / 1.5 + 1e-12);
      expect(expected[index]).toBeLessThanOrEqual(curve.torqueEnd);
    });
    expect(Math.max(...curve.speeds)).toBe(curve.speedEnd);
  });

  it("draws what the motor can give where the text lacks the move, and names what is missing for it", () => {
    const { required, rampMissing, available } = side(curveOf(textsWithout("max_speed")));
    expect(required).toEqual([]);
    expect(rampMissing).toBe("Not in the text: maximum speed.");
    expect(available[0]).toBeGreaterThan(0);
  });

  it("names the hardware that is missing", () => {
    const assembly = assemblyWith((axis) => delete axis.motor?.holding_torque_nm);
    const { toBe } = torqueCurve({
      axis: "x",
      was: null,
      toBe: ruleContext(world(EXAMPLE_TEXT, assembly).input),
    });
    expect(toBe).toEqual({ ok: false, sentence: "Not known: the motor's holding torque." });
  });
});
