import { describe, expect, it } from "vitest";
import { texts, world } from "./world";

const RESONANCE = world().quantity("resonance_hz")!;

/** A reference run at a full-step rate, Hz: 200 steps for each 40 mm, 0.2 mm for each step. */
const seeking = (hertz: number) =>
  world(texts({ reference_run_speed: { typed: hertz * 0.2, unit: "mm/s", factor: 1e-3 } }));

describe("a reference run that dwells on the rotor's resonance", () => {
  it("is far from it in the cruise of the example: 1500 Hz of full steps", () => {
    expect(world().quantity("full_step_rate")).toBeCloseTo(1500, 9);
    expect(1500 / RESONANCE).toBeGreaterThan(1.2);
    expect(world().finding("resonance").level).toBe("within");
  });

  it.each([
    ["the resonance", 1, "near"],
    ["20 % above it", 1.2, "near"],
    ["more than 20 % above it", 1.201, "within"],
    ["between it and half of it", 0.7, "within"],
    ["half of it", 0.5, "near"],
    ["far below", 0.399, "within"],
  ] as const)("at %s", (_words, share, level) => {
    expect(seeking(share * RESONANCE).finding("resonance").level).toBe(level);
  });

  it("is named by its speed and its line, and leaves value and quantity to the cruise", () => {
    const found = seeking(RESONANCE);
    const { sentence, value, parameters } = found.finding("resonance");
    const millimetres = Number((RESONANCE * 0.2).toPrecision(4));
    expect(sentence).toContain(`At ${millimetres} mm/s the axis dwells`);
    expect(sentence).not.toContain("At 300 mm/s");
    expect(value).toBeCloseTo(1500, 9);
    expect(found.quantity("full_step_rate")).toBe(value);
    expect(parameters).toContain("reference_run_speed");
  });

  it("is told beside a cruise that dwells there too", () => {
    const both = world(
      texts({
        max_speed: { typed: RESONANCE * 0.2, unit: "mm/s", factor: 1e-3 },
        reference_run_speed: { typed: RESONANCE * 0.1, unit: "mm/s", factor: 1e-3 },
      }),
    ).finding("resonance");
    expect(both.sentence).toMatch(/its resonance at .* half its resonance at/);
  });
});
