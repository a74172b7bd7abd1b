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

const RADIUS = 0.04 / (2 * Math.PI);
/** At 100 mm/s the supply does not limit the torque yet. */
const SLOW = texts({ max_speed: { typed: 100, unit: "mm/s", factor: 1e-3 } });
const counted =
  (count: number): Change =>
  (axis) =>
    (axis.motor_count = count);

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

describe("a drive of two axes of which one closes its own loop", () => {
  it.each(["coupled-motors", "coupled-jump"])("is not covered by %s, whichever axis it is", (ruleId) => {
    for (const name of ["x", "y"]) {
      const finding = crossed((axis) => {
        if (axis.axis === name) axis.driver!.feedback = "closed_loop";
      }).finding(ruleId, null);
      expect(finding.level).toBe("cannot");
      expect(finding.needs).toContain(`axes.${name}.driver.feedback`);
      expect(finding.sentence).toContain("Not covered");
    }
  });
});

describe("the motors that two axes share", () => {
  it("are the same ones for both: two counted by each are judged as one counted by each", () => {
    const [one, two] = [crossed(counted(1), SLOW), crossed(counted(2), SLOW)];
    expect(two.quantity("coupled_torque_margin", null)).toBeCloseTo(
      one.quantity("coupled_torque_margin", null)!,
      12,
    );
    expect(two.finding("coupled-jump", null).limit).toBeCloseTo(one.finding("coupled-jump", null).limit!, 12);
  });

  it("carry half as much where two sit on either belt", () => {
    // Each of four: 2 · (4 + 0.6 · 3) N · r/(4 · 0.95) + 54e-7 kg·m² · 6/r; 0.24 N·m at 0.8 A.
    const required = (2 * 5.8 * RADIUS) / (4 * 0.95) + (54e-7 * 6) / RADIUS;
    expect(crossed(counted(4), SLOW).quantity("coupled_torque_margin", null)).toBeCloseTo(
      0.24 / required - 1,
      9,
    );
  });

  it.each([
    ["motor_count", (axis: AxisAssembly) => (axis.motor_count = 2)],
    ["motor.holding_torque_nm", (axis: AxisAssembly) => (axis.motor!.holding_torque_nm = 0.5)],
    ["motor.rated_current_a", (axis: AxisAssembly) => (axis.motor!.rated_current_a = 1.6)],
    ["drive_train.teeth", (axis: AxisAssembly) => (axis.drive_train!.teeth = 16)],
  ])("cannot differ in %s between the axes", (field, change) => {
    const found = crossed(() => undefined, EXAMPLE_TEXT, change);
    for (const ruleId of ["coupled-motors", "coupled-jump"]) {
      const finding = found.finding(ruleId, null);
      expect(finding.level).toBe("cannot");
      expect(finding.needs).toEqual([`axes.x.${field}`, `axes.y.${field}`]);
      expect(finding.sentence).toMatch(/^Axes x and y share their motors, but /);
    }
  });

  it("are an even number where they are more than one", () => {
    expect(crossed(counted(3)).finding("coupled-motors", null).sentence).toContain("an even number, not 3");
  });

  it("give the torque of the axis that drives them weaker", () => {
    const weak: Texts = { ...SLOW, run_current: { typed: 600, unit: "mA", factor: 1e-3, basis: "rms" } };
    const mixed = (first: Texts, second: Texts) => {
      const { assembly, policy } = crossed().input;
      const parameters = [...parametersOf(first, assembly, "x"), ...parametersOf(second, assembly, "y")];
      return worldOf({ parameters, assembly, policy });
    };
    const margin = (found: World) => found.quantity("coupled_torque_margin", null);
    expect(margin(mixed(SLOW, weak))).toBeCloseTo(margin(mixed(weak, weak))!, 12);
    expect(margin(mixed(SLOW, weak))).toBeLessThan(margin(mixed(SLOW, SLOW))!);
    const allowed = (found: World) => found.finding("coupled-jump", null).limit;
    expect(allowed(mixed(SLOW, weak))).toBeCloseTo(allowed(mixed(weak, weak))!, 12);
  });

  it("are counted once in the power of the supply", () => {
    const load = (count: number, coupled = true) =>
      crossed((axis) => {
        axis.motor_count = count;
        if (!coupled) delete axis.coupled_with;
      }).quantity("supply_load", null)!;
    // Whether each axis counts one of the two or both: the same two motors on the same masses.
    expect(load(2)).toBeCloseTo(load(1), 9);
    expect(load(2, false)).toBeGreaterThan(load(2) + 5);
  });

  it("count both rotors where each axis counts one motor: 2 · 54e-7 kg·m² · a · v/r² more at the shafts", () => {
    const load = (coupled: boolean) =>
      crossed((axis) => {
        if (!coupled) delete axis.coupled_with;
      }).quantity("supply_load", null)!;
    expect(load(true) - load(false)).toBeCloseTo((2 * 54e-7 * 3 * 0.3) / RADIUS ** 2 / 0.85, 9);
  });

  it("leave the power of the supply unknown where the axes count them differently", () => {
    const finding = crossed(() => undefined, EXAMPLE_TEXT, counted(2)).finding("supply-power", null);
    expect(finding).toMatchObject({ level: "cannot" });
    expect(finding.needs).toContain("axes.y.motor_count");
  });

  it("store the kinetic energy of v1 + v2 and v1 − v2, as the sum over both axes has it", () => {
    const found = crossed(counted(2));
    const [v1, v2, mass, shaft] = [0.3, 0.3, 0.6, 54e-7];
    const rotors = (0.5 * shaft * ((v1 + v2) ** 2 + (v1 - v2) ** 2)) / RADIUS ** 2;
    const energy = 0.5 * mass * (v1 ** 2 + v2 ** 2) + rotors;
    const after = Math.sqrt((24 * 1.05) ** 2 + (2 * energy) / 1000e-6);
    expect(found.quantity("bus_voltage_after_braking", null)).toBeCloseTo(after, 9);
  });

  it("bring the bus voltage near where only the rotors that nobody counts do", () => {
    // One rotor each, in J: 0.6 · 0.3² / 2 + 54e-7 · (0.3/r)² / 2, twice; the two others bring as much of the second again.
    const rotor = (54e-7 * (0.3 / RADIUS) ** 2) / 2;
    const counted1 = Math.sqrt(25.2 ** 2 + (2 * 2 * (0.027 + rotor)) / 1000e-6);
    const whole = Math.sqrt(counted1 ** 2 + (2 * 2 * rotor) / 1000e-6);
    const stands = (volts: number, count: number) =>
      crossed((axis) => {
        axis.motor_count = count;
        axis.driver!.absolute_max_v = volts;
      }).finding("braking-voltage", null);
    const finding = stands((0.5 * (counted1 + whole)) / 0.9, 1);
    expect(finding).toMatchObject({ level: "near" });
    expect(finding.value).toBeCloseTo(counted1, 9);
    expect(finding.sentence).toContain(`with the rotors of both it is ${Number(whole.toPrecision(4))} V`);
    expect(stands((1.001 * whole) / 0.9, 1).level).toBe("within");
    expect(stands((1.001 * whole) / 0.9, 2).sentence).not.toContain("rotors of both");
  });

  it("are told of on both axes, whichever of them names the other", () => {
    const found = crossed(counted(1));
    for (const [axis, other] of [
      ["x", "y"],
      ["y", "x"],
    ])
      expect(found.finding("torque-margin", axis).sentence).toContain(
        `Its motors move together with those of axis ${other}: when they move at once, one motor turns with the sum of their speeds`,
      );
  });
});
