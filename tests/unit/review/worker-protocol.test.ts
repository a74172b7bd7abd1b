import { describe, expect, it } from "vitest";
import { answerLive } from "@/lib/review/worker-protocol";
import { TEXT, check, edited, input } from "./support/gantry";

describe("answerLive", () => {
  it("answers under the request's number with report, changes, effects and comparison", () => {
    const text = edited("x", "amps = 0.85", "amps = 1.6");
    const answer = answerLive({ id: 7, input: input(text), baseline: check(TEXT) });
    expect(answer.id).toBe(7);
    expect(answer.report).toEqual(check(text));
    expect(answer.changes.map(({ letter, parameter }) => [letter, parameter])).toEqual([
      ["A", "run_current"],
    ]);
    expect(answer.effects.find((effect) => effect.quantity === "winding_current_rms")?.toBe).toBeCloseTo(
      1.6,
      9,
    );
    expect(answer.comparison.fresh.map(({ ruleId }) => ruleId)).toContain("run-current-motor");
  });

  it("answers the report alone where there is no baseline to compare with", () => {
    const answer = answerLive({ id: 1, input: input(TEXT) });
    expect([answer.changes, answer.effects, answer.comparison.fresh, answer.comparison.cleared]).toEqual([
      [],
      [],
      [],
      [],
    ]);
    expect(answer.report.parameters).toHaveLength(15);
  });

  it("is a message that a worker can post", () => {
    const answer = answerLive({ id: 1, input: input(TEXT), baseline: null });
    expect(structuredClone(answer)).toEqual(answer);
  });
});
