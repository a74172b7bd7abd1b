import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { weightAlongAxis, weightTorque } from "@/lib/physics/gravity";
import { opposingForce } from "@/lib/physics/load-torque";
import { firstMicrostepShare } from "@/lib/physics/microstep-fidelity";
import { peakSpeed, travelToReach } from "@/lib/physics/profiles";
import { speedJumpBound } from "@/lib/physics/start-stop";
import { holdingTorqueAt } from "@/lib/physics/static-torque";

describe("the weight along an axis", () => {
  it("is all of it straight up, half at 30°, none on the level", () => {
    const weight = (inclineDeg: number) => weightAlongAxis({ mass: 2, inclineDeg, counterbalance: 0 });
    expect(weight(90)).toBeCloseTo(19.6133, 9);
    expect(weight(30)).toBeCloseTo(9.80665, 9);
    expect(weight(0)).toBe(0);
  });

  it("is what a counterbalance leaves, and asks torque in either direction", () => {
    const weight = weightAlongAxis({ mass: 2, inclineDeg: 90, counterbalance: 30 });
    expect(weight).toBeCloseTo(-10.3867, 9);
    expect(weightTorque({ weight, radius: 0.01, motors: 2 })).toBeCloseTo(0.0519335, 9);
  });
});

describe("the force against the motion", () => {
  it("adds friction to whatever external force and weight leave together", () => {
    expect(opposingForce({ friction: 4, external: -5, weight: 12 })).toBe(11);
    expect(opposingForce({ friction: 4, external: -12, weight: 5 })).toBe(11);
  });
});

describe("the holding torque", () => {
  it("is in proportion to current and grows no more above the rating", () => {
    const at = (current: number) => holdingTorqueAt({ holdingTorque: 0.4, current, ratedCurrent: 2 });
    expect([at(0), at(1), at(2), at(3)]).toEqual([0, 0.2, 0.4, 0.4]);
  });
});

describe("the bound of a speed jump", () => {
  const jump = (torque: number, loadTorque: number, inertia: number) =>
    speedJumpBound({ torque, loadTorque, inertia, rotorTeeth: 50 });

  it("is 2·√(T/(Nr·J)) without load", () => {
    expect(jump(0.45, 0, 2e-5)).toBeCloseTo(2 * Math.sqrt(0.45 / (50 * 2e-5)), 9);
  });

  it("is nothing where the load takes all of the torque", () => {
    expect(jump(0.45, 0.45, 2e-5)).toBe(0);
    expect(jump(0.45, 0.9, 2e-5)).toBe(0);
  });

  it("shrinks with inertia and with load, and grows with torque", () => {
    const positive = (max: number) => fc.double({ min: max / 1000, max, noNaN: true });
    fc.assert(
      fc.property(positive(2), positive(1), positive(1e-3), (torque, load, inertia) => {
        expect(jump(torque, load, inertia * 1.1)).toBeLessThanOrEqual(jump(torque, load, inertia));
        expect(jump(torque, load * 1.1, inertia)).toBeLessThanOrEqual(jump(torque, load, inertia));
        expect(jump(torque * 1.1, load, inertia)).toBeGreaterThanOrEqual(jump(torque, load, inertia));
      }),
      { seed: 6 },
    );
  });
});

describe("the peak speed of a move", () => {
  it("is the set speed where the travel is v²/a or more", () => {
    expect(travelToReach(0.3, 3)).toBeCloseTo(0.03, 12);
    expect(peakSpeed({ speed: 0.3, acceleration: 3, travel: 0.0301 })).toBe(0.3);
    expect(peakSpeed({ speed: 0.3, acceleration: 3, travel: 0.01 })).toBeCloseTo(Math.sqrt(0.03), 12);
  });
});

describe("the first microstep", () => {
  it("asks for the whole current in full steps and for ever less in finer ones", () => {
    expect(firstMicrostepShare(1)).toBe(1);
    for (let n = 1; n <= 256; n *= 2) expect(firstMicrostepShare(2 * n)).toBeLessThan(firstMicrostepShare(n));
  });
});
