import { describe, expect, it } from "vitest";
import { assemblyWith, EXAMPLE_TEXT, texts, textsWithout, world } from "./world";
import type { World } from "./world";

function provenance({ result }: World, parameter: "run_current" | "hold_current" = "run_current") {
  const found = result.provenance.find((one) => one.parameter === parameter);
  if (!found) throw new Error(`No provenance of ${parameter}`);
  return found;
}

describe("the provenance of a current", () => {
  it("leads from the number typed over its basis to the winding", () => {
    const { steps, rms, missing } = provenance(
      world(texts({ run_current: { typed: 1130, unit: "mA", factor: 1e-3, basis: "peak" } })),
    );
    expect(steps).toEqual([
      { label: "Run current", text: "1130 mA", from: "gantry.conf line 2" },
      { label: "Basis", text: "peak", from: "text or key table" },
      { label: "In the winding", text: "0.799 A rms", from: "computed" },
    ]);
    expect(rms).toBeCloseTo(1.13 / Math.SQRT2, 12);
    expect(missing).toEqual([]);
  });

  it("leads over the reference voltage and the machine's own sense resistor", () => {
    const { steps, tolerance } = provenance(
      world({ ...textsWithout("run_current"), reference_voltage: { typed: 0.9, unit: "V" } }),
    );
    expect(steps.map(({ label, from }) => [label, from])).toEqual([
      ["Reference voltage", expect.stringContaining("gantry.conf line")],
      ["Sense resistance", "hardware"],
      ["Set-point", "hardware"],
      ["In the winding", "computed"],
    ]);
    expect(steps[2]!.text).toBe("0.9 V / (8 · 0.1 Ω) = 1.125 A peak; / √2 = 0.7955 A rms");
    // 5 % driver, 1 % resistor, and half of the last digit of 0.9 V.
    expect(tolerance).toBeCloseTo(0.05 + 0.01 + 0.05 / 0.9, 12);
  });

  it("says of a driver recorded without a sense resistor that it has none", () => {
    const scaled = assemblyWith((axis) => {
      const registers = { method: "digital_scale", full_scale_v: 0.325, steps: 32 } as const;
      axis.driver!.set_point = { ...registers, internal_resistance_ohm: 0.25, sense_resistance_ohm: 0 };
    });
    const register = { ...textsWithout("run_current"), current_scale: { typed: 15, unit: null } };
    expect(provenance(world(register, scaled)).steps).toContainEqual({
      label: "Sense resistance",
      text: "none",
      from: "hardware",
    });
  });

  it("says that nobody has said the basis, and gives no current", () => {
    const found = provenance(world(texts({ run_current: { typed: 0.8, unit: "A", basis: null } })));
    expect(found.steps).toContainEqual({ label: "Basis", text: "not said", from: "nobody" });
    expect(found).toMatchObject({ rms: null, tolerance: null, missing: ["axes.x.run_current.basis"] });
  });

  it("sets a stated current beside what the text sets", () => {
    const { steps, rms } = provenance(
      world(
        texts({
          run_current: { typed: 0.8, unit: "A", basis: "rms" },
          reference_voltage: { typed: 1, unit: "V" },
        }),
      ),
    );
    expect(steps.find(({ label }) => label === "Current and set-point")!.text).toBe(
      "9.5 % apart: neither is used",
    );
    expect(rms).toBeNull();
  });

  it("leads a hold current in per cent back to the run current", () => {
    const { steps, rms } = provenance(world(), "hold_current");
    expect(steps[1]).toEqual({ label: "Share of", text: "run current, 0.8 A rms", from: "computed" });
    expect(rms).toBeCloseTo(0.4, 12);
  });

  it("knows no tolerance of a current given directly", () => {
    const direct = assemblyWith(
      (axis) => (axis.driver!.set_point = { method: "direct", sense_resistance_ohm: 0.1 }),
    );
    expect(provenance(world(EXAMPLE_TEXT, direct)).tolerance).toBeNull();
  });

  it("takes a register step as exact", () => {
    const assembly = assemblyWith((axis) => {
      axis.driver!.set_point = {
        method: "digital_scale",
        full_scale_v: 0.325,
        internal_resistance_ohm: 0.02,
        steps: 32,
        sense_resistance_ohm: 0.11,
      };
    });
    const text = { ...textsWithout("run_current"), current_scale: { typed: 20, unit: null } };
    expect(provenance(world(text, assembly)).tolerance).toBeCloseTo(0.06, 12);
  });

  it("is there for a run current that the text lacks, and for a hold current only where the text has one", () => {
    const { result } = world(textsWithout("run_current", "hold_current"));
    expect(result.provenance.map(({ parameter }) => parameter)).toEqual(["run_current"]);
    expect(result.provenance[0]).toMatchObject({ rms: null, missing: ["axes.x.run_current"] });
  });
});
