import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { temperatureAfter } from "@/lib/physics/evidence/heating";
import { lostSteps } from "@/lib/physics/evidence/lost-steps";
import {
  recommendedAcceleration,
  recommendedCurrent,
  recommendedJump,
} from "@/lib/physics/evidence/recommended";

const measured = (fullSteps: number, repeatability: number | null = 0.3, toothSteps: number | null = null) =>
  lostSteps({ fullSteps, repeatability, toothSteps });

describe("lost-step arithmetic", () => {
  it.each([
    ["nothing off", 0, 0, "none"],
    ["less than the reference repeats", 0.2, 0, "none"],
    ["one slip", 4.1, 4, "lost"],
    ["three slips backwards", -11.9, -12, "lost"],
    ["a remainder of one step", 5, 4, "unexplained"],
    ["two steps alone", 1.9, 0, "unexplained"],
  ])("%s", (_words, fullSteps, lost, verdict) => {
    const found = measured(fullSteps);
    expect(found).toMatchObject({ lost, verdict });
    expect(found.remainder).toBeCloseTo(fullSteps - lost, 12);
  });

  it("leaves a remainder open while nobody has measured what the reference repeats to", () => {
    expect(measured(5, null).verdict).toBe("open");
    expect(measured(8, null).verdict).toBe("lost");
    expect(measured(0.2, null).verdict).toBe("open");
  });

  it("names belt teeth that explain the deviation as well", () => {
    expect(measured(10, 0.3, 10).teeth).toBe(1);
    expect(measured(-20, 0.3, 10)).toMatchObject({ teeth: -2, lost: -20, verdict: "lost" });
    expect(measured(4, 0.3, 10).teeth).toBeNull();
    expect(measured(0, 0.3, 10).teeth).toBeNull();
  });

  it("always splits a deviation into whole slips and at most two steps", () => {
    fc.assert(
      fc.property(fc.double({ min: -1e4, max: 1e4, noNaN: true }), (fullSteps) => {
        const { lost, remainder } = measured(fullSteps);
        expect(Math.abs(lost % 4)).toBe(0);
        expect(lost + remainder).toBeCloseTo(fullSteps, 9);
        expect(Math.abs(remainder)).toBeLessThanOrEqual(2);
      }),
    );
  });
});

describe("the recommended setting", () => {
  const load = { torque: 0.05, inertia: 2e-5, radius: 0.00637 };

  it("leaves exactly the margin that the policy wants", () => {
    const failing = 40;
    const margin = 0.5;
    const recommended = recommendedAcceleration({ failing, margin, load });
    const torque = (a: number) => load.torque + (load.inertia * a) / load.radius;
    expect(torque(failing) / torque(recommended)).toBeCloseTo(1 + margin, 12);
  });

  it("is nothing where the load alone takes up the torque that may be used", () => {
    expect(recommendedAcceleration({ failing: 5, margin: 1, load })).toBe(0);
  });

  it("divides by the margin where no load is known, which leaves less of it than the load asks for", () => {
    expect(recommendedAcceleration({ failing: 30, margin: 0.5, load: null })).toBeCloseTo(20, 12);
    expect(recommendedAcceleration({ failing: 30, margin: 0.5, load })).toBeLessThan(20);
  });

  it("raises a current and lowers a jump by the margin of torque", () => {
    expect(recommendedCurrent(0.8, 0.5)).toBeCloseTo(1.2, 12);
    expect(recommendedJump(0.03, 1) ** 2 * 2).toBeCloseTo(0.03 ** 2, 12);
  });
});

describe("a temperature on its way", () => {
  const rising = { start: 25, settled: 85, timeConstant: 1200 };

  it("starts where it was and ends where it settles", () => {
    expect(temperatureAfter({ ...rising, time: 0 })).toBe(25);
    expect(temperatureAfter({ ...rising, time: 1e6 })).toBeCloseTo(85, 9);
  });

  it("has gone 63.2 % of the way after one time constant", () => {
    expect(temperatureAfter({ ...rising, time: 1200 })).toBeCloseTo(25 + 60 * (1 - Math.exp(-1)), 12);
  });
});
