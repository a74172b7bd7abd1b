import { describe, expect, it } from "vitest";
import { conservativePullOut } from "@/lib/physics/pull-out";
import { axisModel } from "@/lib/rules/axis-model";
import { assemblyWith, exampleAssembly, EXAMPLE_TEXT, world } from "./world";

const inputOf = (assembly = exampleAssembly()) => world(EXAMPLE_TEXT, assembly).input;

describe("axisModel", () => {
  it("gives the numbers of an axis in SI, its name without regard to case", () => {
    const model = axisModel(inputOf(), "X");
    expect(model).toMatchObject({
      ok: true,
      value: {
        axis: "x",
        kind: "linear",
        motorCount: 1,
        supplyVoltage: 24,
        inductance: 3e-3,
        resistanceAt20: 2.1,
        holdingTorque: 0.45,
        ratedCurrent: 1.5,
        runCurrent: 0.8,
        holdCurrent: 0.4,
        rotorTeeth: 50,
        movingInertia: 0.6,
        friction: 4,
        steadyLoad: 0,
        maxSpeed: 0.3,
        acceleration: 3,
        cornerSpeed: 0.01,
        jerk: null,
        travel: 0.4,
        microsteps: 16,
      },
    });
  });

  it("leads to the same torque as the table of quantities", () => {
    const { quantity, input } = world();
    const model = axisModel(input, "x");
    if (!model.ok) throw new Error(model.reason);
    const { value } = model;
    const torque = conservativePullOut(
      {
        voltage: value.supplyVoltage,
        resistance: value.resistance,
        inductance: value.inductance,
        voltageConstant: value.holdingTorque / (Math.SQRT2 * value.ratedCurrent),
        rotorTeeth: value.rotorTeeth,
        peakCurrent: Math.SQRT2 * Math.min(value.runCurrent, value.ratedCurrent),
      },
      (quantity("peak_speed") ?? Number.NaN) / value.radius,
    );
    expect(torque).toBeCloseTo(quantity("torque_available") ?? Number.NaN, 12);
  });

  it("counts what pulls along the axis with its sign", () => {
    const assembly = assemblyWith((axis) => {
      axis.load = { ...axis.load, incline_deg: 90, external_force_n: -2, counterbalance_n: 1 };
    });
    const model = axisModel(inputOf(assembly), "x");
    expect(model.ok && model.value.steadyLoad).toBeCloseTo(-2 + 0.6 * 9.80665 - 1, 12);
  });

  it("names all that is missing at once, and an axis that is not there", () => {
    const assembly = assemblyWith((axis) => {
      delete axis.motor?.inductance_mh;
      delete axis.load?.friction_n;
    });
    const model = axisModel(inputOf(assembly), "x");
    expect(model.ok ? [] : model.needs).toEqual(
      expect.arrayContaining(["axes.x.motor.inductance_mh", "axes.x.load.friction_n"]),
    );
    expect(axisModel(inputOf(), "q")).toMatchObject({ ok: false, needs: ["axes.q"] });
  });
});
