import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { driverSteadyState, switchingLoss } from "@/lib/physics/driver-heat";
import { windingPower, windingSteadyState } from "@/lib/physics/motor-heat";

const watts = fc.double({ min: 0, max: 3, noNaN: true });

describe("the driver's steady state", () => {
  const settled = (conduction: number, thermalResistance: number, ambient = 40) =>
    driverSteadyState({ conduction, conductionAt: 25, constant: 0.2, thermalResistance, ambient });

  it("balances: Tj = Ta + R_th·P with P at that Tj", () => {
    fc.assert(
      fc.property(watts, fc.double({ min: 0, max: 60, noNaN: true }), (conduction, thermalResistance) => {
        const found = settled(conduction, thermalResistance)!;
        const power = conduction * (1 + 0.005 * (found.junction - 25)) + 0.2;
        expect(found.power).toBeCloseTo(power, 9);
        expect(found.junction).toBeCloseTo(40 + thermalResistance * power, 6);
      }),
      { seed: 4 },
    );
  });

  it("does not exist from R_th·P0·0.005 = 1 on", () => {
    expect(settled(4, 49)).not.toBeNull();
    expect(settled(4, 50)).toBeNull();
  });

  it("has the loss of its edges: 2 · 24 V · (2/π) · 2 A · 100 ns · 40 kHz", () => {
    const loss = switchingLoss({ voltage: 24, peakCurrent: 2, edge: 100e-9, frequency: 40e3 });
    expect(loss).toBeCloseTo(0.24446, 5);
  });
});

describe("the motor's steady state", () => {
  it("balances: T = Ta + R_th·P with P at that T", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 1.5, noNaN: true }),
        fc.double({ min: -20, max: 60, noNaN: true }),
        (current, ambient) => {
          const settled = windingSteadyState({
            current,
            resistanceAt20: 2.1,
            thermalResistance: 8.5,
            ambient,
          })!;
          const power = windingPower({ current, resistanceAt20: 2.1, temperature: settled.temperature });
          expect(settled.temperature).toBeCloseTo(ambient + 8.5 * power, 6);
          expect(settled.power).toBe(power);
        },
      ),
      { seed: 4 },
    );
  });

  it("does not exist from R_th·2·I²·R20 = 254.5 K on", () => {
    const at = (thermalResistance: number) =>
      windingSteadyState({ current: 1, resistanceAt20: 1, thermalResistance, ambient: 20 });
    expect(at(127)).not.toBeNull();
    expect(at(127.25)).toBeNull();
  });
});
