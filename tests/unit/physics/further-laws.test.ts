import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { busierMotor, busierMotorTorque, crossedInertia } from "@/lib/physics/coupled";
import { connectionFactors, peakFromRms } from "@/lib/physics/current-conventions";
import { conductionLoss, driverSteadyState, highestDriverCurrent } from "@/lib/physics/driver-heat";
import { detentForce, fallAcceleration, fallDistance, FREE_FALL } from "@/lib/physics/gravity";
import { steadyFromRecord } from "@/lib/physics/heating-record";
import { dutyTorque, preloadTorque } from "@/lib/physics/load-torque";
import { microstepsToMove } from "@/lib/physics/microstep-fidelity";
import { copperFactor, thermalClassLimits, windingTemperatureByResistance } from "@/lib/physics/motor-heat";
import {
  jerkPeakSpeed,
  jerkRampAcceleration,
  jerkRampTime,
  jerkStoppingDistance,
  jerkTimes,
  jerkTravelToReach,
  stoppingDistance,
  trapezoidTimes,
} from "@/lib/physics/profiles";
import { beltStiffness, leastBeltStiffness } from "@/lib/physics/resonance";
import { speedJumpBound } from "@/lib/physics/start-stop";
import { positionError, SUDDEN_LOAD_SHARE } from "@/lib/physics/static-torque";
import { cableDrop, inductanceRuleVoltage, overdriveRatio, supplyLoad } from "@/lib/physics/supply";
import { touchTime } from "@/lib/physics/touch";

const size = fc.double({ min: 1e-3, max: 1e3, noNaN: true });

/** Holds a law for any positive sizes. */
function law(words: string, count: number, holds: (...values: number[]) => void) {
  it(words, () => {
    fc.assert(
      fc.property(fc.array(size, { minLength: count, maxLength: count }), (values) => holds(...values)),
      { numRuns: 200, seed: 11 },
    );
  });
}

describe("coils of a half-coil rating", () => {
  // Source: Anaheim Automation L010185 p. 9, peak of the sine over the unipolar rating.
  it.each([
    ["series", 1.0],
    ["half_coil", 1.414],
    ["parallel", 2.0],
  ] as const)("%s has a peak of %f times the rating", (connection, times) => {
    expect(peakFromRms(connectionFactors(connection).current)).toBeCloseTo(times, 3);
  });

  it("lose the same heat however they are connected", () => {
    for (const connection of ["series", "parallel"] as const) {
      const { current, resistance } = connectionFactors(connection);
      expect(current ** 2 * resistance).toBeCloseTo(1, 12);
    }
  });
});

describe("the highest current of a driver", () => {
  law(
    "settles its junction at the limit",
    6,
    (on = 1, quiescent = 1, s = 1, thermal = 1, air = 1, spare = 1) => {
      const junction = air + spare;
      const input = {
        onResistance: on,
        onResistanceAt: 25,
        quiescent,
        switchingPerAmpere: s,
        thermalResistance: thermal,
        ambient: air,
        junction,
      };
      const current = highestDriverCurrent(input);
      expect(current).toBeGreaterThanOrEqual(0);
      const conduction = conductionLoss({ current, onResistance: on });
      const settled = driverSteadyState({
        conduction,
        conductionAt: 25,
        constant: quiescent + s * current,
        thermalResistance: thermal,
        ambient: air,
      });
      if (current > 0 && settled) expect(Math.abs(settled.junction / junction - 1)).toBeLessThan(1e-6);
    },
  );

  law("is no higher in warmer air", 3, (thermal = 1, one = 1, other = 1) => {
    const at = (ambient: number) =>
      highestDriverCurrent({
        onResistance: 0.3,
        onResistanceAt: 25,
        quiescent: 0.1,
        switchingPerAmpere: 0.05,
        thermalResistance: thermal,
        ambient,
        junction: 125,
      });
    expect(at(Math.max(one, other))).toBeLessThanOrEqual(at(Math.min(one, other)));
  });
});

describe("a winding's temperature by resistance", () => {
  law("gives back the temperature that made the resistance", 2, (cold = 1, hot = 1) => {
    const at = Math.min(hot, 200);
    const found = windingTemperatureByResistance({ cold, coldAt: 20, hot: cold * copperFactor(at) });
    expect(found).toBeCloseTo(at, 6);
  });

  it("leaves every class room between its mean and its hot spot", () => {
    for (const letter of ["A", "E", "B", "F", "H"] as const) {
      const { hotSpot, rise } = thermalClassLimits(letter);
      expect(hotSpot - (40 + rise)).toBeGreaterThanOrEqual(5);
      expect(hotSpot - (40 + rise)).toBeLessThanOrEqual(15);
    }
  });
});

describe("the steady state from a short record", () => {
  const record = (tau: number, times: readonly number[], noise: (index: number) => number = () => 0) =>
    times.map((time, index) => ({ time, temperature: 80 - 55 * Math.exp(-time / tau) + noise(index) }));
  const every = (dt: number, count: number) => Array.from({ length: count }, (_, index) => index * dt);

  it("is T2 + d1·d2/(d1 − d2) for three even readings (derived)", () => {
    const [a, b, c] = [25, 52, 66];
    const found = steadyFromRecord(
      [
        { time: 0, temperature: a },
        { time: 600, temperature: b },
        { time: 1200, temperature: c },
      ],
      0.2,
    );
    const [d1, d2] = [b - a, c - b];
    expect(found).toMatchObject({ ok: true });
    if (!found.ok) return;
    expect(found.settled).toBeCloseTo(b + (d1 * d2) / (d1 - d2), 3);
    expect(found.timeConstant).toBeCloseTo(600 / Math.log(d1 / d2), 0);
  });

  it("finds temperature and time constant of a clean record, and its interval holds the truth of a noisy one", () => {
    const clean = steadyFromRecord(record(1200, every(120, 11)), 0.1);
    expect(clean.ok && Math.abs(clean.settled - 80)).toBeLessThan(0.01);
    const noisy = steadyFromRecord(
      record(1200, every(120, 11), (index) => (index % 2 === 0 ? 0.3 : -0.3)),
      0.3,
    );
    expect(noisy.ok && noisy.low <= 80 && noisy.high >= 80).toBe(true);
    expect(noisy.ok && noisy.high - noisy.low).toBeGreaterThan(0.5);
  });

  it("is refused for too few readings, a span too short, and a curve too straight", () => {
    expect(steadyFromRecord(record(1200, [0, 600]), 0.2)).toEqual({ ok: false, because: "too_few" });
    expect(steadyFromRecord(record(1200, every(60, 11)), 0.01)).toEqual({ ok: false, because: "too_short" });
    expect(steadyFromRecord(record(1200, every(30, 6)), 0.5)).toEqual({ ok: false, because: "too_straight" });
  });
});

describe("touch", () => {
  // Source: ISO 13732-1, bare metal (from memory).
  it.each([
    [66, 0],
    [65, 1],
    [56, 10],
    [51, 60],
    [48, 600],
  ])("%d °C may be touched for %d s", (temperature, time) => {
    expect(touchTime(temperature)).toBeCloseTo(time, 6);
  });

  it("has no end at skin temperatures, and is never longer on hotter metal", () => {
    expect(touchTime(42)).toBeNull();
    fc.assert(
      fc.property(
        fc.double({ min: 43, max: 80, noNaN: true }),
        fc.double({ min: 43, max: 80, noNaN: true }),
        (a, b) => {
          expect(touchTime(Math.max(a, b))!).toBeLessThanOrEqual(touchTime(Math.min(a, b))! * (1 + 1e-12));
        },
      ),
      { seed: 4 },
    );
  });
});

describe("a load at standstill", () => {
  it("of half the torque pulls the rotor a third of a full step away", () => {
    const full = Math.PI / 2 / 50;
    expect(positionError({ load: 0.5, holdingTorque: 1, rotorTeeth: 50 })! / full).toBeCloseTo(1 / 3, 12);
    expect(positionError({ load: 1, holdingTorque: 1, rotorTeeth: 50 })! / full).toBeCloseTo(1, 12);
    expect(positionError({ load: 1.01, holdingTorque: 1, rotorTeeth: 50 })).toBeNull();
  });

  it("may come suddenly up to 0.7246 of the torque (equal areas, derived)", () => {
    const area = (s: number) => 1 + Math.sqrt(1 - s ** 2) - s * (Math.PI - Math.asin(s));
    expect(area(SUDDEN_LOAD_SHARE)).toBeCloseTo(0, 12);
    expect(SUDDEN_LOAD_SHARE).toBeCloseTo(0.72461, 5);
  });

  law("lets more microsteps pass with more friction", 3, (torque = 1, one = 1, other = 1) => {
    const at = (friction: number) => microstepsToMove({ microsteps: 16, friction, holdingTorque: torque });
    expect(at(Math.max(one, other))).toBeGreaterThanOrEqual(at(Math.min(one, other)));
  });
});

describe("moves", () => {
  law(
    "take as long as their way needs, with and without jerk",
    4,
    (speed = 1, acceleration = 1, jerk = 1, travel = 1) => {
      const plain = trapezoidTimes({ speed, acceleration, travel });
      const peak = Math.min(speed, Math.sqrt(acceleration * travel));
      expect(peak * (plain.accelerating + plain.cruising)).toBeCloseTo(
        travel,
        6 - Math.ceil(Math.log10(travel + 1)),
      );
      const soft = jerkTimes({ speed, acceleration, jerk, travel });
      const softPeak = jerkPeakSpeed({ speed, acceleration, jerk, travel });
      expect(Math.abs((softPeak * (soft.accelerating + soft.cruising)) / travel - 1)).toBeLessThan(1e-9);
      expect(soft.total).toBeGreaterThanOrEqual(plain.total * (1 - 1e-9));
      expect(softPeak).toBeLessThanOrEqual(peak * (1 + 1e-9));
    },
  );

  law(
    "with limited jerk reach their speed in the time that the accelerations add up to",
    3,
    (peak = 1, acceleration = 1, jerk = 1) => {
      // ∫ dv/a(v) over the ramp; the ends, where a is 0, by substitution v = p·sin²φ.
      let time = 0;
      const rounds = 4000;
      for (let round = 0; round < rounds; round++) {
        const angle = ((round + 0.5) * Math.PI) / 2 / rounds;
        const speed = peak * Math.sin(angle) ** 2;
        const slope = 2 * peak * Math.sin(angle) * Math.cos(angle) * (Math.PI / 2 / rounds);
        time += slope / jerkRampAcceleration({ speed, peak, acceleration, jerk });
      }
      expect(Math.abs(time / jerkRampTime({ speed: peak, acceleration, jerk }) - 1)).toBeLessThan(1e-3);
    },
  );

  law(
    "with limited jerk never stop sooner than without, and stop as soon where it is boundless",
    3,
    (speed = 1, acceleration = 1, jerk = 1) => {
      const hard = stoppingDistance(speed, acceleration);
      expect(jerkStoppingDistance({ speed, acceleration, jerk })).toBeGreaterThanOrEqual(hard * (1 - 1e-9));
      const boundless = jerkStoppingDistance({ speed, acceleration, jerk: 1e15 * acceleration });
      expect(Math.abs(boundless / hard - 1)).toBeLessThan(1e-6);
    },
  );

  law(
    "with limited jerk just reach their speed on the travel that they need for it",
    3,
    (speed = 1, acceleration = 1, jerk = 1) => {
      const travel = jerkTravelToReach({ speed, acceleration, jerk });
      const reached = jerkPeakSpeed({ speed: 2 * speed, acceleration, jerk, travel });
      expect(Math.abs(reached / speed - 1)).toBeLessThan(1e-9);
    },
  );

  it("turn round where they stand without an acceleration", () => {
    expect(jerkPeakSpeed({ speed: 1, acceleration: 0, jerk: 1, travel: 1 })).toBe(0);
  });

  law("stop sooner with more deceleration", 3, (speed = 1, one = 1, other = 1) => {
    expect(stoppingDistance(speed, Math.max(one, other))).toBeLessThanOrEqual(
      stoppingDistance(speed, Math.min(one, other)),
    );
  });

  law("ask a duty torque between their least and their greatest", 4, (a = 1, b = 1, s = 1, t = 1) => {
    const torque = dutyTorque([
      { torque: a, time: s },
      { torque: b, time: t },
    ]);
    expect(torque).toBeLessThanOrEqual(Math.max(a, b) * (1 + 1e-12));
    expect(torque).toBeGreaterThanOrEqual(Math.min(a, b) * (1 - 1e-12));
  });
});

describe("belts, screws, cables, supplies", () => {
  law("a belt is softest where its spans are equal", 3, (specific = 1, width = 1, span = 1) => {
    const share = span / 1000.1;
    const spans = [share, 1 - share];
    expect(beltStiffness({ specific, width, spans })).toBeGreaterThanOrEqual(
      leastBeltStiffness({ specific, width, length: 1 }) * (1 - 1e-12),
    );
  });

  law(
    "have their units in order: twice the length, the current or the preload is twice the effect",
    4,
    (length = 1, ohmPerKm = 1, current = 1, preload = 1) => {
      const drop = (l: number, i: number) => cableDrop({ length: l, ohmPerKm, current: i, temperature: 30 });
      expect(drop(2 * length, current) / drop(length, current)).toBeCloseTo(2, 12);
      expect(drop(length, 2 * current) / drop(length, current)).toBeCloseTo(2, 12);
      const nut = (force: number) => preloadTorque({ preload: force, friction: 0.2, radius: 0.001 });
      expect(nut(2 * preload) / nut(preload)).toBeCloseTo(2, 12);
    },
  );

  it("a 3 V motor is driven four- and eightfold on 12 and 24 V, and 3 mH allow 55 V (common practice, no source)", () => {
    const motor = { ratedCurrent: 1.5, resistance: 2 };
    expect(overdriveRatio({ voltage: 12, ...motor })).toBe(4);
    expect(overdriveRatio({ voltage: 24, ...motor })).toBe(8);
    expect(inductanceRuleVoltage(3)).toBeCloseTo(55.4256, 4);
  });

  law(
    "a supply gives no less than what arrives",
    5,
    (copper = 1, drivers = 1, mechanical = 1, other = 1, share = 1) => {
      const efficiency = share / 1001;
      const load = supplyLoad({ copper, drivers, mechanical, other, efficiency });
      expect(load).toBeGreaterThanOrEqual(copper + drivers + mechanical + other);
    },
  );
});

describe("a raised load without current", () => {
  const input = {
    weight: 20,
    friction: 0,
    motors: 1,
    radius: 0.01,
    mass: 20 / FREE_FALL,
    shaftInertia: 0,
  };
  it("falls freely where nothing holds it", () => {
    expect(fallAcceleration(input)).toBeCloseTo(FREE_FALL, 9);
    expect(fallDistance(FREE_FALL, 0.1)).toBeCloseTo(0.04903325, 9);
  });

  it("is slowed by friction alone, and stays where friction carries it", () => {
    expect(fallAcceleration({ ...input, friction: 12 })).toBeCloseTo(0.4 * FREE_FALL, 9);
    expect(fallAcceleration({ ...input, friction: 20 })).toBe(0);
  });

  it("rests on n·T_d/r of detent torque", () => {
    expect(detentForce({ detentTorque: 0.08, motors: 2, radius: 0.01 })).toBeCloseTo(16, 12);
  });

  law("falls no faster with more friction or inertia", 4, (weight = 1, a = 1, b = 1, mass = 1) => {
    const at = (friction: number, shaftInertia: number) =>
      fallAcceleration({
        weight,
        friction,
        motors: 2,
        radius: 0.01,
        mass,
        shaftInertia,
      });
    expect(at(Math.max(a, b), 1e-5)).toBeLessThanOrEqual(at(Math.min(a, b), 1e-5));
    expect(at(0, Math.max(a, b))).toBeLessThanOrEqual(at(0, Math.min(a, b)));
  });
});

describe("motors on crossed belts", () => {
  it("carry half as much where two sit on either belt: 10 N · 0.01 m / 4 = 0.025 N·m, 2 kg · 0.01² / 8 = 2.5e-5 kg·m²", () => {
    const each = busierMotorTorque({
      forces: [4, 6],
      accelerations: [0, 0],
      motors: 4,
      radius: 0.01,
      efficiency: 1,
      motorInertia: 0,
    });
    expect(each).toBeCloseTo(0.025, 12);
    expect(crossedInertia({ masses: [0.5, 1.5], motors: 4, radius: 0.01, motorInertia: 0 })).toBeCloseTo(
      2.5e-5,
      12,
    );
  });

  law(
    "carry half of one axis alone, and the mean of both together",
    4,
    (force = 1, other = 1, radius = 1, jm = 1) => {
      const torque = (one: number, two: number) =>
        busierMotorTorque({
          forces: [one, two],
          accelerations: [0, 0],
          motors: 2,
          radius,
          efficiency: 1,
          motorInertia: jm,
        });
      expect(torque(force, 0)).toBeCloseTo((force * radius) / 2, 6);
      expect(torque(force, other)).toBeGreaterThanOrEqual(torque(force, 0));
      expect(busierMotor(force, -other, radius)).toBeCloseTo((force + other) / radius, 6);
    },
  );

  law("start no faster with more mass on either axis", 3, (one = 1, other = 1, extra = 1) => {
    const bound = (mass: number) =>
      speedJumpBound({
        torque: 0.3,
        loadTorque: 0.05,
        inertia: crossedInertia({ masses: [mass, other], motors: 2, radius: 0.006, motorInertia: 5e-6 }),
        rotorTeeth: 50,
      });
    expect(bound(one + extra)).toBeLessThanOrEqual(bound(one));
  });
});
