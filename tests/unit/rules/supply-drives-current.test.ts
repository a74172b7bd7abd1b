import { describe, expect, it } from "vitest";
import { assemblyWith, EXAMPLE_TEXT, texts, world } from "./world";

/** 0.8 A rms through the hot winding of the example: its settled temperature by hand, 35 °C + 8.5 K/W · P(T). */
const RISE = 8.5 * 2 * 0.8 ** 2 * 2.1;
const WINDING = (35 + (RISE * 234.5) / 254.5) / (1 - RISE / 254.5);
const DROP = Math.SQRT2 * 0.8 * ((2.1 * (234.5 + WINDING)) / 254.5 + 0.25 + 0.1);

const supplied = (voltage: number) =>
  world(
    EXAMPLE_TEXT,
    assemblyWith((_axis, machine) => (machine.supply!.voltage_v = voltage)),
  );

describe("the current that the supply can drive at standstill", () => {
  it.each([
    ["more than 1.25 times the drop", 1.251, "within"],
    ["less than 1.25 times the drop", 1.249, "near"],
    ["just the drop", 1.001, "near"],
    ["less than the drop", 0.999, "over"],
  ] as const)("%s", (_words, share, level) => {
    expect(supplied(share * DROP).finding("supply-drives-current").level).toBe(level);
  });

  it("is named, V/(√2·R), where it is less than the text's, and a lower run current clears it", () => {
    const found = supplied(0.9 * DROP).finding("supply-drives-current");
    expect(found.value).toBe(0.8);
    expect(found.limit).toBeCloseTo(0.72, 9);
    expect(found.sentence).toContain("drive 0.72 A rms at most");
    expect(found.clearingValue!.parameter).toBe("run_current");
    // A little more than 0.72 A: less current leaves the winding cooler.
    expect(found.clearingValue!.value).toBeGreaterThan(0.72);
    expect(found.clearingValue!.value).toBeLessThan(0.8);
    const text = texts({ run_current: { typed: found.clearingValue!.value, unit: "A", basis: "rms" } });
    const after = world(text, supplied(0.9 * DROP).input.assembly).finding("supply-drives-current");
    expect(after.level).toBe("near");
  });

  it("is reckoned at 20 °C where the winding's temperature cannot be known, and says so", () => {
    const found = world(
      EXAMPLE_TEXT,
      assemblyWith((axis) => delete axis.motor!.winding_to_ambient_k_per_w),
    ).finding("supply-drives-current");
    expect(found.limit).toBeCloseTo(24 / (Math.SQRT2 * 2.45), 9);
    expect(found.assumed).toEqual(["axes.x.motor.winding_to_ambient_k_per_w"]);
  });

  it("is not covered where a drive sets its current itself", () => {
    const closed = world(
      EXAMPLE_TEXT,
      assemblyWith((axis) => (axis.driver!.feedback = "closed_loop")),
    );
    expect(closed.finding("supply-drives-current").needs).toEqual(["axes.x.driver.feedback"]);
  });
});
