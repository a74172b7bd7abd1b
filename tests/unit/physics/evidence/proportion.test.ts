import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  betaQuantile,
  betaShare,
  binomialShare,
  normalQuantile,
  normalShare,
} from "@/lib/physics/evidence/distributions";
import { clopperPearson, wilsonInterval } from "@/lib/physics/evidence/proportion";
import {
  MOST_TRIALS,
  reliabilityShown,
  reliabilityWithUniformPrior,
  trialsNeeded,
} from "@/lib/physics/evidence/success-run";

describe("distributions", () => {
  // Source: Abramowitz & Stegun, Table 26.1 and 26.5, from memory.
  it.each([
    [0.5, 0],
    [0.975, 1.959963984540054],
    [0.95, 1.6448536269514722],
    [0.999, 3.090232306167813],
    [1e-6, -4.753424308822899],
  ])("the normal deviate of %d is %d", (share, z) => {
    expect(normalQuantile(share)).toBeCloseTo(z, 8);
    expect(normalShare(z)).toBeCloseTo(share, 10);
  });

  it("counts binomial outcomes as their sum does", () => {
    const sum = 0.9 ** 10 + 10 * 0.1 * 0.9 ** 9 + 45 * 0.1 ** 2 * 0.9 ** 8;
    expect(binomialShare(2, 10, 0.1)).toBeCloseTo(sum, 13);
    expect(binomialShare(10, 10, 0.1)).toBe(1);
  });

  it("finds again the share that a quantile was taken for", () => {
    // Near 1 and with a half for a parameter, the nearest number to the quantile is off by 1e-8 in the share.
    const size = fc.double({ min: 0.5, max: 400, noNaN: true });
    fc.assert(
      fc.property(size, size, fc.double({ min: 1e-6, max: 1 - 1e-6, noNaN: true }), (a, b, share) => {
        expect(betaShare(betaQuantile(share, a, b), a, b)).toBeCloseTo(share, 6);
      }),
    );
  });
});

describe("intervals of a share", () => {
  const counts = fc
    .integer({ min: 1, max: 300 })
    .chain((n) => fc.tuple(fc.integer({ min: 0, max: n }), fc.constant(n)));

  it("hold the share that was seen and stay between 0 and 1", () => {
    fc.assert(
      fc.property(counts, ([k, n]) => {
        for (const { low, high } of [wilsonInterval(k, n, 1.96), clopperPearson(k, n, 0.95)]) {
          expect(low).toBeGreaterThanOrEqual(0);
          expect(high).toBeLessThanOrEqual(1);
          expect(low).toBeLessThanOrEqual(k / n + 1e-12);
          expect(high).toBeGreaterThanOrEqual(k / n - 1e-12);
        }
      }),
    );
  });

  it("mirror each other for passes and failures", () => {
    fc.assert(
      fc.property(counts, ([k, n]) => {
        expect(clopperPearson(n - k, n, 0.9).low).toBeCloseTo(1 - clopperPearson(k, n, 0.9).high, 9);
        expect(wilsonInterval(n - k, n, 1.645).low).toBeCloseTo(1 - wilsonInterval(k, n, 1.645).high, 9);
      }),
    );
  });
});

describe("a success run", () => {
  it("asks for the smallest number of trials that shows what is demanded", () => {
    const share = fc.double({ min: 0.5, max: 0.99, noNaN: true });
    fc.assert(
      fc.property(share, share, fc.integer({ min: 0, max: 3 }), (reliability, confidence, failures) => {
        const trials = trialsNeeded({ reliability, confidence, failures })!;
        expect(reliabilityShown({ trials, failures, confidence })).toBeGreaterThanOrEqual(reliability - 1e-9);
        const fewer = { trials: trials - 1, failures, confidence };
        if (trials - 1 > failures) expect(reliabilityShown(fewer)).toBeLessThan(reliability + 1e-9);
      }),
    );
  });

  it("takes exact logarithms for what they are", () => {
    expect(trialsNeeded({ reliability: 0.5, confidence: 0.75 })).toBe(2);
    expect(trialsNeeded({ reliability: 0.1, confidence: 0.99 })).toBe(2);
  });

  it("says that no bench meets some demands", () => {
    expect(trialsNeeded({ reliability: 1 - 1e-9, confidence: 0.95 })).toBeNull();
    expect(trialsNeeded({ reliability: 0.9999, confidence: 0.95 })).toBeLessThan(MOST_TRIALS);
  });

  it("shows less with each failure and more with each trial", () => {
    const shown = (trials: number, failures: number) =>
      reliabilityShown({ trials, failures, confidence: 0.95 });
    expect(shown(30, 1)).toBeLessThan(shown(30, 0));
    expect(shown(60, 1)).toBeGreaterThan(shown(30, 1));
    expect(shown(5, 5)).toBe(0);
    // The prior counts like one trial more.
    expect(reliabilityWithUniformPrior({ trials: 29, failures: 0, confidence: 0.95 })).toBeCloseTo(
      shown(30, 0),
      12,
    );
  });
});
