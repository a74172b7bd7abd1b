import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { dixonMood } from "@/lib/physics/evidence/dixon-mood";
import { isotonicMedian } from "@/lib/physics/evidence/isotonic";
import {
  countedTrials,
  isLongEnough,
  LEAST_TRIALS,
  levelOf,
  nextRung,
  type LadderShape,
  type RungTrial,
} from "@/lib/physics/evidence/ladder";
import { failingShare, ladderEstimate, randomNumbers } from "@/lib/physics/evidence/ladder-estimate";

const UP: LadderShape = { start: 3000, step: 100, fails: "above" };
const DOWN: LadderShape = { start: 1, step: 0.05, fails: "below" };

/** "4+ 8- 6-": passes and failures by rung. */
function trialsOf(text: string): RungTrial[] {
  return text.split(" ").map((word) => ({ rung: Number.parseInt(word, 10), failed: word.endsWith("-") }));
}

/** A ladder climbed to its end on a sharp or a scattered threshold. */
function climb(shape: LadderShape, fails: (level: number) => boolean): RungTrial[] {
  const trials: RungTrial[] = [];
  while (!isLongEnough(trials) && trials.length < 200) {
    const rung = nextRung(shape, trials);
    trials.push({ rung, failed: fails(levelOf(shape, rung)) });
  }
  return trials;
}

describe("the next rung", () => {
  it.each([
    ["begins at the start", "", 0],
    ["goes on by four while everything passes", "0+", 4],
    ["goes back by four while everything fails", "0-", -4],
    ["lies between the rungs where the outcome turned", "0+ 4+ 8-", 6],
    ["goes up one after a pass", "0+ 4- 2+", 3],
    ["goes down one after a failure", "0+ 4- 2-", 1],
  ])("%s", (_words, text, rung) => {
    expect(nextRung(UP, text === "" ? [] : trialsOf(text))).toBe(rung);
  });

  it("goes the other way where the motor fails below", () => {
    expect(nextRung(DOWN, trialsOf("0+"))).toBe(-4);
    expect(nextRung(DOWN, trialsOf("0+ -4-"))).toBe(-2);
    expect(nextRung(DOWN, trialsOf("0+ -4- -2-"))).toBe(-1);
  });

  it("never asks for nothing or less", () => {
    const steep = { start: 100, step: 100, fails: "above" } as const;
    expect(nextRung(steep, trialsOf("0-"))).toBe(0);
    expect(levelOf(steep, nextRung(steep, trialsOf("0- 0- 0-")))).toBe(100);
    expect(nextRung({ start: 250, step: 100, fails: "above" }, trialsOf("0-"))).toBe(-2);
  });
});

describe("a whole ladder", () => {
  it("finds a sharp threshold within one step, wherever it lies, in at most 22 trials", () => {
    for (let threshold = 2210; threshold < 4400; threshold += 37) {
      const trials = climb(UP, (level) => level > threshold);
      const found = ladderEstimate(UP, trials)!;
      expect(trials.length, `${threshold}`).toBeLessThanOrEqual(22);
      expect(Math.abs(found.mean - threshold), `${threshold}`).toBeLessThanOrEqual(UP.step);
      expect(Math.abs(found.isotonic! - threshold), `${threshold}`).toBeLessThanOrEqual(UP.step);
      expect(found.deviationReliable, "no scatter, so the step is too coarse").toBe(false);
      expect(found.counted).toBeGreaterThanOrEqual(LEAST_TRIALS);
    }
  });

  it("finds the current below which steps are lost", () => {
    const trials = climb(DOWN, (amperes) => amperes < 0.63);
    const found = ladderEstimate(DOWN, trials)!;
    expect(Math.abs(found.mean - 0.63)).toBeLessThanOrEqual(DOWN.step);
  });

  it("counts nothing before the outcome has turned", () => {
    expect(countedTrials(trialsOf("0+ 4+ 8+"))).toEqual([]);
    expect(countedTrials(trialsOf("0+ 4- 2+ 3-"))).toEqual(trialsOf("2+ 3-"));
    expect(ladderEstimate(UP, trialsOf("0+ 4-"))).toBeNull();
    expect(ladderEstimate(UP, trialsOf("0+ 4- 2+"))).toBeNull();
  });

  it("gives the same interval for the same trials", () => {
    const trials = climb(UP, (level) => level > 3333);
    expect(ladderEstimate(UP, trials)).toEqual(ladderEstimate(UP, trials));
  });

  it.each([
    [0.5, 0.9],
    [1, 0.9],
    [1.5, 0.85],
    [2, 0.72],
  ])(
    "with a scatter of %d steps holds the true mean in its interval in at least %d of cases",
    (steps, least) => {
      const random = randomNumbers(17);
      const scatter = steps * UP.step;
      let held = 0;
      const LADDERS = 120;
      for (let ladder = 0; ladder < LADDERS; ladder += 1) {
        const mean = UP.start * (1 + 0.35 * random());
        const trials = climb(UP, (level) => random() < failingShare(UP, { level, mean, scatter }));
        const { low, high } = ladderEstimate(UP, trials)!.interval;
        if (low <= mean && mean <= high) held += 1;
      }
      expect(held / LADDERS).toBeGreaterThanOrEqual(least);
    },
  );
});

describe("Dixon and Mood's estimate", () => {
  it("is the same from passes as from failures on a symmetric ladder", () => {
    const trials = trialsOf("0+ 1- 0+ 1- 0+ 1-");
    expect(dixonMood(UP, trials)!.mean).toBeCloseTo(3050, 9);
    expect(dixonMood(UP, trials.slice(1))!.mean).toBeCloseTo(3050, 9);
  });

  it("mirrors where the motor fails below", () => {
    const trials = trialsOf("2+ 3- 2- 1+ 2+ 3+ 4- 3- 2+ 3-");
    const mirrored = trials.map(({ rung, failed }) => ({ rung: -rung, failed }));
    const up = dixonMood({ start: 0, step: 1, fails: "above" }, trials)!;
    const down = dixonMood({ start: 0, step: 1, fails: "below" }, mirrored)!;
    expect(down.mean).toBeCloseTo(-up.mean, 12);
    expect(down.deviation).toBeCloseTo(up.deviation, 12);
  });

  it("takes the formula for the scatter where the step is fine enough", () => {
    // N = 4 failures on rungs 0, 1, 2, 3: A = 6, B = 14, q = (56 − 36)/16 = 1.25.
    const trials = trialsOf("0- 1- 2- 3- 0+ 1+ 2+ 3+ 1+");
    const found = dixonMood(UP, trials)!;
    expect(found.q).toBeCloseTo(1.25, 12);
    expect(found.deviationReliable).toBe(true);
    expect(found.deviation).toBeCloseTo(1.62 * 100 * 1.279, 9);
    expect(found.mean).toBeCloseTo(3000 + 100 * (1.5 - 0.5), 9);
  });
});

describe("the isotonic estimate", () => {
  it("lies where the straight line between two shares passes one half", () => {
    const trials = trialsOf("0+ 0+ 0+ 0- 1+ 1- 1- 1-");
    expect(isotonicMedian(UP, trials)).toBeCloseTo(3050, 9);
  });

  it("pools rungs on which more failed less", () => {
    const trials = trialsOf("0+ 0+ 1- 1- 1+ 2+ 2+ 2- 3- 3-");
    const median = isotonicMedian(UP, trials)!;
    // Rungs 1 and 2 together: 3 of 6 failed, at their mean rung.
    expect(median).toBeCloseTo(3150, 9);
  });

  it("is wanting where the trials do not pass one half", () => {
    expect(isotonicMedian(UP, trialsOf("0+ 1+ 2+"))).toBeNull();
    expect(isotonicMedian(UP, trialsOf("0- 1- 2-"))).toBeNull();
  });
});

describe("any entries at all", () => {
  const shapes = fc.record({
    start: fc.double({ min: 1e-3, max: 1e3, noNaN: true }),
    step: fc.double({ min: 1e-4, max: 1e2, noNaN: true }),
    fails: fc.constantFrom("above" as const, "below" as const),
  });
  const entries = fc.array(fc.record({ rung: fc.integer({ min: -40, max: 40 }), failed: fc.boolean() }), {
    maxLength: 40,
  });

  it("lead to a level above 0 and to finite numbers", () => {
    fc.assert(
      fc.property(shapes, entries, (shape, trials) => {
        const rung = nextRung(shape, trials);
        expect(Number.isInteger(rung)).toBe(true);
        expect(levelOf(shape, rung)).toBeGreaterThan(-1e-9);
        const found = ladderEstimate(shape, trials);
        if (!found) return;
        const { mean, deviation, interval } = found;
        for (const value of [mean, deviation, interval.low, interval.high])
          expect(Number.isFinite(value)).toBe(true);
        expect(interval.low).toBeLessThanOrEqual(interval.high);
      }),
      { numRuns: 60 },
    );
  });
});
