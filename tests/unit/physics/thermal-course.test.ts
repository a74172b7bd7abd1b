import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { dutyCurrent, firstOrderTemperature, timeToReach } from "@/lib/physics/thermal-course";

describe("the first-order course of a temperature", () => {
  // 1 − 1/e and 1 − 1/e³ of the rise after one and three time constants: definition of the time constant.
  it.each([
    [0, 25],
    [1200, 25 + 60 * 0.632121],
    [3600, 25 + 60 * 0.950213],
  ])("is after %i s at %f °C", (time, temperature) => {
    expect(firstOrderTemperature({ start: 25, settled: 85, time, timeConstant: 1200 })).toBeCloseTo(
      temperature,
      4,
    );
  });

  it("cools as it heats", () => {
    const course = { time: 700, timeConstant: 1200 };
    const heated = firstOrderTemperature({ ...course, start: 20, settled: 80 });
    const cooled = firstOrderTemperature({ ...course, start: 80, settled: 20 });
    expect(heated - 20).toBeCloseTo(80 - cooled, 12);
  });

  it("passes a temperature at the time that is told for it, and never one that it does not settle above", () => {
    const course = { start: 30, settled: 95, timeConstant: 900 };
    const time = timeToReach({ ...course, temperature: 80 });
    expect(firstOrderTemperature({ ...course, time: time ?? Number.NaN })).toBeCloseTo(80, 10);
    expect(timeToReach({ ...course, temperature: 95 })).toBeNull();
    expect(timeToReach({ ...course, temperature: 30 })).toBe(0);
  });

  it("stays between start and settled temperature and never turns back", () => {
    const celsius = fc.double({ min: -40, max: 300, noNaN: true });
    const seconds = fc.double({ min: 0, max: 1e5, noNaN: true });
    fc.assert(
      fc.property(celsius, celsius, seconds, seconds, (start, settled, one, other) => {
        const at = (time: number) => firstOrderTemperature({ start, settled, time, timeConstant: 1200 });
        const early = Math.abs(settled - at(Math.min(one, other)));
        const late = Math.abs(settled - at(Math.max(one, other)));
        expect(late).toBeLessThanOrEqual(early + 1e-9);
        expect(early).toBeLessThanOrEqual(Math.abs(settled - start) + 1e-9);
      }),
      { numRuns: 300, seed: 5 },
    );
  });
});

describe("the current of a duty cycle", () => {
  it("is the run current all the time, the hold current never moving, and heats as the mean of the losses", () => {
    const currents = { runCurrent: 1.2, holdCurrent: 0.6 };
    expect(dutyCurrent({ ...currents, share: 1 })).toBeCloseTo(1.2, 12);
    expect(dutyCurrent({ ...currents, share: 0 })).toBeCloseTo(0.6, 12);
    expect(dutyCurrent({ ...currents, share: 0.25 }) ** 2).toBeCloseTo(0.25 * 1.44 + 0.75 * 0.36, 12);
  });
});
