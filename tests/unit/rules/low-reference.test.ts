import { describe, expect, it } from "vitest";
import type { SetPoint } from "@/lib/domain/assembly";
import { assemblyWith, textsWithout, world } from "./world";
import type { Texts } from "./world";

const NO_CURRENT = textsWithout("run_current");

function referred(volts: number, more: Texts = {}, change: (setPoint: SetPoint) => void = () => undefined) {
  const text = { ...NO_CURRENT, reference_voltage: { typed: volts, unit: "V" }, ...more };
  return world(
    text,
    assemblyWith((axis) => change(axis.driver!.set_point!)),
  );
}

describe("a reference voltage", () => {
  it.each([
    [0.9, "within"],
    [0.5, "within"],
    [0.499, "near"],
    [0.1, "near"],
  ] as const)("of %f V is %s", (volts, level) => {
    expect(referred(volts).finding("set-point").level).toBe(level);
  });

  it("below 0.5 V keeps its current, 0.4 V / (8 · 0.1 Ω) / √2, which stays the value", () => {
    const found = referred(0.4);
    const { value, limit, nearLimit, sentence, clearingValue } = found.finding("set-point");
    expect(value).toBeCloseTo(0.5 / Math.SQRT2, 12);
    expect(found.quantity("winding_current_rms")).toBe(value);
    expect([limit, nearLimit, clearingValue]).toEqual([null, null, null]);
    expect(sentence).toContain("A reference voltage of 0.4 V is below 0.5 V");
  });

  it("below 0.5 V is a caution beside a current that agrees, and follows one that does not", () => {
    const stated = (amperes: number): Texts => ({
      run_current: { typed: amperes, unit: "A", basis: "peak" },
    });
    expect(referred(0.4, stated(0.5)).finding("set-point")).toMatchObject({ level: "near", limit: 0.07 });
    const apart = referred(0.4, stated(0.7)).finding("set-point");
    expect(apart.level).toBe("over");
    expect(apart.sentence).toContain("Neither is used");
    expect(apart.sentence).toContain("uncertain");
  });

  it("below 0.5 V counts for a driver with a transconductance too", () => {
    const found = referred(0.4, {}, (setPoint) =>
      Object.assign(setPoint, { method: "transconductance", gain_a_per_v: 1.5, basis: "peak" }),
    );
    expect(found.finding("set-point").level).toBe("near");
  });

  it("does not hide a datum that is missing for the current", () => {
    const found = referred(0.4, {}, (setPoint) => delete setPoint.gain);
    expect(found.finding("set-point")).toMatchObject({
      level: "cannot",
      needs: ["axes.x.driver.set_point.gain"],
    });
  });

  it("is no matter of a driver that sets its current by a register step", () => {
    const found = referred(0.4, { current_scale: { typed: 20, unit: null } }, (setPoint) =>
      Object.assign(setPoint, {
        method: "digital_scale",
        full_scale_v: 0.325,
        internal_resistance_ohm: 0.02,
        steps: 32,
      }),
    );
    expect(found.finding("set-point").level).toBe("within");
  });
});
