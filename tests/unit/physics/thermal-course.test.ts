import { describe, expect, it } from "vitest";
import { temperatureAfter } from "@/lib/physics/evidence/heating";
import { dutyCurrent, timeToReach } from "@/lib/physics/thermal-course";

describe("the time until a temperature is passed", () => {
  it("is when the first-order course is there; there is none for what it does not settle above", () => {
    const course = { start: 30, settled: 95, timeConstant: 900 };
    const time = timeToReach({ ...course, temperature: 80 });
    expect(temperatureAfter({ ...course, time: time ?? Number.NaN })).toBeCloseTo(80, 10);
    expect(timeToReach({ ...course, temperature: 95 })).toBeNull();
    expect(timeToReach({ ...course, temperature: 30 })).toBe(0);
  });

  // Definition of the time constant: 1 − 1/e of the rise, here 60 · 0.632121 K.
  it("is the time constant for 63.2 % of the rise", () => {
    const time = timeToReach({ start: 25, settled: 85, temperature: 25 + 60 * 0.632121, timeConstant: 1200 });
    expect(time).toBeCloseTo(1200, 1);
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
