import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  conservativePullOut,
  expectedPullOut,
  voltageConstant,
  voltageLimitSpeed,
} from "@/lib/physics/pull-out";
import type { DrivenMotor } from "@/lib/physics/pull-out";

/** Three invented motors: A rms, Ω, H, N·m. */
const MOTORS = {
  "17-size": { rated: 1.5, resistance: 2.1, inductance: 3e-3, holding: 0.45 },
  "23-size": { rated: 2.8, resistance: 1.1, inductance: 3.6e-3, holding: 1.9 },
  "11-size": { rated: 0.67, resistance: 5.6, inductance: 4e-3, holding: 0.1 },
} as const;

function driven(size: keyof typeof MOTORS, voltage: number, share = 1): DrivenMotor {
  const { rated, resistance, inductance, holding } = MOTORS[size];
  return {
    voltage,
    resistance,
    inductance,
    voltageConstant: voltageConstant(holding, rated),
    rotorTeeth: 50,
    peakCurrent: Math.SQRT2 * rated * share,
  };
}

const rpm = (value: number) => (value * 2 * Math.PI) / 60;

describe("the conservative pull-out torque", () => {
  // Conservative closed form and time-domain simulation of the phase equations, both derived; N·m at 1.5 and 3 times
  // the voltage-limit speed.
  it.each([
    ["17-size", 12, 335, 0.346, 0.395],
    ["17-size", 12, 670, 0.18, 0.237],
    ["17-size", 24, 796, 0.353, 0.391],
    ["17-size", 24, 1591, 0.178, 0.228],
    ["17-size", 48, 1700, 0.356, 0.39],
    ["17-size", 48, 3400, 0.179, 0.225],
    ["23-size", 12, 150, 1.464, 1.668],
    ["23-size", 24, 355, 1.492, 1.651],
    ["23-size", 24, 710, 0.753, 0.966],
    ["23-size", 48, 757, 1.507, 1.649],
    ["11-size", 12, 560, 0.076, 0.089],
    ["11-size", 24, 1385, 0.075, 0.087],
    ["11-size", 48, 5969, 0.038, 0.047],
  ] as const)(
    "of the %s on %i V at %i rpm is %f N·m, below the simulated %f",
    (size, volts, speed, torque, simulated) => {
      const found = conservativePullOut(driven(size, volts), rpm(speed));
      expect(Math.abs(found - torque)).toBeLessThan(0.01 * torque + 0.0005);
      expect(found).toBeLessThan(simulated);
    },
  );

  it("is the holding torque at the set current up to the voltage-limit speed, and continuous there", () => {
    const motor = driven("17-size", 24, 0.6);
    const limit = voltageLimitSpeed(motor);
    expect(conservativePullOut(motor, 0)).toBeCloseTo(0.27, 12);
    expect(conservativePullOut(motor, limit * 0.999)).toBeCloseTo(0.27, 12);
    expect(conservativePullOut(motor, limit * 1.001)).toBeCloseTo(0.27, 2);
  });

  it("is what the voltage alone can drive where R·I_pk exceeds it", () => {
    const starved = driven("17-size", 3);
    expect(voltageLimitSpeed(starved)).toBe(0);
    expect(conservativePullOut(starved, 0)).toBeCloseTo((starved.voltageConstant * 3) / 2.1, 12);
  });

  it("vanishes where the generated voltage leaves nothing within the current limit", () => {
    expect(conservativePullOut(driven("23-size", 12, 0.1), rpm(3000))).toBe(0);
  });

  it("never grows with speed, and never exceeds the current limit", () => {
    const speed = fc.double({ min: 0, max: 2000, noNaN: true });
    const share = fc.double({ min: 0.05, max: 1, noNaN: true });
    fc.assert(
      fc.property(speed, speed, share, fc.constantFrom(12, 24, 48), (one, other, part, volts) => {
        const motor = driven("17-size", volts, part);
        const slow = conservativePullOut(motor, Math.min(one, other));
        const fast = conservativePullOut(motor, Math.max(one, other));
        expect(fast).toBeLessThanOrEqual(slow * (1 + 1e-9));
        expect(slow).toBeLessThanOrEqual(motor.voltageConstant * motor.peakCurrent * (1 + 1e-12));
      }),
      { numRuns: 500, seed: 2 },
    );
  });
});

describe("the voltage-limit speed", () => {
  it("solves (Ke² + Nr²·L²·I_pk²)·ω² + 2·R·I_pk·Ke·ω + R²·I_pk² = V²", () => {
    for (const volts of [12, 24, 48]) {
      const motor = driven("23-size", volts);
      const w = voltageLimitSpeed(motor);
      const asked = Math.hypot(
        motor.resistance * motor.peakCurrent + motor.voltageConstant * w,
        50 * w * motor.inductance * motor.peakCurrent,
      );
      expect(asked).toBeCloseTo(volts, 10);
    }
  });

  it("is V/Ke without current: the generated voltage alone reaches the supply", () => {
    expect(voltageLimitSpeed(driven("17-size", 24, 0))).toBeCloseTo(24 / voltageConstant(0.45, 1.5), 9);
  });
});

describe("the expected pull-out torque", () => {
  // Closed form and time-domain simulation of the phase equations at a fixed load angle, both derived; N·m at 1.5 and 3
  // times the voltage-limit speed, rounded as listed.
  const TABLE = [
    ["17-size", 12, 1.5, 0.404, 0.395],
    ["17-size", 12, 3, 0.234, 0.237],
    ["17-size", 24, 1.5, 0.399, 0.391],
    ["17-size", 24, 3, 0.225, 0.228],
    ["17-size", 48, 1.5, 0.399, 0.39],
    ["17-size", 48, 3, 0.223, 0.225],
    ["23-size", 12, 1.5, 1.704, 1.668],
    ["23-size", 12, 3, 0.989, 1.001],
    ["23-size", 24, 1.5, 1.688, 1.651],
    ["23-size", 24, 3, 0.951, 0.966],
    ["23-size", 48, 1.5, 1.686, 1.649],
    ["23-size", 48, 3, 0.943, 0.957],
    ["11-size", 12, 1.5, 0.089, 0.089],
    ["11-size", 12, 3, 0.052, 0.053],
    ["11-size", 24, 1.5, 0.087, 0.087],
    ["11-size", 24, 3, 0.048, 0.049],
    ["11-size", 48, 1.5, 0.087, 0.086],
    ["11-size", 48, 3, 0.047, 0.048],
  ] as const;

  it.each(TABLE)(
    "of the %s on %i V at %f times the voltage-limit speed is %f N·m, within 3 %% of the simulated %f",
    (size, volts, times, torque, simulated) => {
      const motor = driven(size, volts);
      const found = expectedPullOut(motor, times * voltageLimitSpeed(motor));
      expect(Math.abs(found - torque)).toBeLessThanOrEqual(0.00051);
      // The last digit of the small motor is 1 % of its torque.
      expect(Math.abs(found - simulated)).toBeLessThan(0.03 * simulated + 0.0005);
    },
  );

  it("is the conservative one up to the voltage-limit speed and at reduced current", () => {
    const full = driven("17-size", 24);
    const limit = voltageLimitSpeed(full);
    for (const share of [0, 0.5, 1])
      expect(expectedPullOut(full, share * limit)).toBe(conservativePullOut(full, share * limit));
    const reduced = driven("17-size", 24, 0.3);
    const fast = 3 * voltageLimitSpeed(reduced);
    expect(expectedPullOut(reduced, fast)).toBe(conservativePullOut(reduced, fast));
  });

  it("is never below the conservative one, nor above the current limit", () => {
    const speed = fc.double({ min: 0, max: 3000, noNaN: true });
    const share = fc.double({ min: 0.05, max: 1, noNaN: true });
    const size = fc.constantFrom("17-size", "23-size", "11-size");
    fc.assert(
      fc.property(size, speed, share, fc.constantFrom(12, 24, 48), (motorSize, fast, part, volts) => {
        const motor = driven(motorSize, volts, part);
        const found = expectedPullOut(motor, fast);
        expect(found).toBeGreaterThanOrEqual(conservativePullOut(motor, fast) * (1 - 1e-12));
        expect(found).toBeLessThanOrEqual(motor.voltageConstant * motor.peakCurrent * (1 + 1e-12));
      }),
      { numRuns: 500, seed: 3 },
    );
  });
});
