import { describe, expect, it } from "vitest";
import type { Assembly, AxisAssembly } from "@/lib/domain/assembly";
import { DEFAULT_POLICY } from "@/lib/domain/policy";
import { EXAMPLE_TEXT, exampleAssembly, exampleAxis, parametersOf, texts, worldOf } from "./world";
import type { Texts, World } from "./world";

type Change = (axis: AxisAssembly, assembly: Assembly) => void;

/** Two equal axes on crossed belts; `change` is for both, `second` for y alone. */
function crossed(change: Change = () => undefined, text: Texts = EXAMPLE_TEXT, second?: Change): World {
  const assembly: Assembly = { ...exampleAssembly(), axes: [exampleAxis("x"), exampleAxis("y")] };
  assembly.axes[0]!.coupled_with = ["Y"];
  for (const axis of assembly.axes) change(axis, assembly);
  second?.(assembly.axes[1]!, assembly);
  const parameters = ["x", "y"].flatMap((axis) => parametersOf(text, assembly, axis));
  return worldOf({ parameters, assembly, policy: DEFAULT_POLICY });
}

const STRONG: Texts = {
  run_current: { typed: 1.2, unit: "A", basis: "rms" },
  corner_speed: { typed: 60, unit: "mm/s", factor: 1e-3 },
};

describe("the jump of shared motors on a weak supply", () => {
  const weak: Change = (axis, { supply }) => {
    supply!.voltage_v = 8;
    Object.assign(axis.motor!, { inductance_mh: 12, resistance_ohm: 3, rotor_inertia_gcm2: 10 });
    Object.assign(axis.load!, { mass_kg: 0.05, friction_n: 0.5 });
  };

  // By hand, at 1.2 A with the winding at its limit of 130 °C: R = 3 · 364.5/254.5 + 0.35 = 4.647 Ω, J = 2.0132e-6 kg·m²,
  // T_L = 3.3506 mN·m. 0.36 N·m of holding torque would catch 59.4 rad/s, where 8 V leave a pull-out of 37.62 mN·m: that
  // catches 17.97 rad/s. Both axes jump by 60 mm/s: 0.12/0.006366 = 18.85 rad/s.
  it("is held to the pull-out torque above the voltage-limit speed", () => {
    const finding = crossed(weak, texts(STRONG)).finding("coupled-jump", null);
    expect(finding.level).toBe("over");
    expect(finding.value).toBeCloseTo(18.85, 2);
    expect(finding.limit).toBeCloseTo(17.97, 2);
    expect(finding.parameters).toEqual(["corner_speed", "run_current"]);
  });

  it("follows more from a supply that does not limit it", () => {
    const strong: Change = (axis, assembly) => {
      weak(axis, assembly);
      assembly.supply!.voltage_v = 24;
    };
    expect(crossed(strong, texts(STRONG)).finding("coupled-jump", null).limit).toBeGreaterThan(18.85);
  });

  it("cannot be checked without the winding's inductance", () => {
    const finding = crossed((axis) => delete axis.motor!.inductance_mh).finding("coupled-jump", null);
    expect(finding).toMatchObject({ level: "cannot" });
    expect(finding.needs).toContain("axes.x.motor.inductance_mh");
  });
});
