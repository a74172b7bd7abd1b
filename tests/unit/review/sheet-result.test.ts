import { describe, expect, it } from "vitest";
import type { HeatPlan, LadderPlan, TestPlan, Trial } from "@/lib/domain/test-sheets";
import { levelOf, type RungTrial } from "@/lib/physics/evidence/ladder";
import { ladderResult } from "@/lib/review/ladder-result";
import { runResult } from "@/lib/review/run-result";
import { sheetResult } from "@/lib/review/sheet-result";
import { planTest } from "@/lib/review/test-plan";
import { world } from "../rules/world";

const LADDER: LadderPlan = {
  parameter: "acceleration",
  unit: "m/s²",
  basis: null,
  start: 4,
  step: 0.2,
  fails: "above",
  set: 3,
  predicted: { careful: 4, farthest: 5 },
  why: "",
  margin: 0.5,
  load: { torque: 0.02, inertia: 2e-5, radius: 0.00637 },
  most: null,
};

/** Climbs a ladder whose threshold is sharp. */
function climb(plan: LadderPlan, fails: (level: number) => boolean, count: number): RungTrial[] {
  const trials: RungTrial[] = [];
  while (trials.length < count) {
    const { rung } = ladderResult(plan, trials).next;
    trials.push({ rung, failed: fails(levelOf(plan, rung)) });
  }
  return trials;
}

function entry(more: Partial<Trial>): Trial {
  return {
    id: crypto.randomUUID(),
    rung: null,
    result: null,
    deviation: null,
    temperatures: [],
    ambientC: null,
    minutes: null,
    note: "",
    doneAt: "2026-12-01T10:00:00.000Z",
    ...more,
  };
}

function planOf(test: TestPlan["test"], more: Partial<TestPlan> = {}): TestPlan {
  const planned = planTest({ ...world().input, axis: "x", test });
  if (!planned?.ok) throw new Error("no plan");
  return { ...planned.plan, ...more };
}

describe("the result of a ladder", () => {
  it("says how far it has come while there is no estimate", () => {
    expect(ladderResult(LADDER, []).sentences).toEqual(["No trial is entered yet."]);
    const one = ladderResult(LADDER, [{ rung: 0, failed: false }]);
    expect(one).toMatchObject({ estimate: null, recommended: null, next: { rung: 4 } });
    expect(one.sentences[0]).toContain("all with the same outcome");
  });

  it("recommends the estimate less the margin on torque, rounded to the safe side", () => {
    const result = ladderResult(
      LADDER,
      climb(LADDER, (level) => level > 4.31, 20),
    );
    expect(result.estimate!.mean).toBeCloseTo(4.3, 1);
    const torque = (a: number) => 0.02 + (2e-5 * a) / 0.00637;
    const margin = torque(result.estimate!.mean) / torque(result.recommended!) - 1;
    expect(margin).toBeGreaterThanOrEqual(0.5);
    expect(margin).toBeLessThan(0.6);
    expect(result.sentences.at(-1)).toMatch(
      /^Recommended acceleration: at most [\d.]+ mm\/s², .* torque margin of 50 % kept\.$/,
    );
  });

  it("says that the margin lies on the acceleration alone where the load is not known", () => {
    const plan = { ...LADDER, load: null };
    const result = ladderResult(
      plan,
      climb(plan, (level) => level > 4.31, 20),
    );
    expect(result.sentences.at(-1)).toContain("The load torque is not known");
    expect(result.recommended).toBeLessThanOrEqual(result.estimate!.mean / 1.5);
  });

  it("recommends nothing where the load takes up the torque that may be used", () => {
    const plan = { ...LADDER, load: { torque: 0.2, inertia: 2e-5, radius: 0.00637 } };
    const result = ladderResult(
      plan,
      climb(plan, (level) => level > 4.31, 20),
    );
    expect(result.recommended).toBeNull();
    expect(result.sentences.at(-1)).toContain("the load alone takes up");
  });

  it("never recommends a current above the rated one", () => {
    const plan: LadderPlan = {
      ...LADDER,
      parameter: "run_current",
      unit: "A",
      basis: "rms",
      start: 1,
      step: 0.05,
      fails: "below",
      load: null,
      most: 1.5,
    };
    const fitting = ladderResult(
      plan,
      climb(plan, (amperes) => amperes < 0.63, 20),
    );
    expect(fitting.recommended).toBeGreaterThanOrEqual(1.5 * fitting.estimate!.mean);
    expect(fitting.sentences.at(-1)).toMatch(/at least 0\.9\d? A rms/);
    const tooMuch = ladderResult(
      plan,
      climb(plan, (amperes) => amperes < 1.21, 20),
    );
    expect(tooMuch.recommended).toBeNull();
    expect(tooMuch.sentences.at(-1)).toContain("No current up to the rated 1.5 A rms");
  });

  it("asks for more trials until the estimate stands", () => {
    const early = ladderResult(
      LADDER,
      climb(LADDER, (level) => level > 4.31, 8),
    );
    expect(early.sentences.join()).toMatch(/more trials on single steps are wanted/);
    const whole = ladderResult(
      LADDER,
      climb(LADDER, (level) => level > 4.31, 20),
    );
    expect(whole.sentences.join()).not.toMatch(/are wanted/);
    expect(whole.sentences.join()).toContain("The step is too coarse for the scatter");
  });
});

describe("the result of a run", () => {
  const plan = { trials: 29, reliability: 0.9, confidence: 0.95 };
  const outcomes = (passes: number, failures: number) => [
    ...Array.from({ length: passes }, () => "pass" as const),
    ...Array.from({ length: failures }, () => "fail" as const),
  ];

  it("claims the bound alone, rounded down", () => {
    const result = runResult(plan, outcomes(29, 0));
    expect(result.met).toBe(true);
    // 0.05^(1/29) = 0.90186: never 90.2.
    expect(result.sentences[0]).toContain("at least 90.1 % of such trials succeed, at 95 % confidence");
    expect(result.sentences[0]).toContain("90.4 % with a uniform prior, n + 1");
  });

  it("asks for more trials after a loss", () => {
    const result = runResult(plan, outcomes(28, 1));
    expect(result).toMatchObject({ met: false, needed: 46, failures: 1 });
    expect(result.sentences[1]).toBe(
      "17 more trials without a loss are wanted for the demanded 90 % after 1 loss.",
    );
  });

  it("says nothing is shown before the first trial", () => {
    expect(runResult(plan, [])).toMatchObject({ shown: 0, met: false });
  });
});

describe("the result of a heat record", () => {
  const heat: HeatPlan = {
    expected: [{ place: "case", settledRise: 40, riseAfter30: 40 * (1 - Math.exp(-1)), tolerance: 8 }],
    ambientC: 35,
  };
  const plan = planOf("heat_record", { heat });
  const reading = (celsius: number, minutes: number | null, ambientC: number | null = 20) =>
    entry({ temperatures: [{ place: "case", celsius, by: "sensor" }], minutes, ambientC });
  const said = (...trials: Trial[]) => sheetResult(plan, trials).sentences;

  it("holds a rise against the one expected by then", () => {
    expect(said(reading(45, 30))).toEqual([
      "Motor case: 25 K above 20 °C after 30 min; 25.3 K expected by then, 40 K once settled: within 8 K.",
    ]);
  });

  it("says by how much it is hotter than its tolerance, and what to look at", () => {
    const [words] = said(reading(45, 30), reading(75, null));
    expect(words).toContain("15 K hotter, more than the 8 K of its tolerance");
    expect(words).toContain("sense resistor");
  });

  it("takes the room's temperature from another entry, and says so where there is none", () => {
    expect(said(reading(45, 30), reading(60, 90, null))[0]).toContain("40 K above 20 °C");
    expect(said(reading(60, 90, null))[0]).toContain("without the ambient");
  });
});

describe("lost-step arithmetic on a sheet", () => {
  const plan = planOf("move_run", { repeatability: 0.3 });
  const off = (value: number, result: Trial["result"]) =>
    entry({ result, deviation: { value, unit: "full steps" } });
  const said = (...trials: Trial[]) => sheetResult(plan, trials).sentences.join("\n");

  it("names remainders that lost steps do not explain, and slipped teeth", () => {
    expect(said(off(5, "fail"))).toContain("1 entry shows a remainder that lost steps do not explain");
    expect(said(off(10, "fail"))).toContain("slipped belt teeth");
    expect(said(off(4, "fail"))).not.toContain("do not explain");
  });

  it("points at entries that passed with whole slips", () => {
    expect(said(off(8, "pass"))).toContain("1 entry is marked as passed although whole slips were read");
  });
});
