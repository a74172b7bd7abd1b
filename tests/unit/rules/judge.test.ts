import { describe, expect, test } from "vitest";
import { RULES } from "@/lib/rules/table";
import { ruleContext } from "@/lib/rules/view";
import { exampleAssembly, EXAMPLE_TEXT, texts, world } from "./world";

const INPUTS = {
  "the example": world(EXAMPLE_TEXT, exampleAssembly()).input,
  "far too much current": world(
    texts({ run_current: { typed: 3000, unit: "mA", factor: 1e-3, basis: "rms" } }),
    exampleAssembly(),
  ).input,
  "no hardware at all": world(EXAMPLE_TEXT, { axes: [{ axis: "x" }] }).input,
};

describe("bare verdicts", () => {
  test.each(Object.entries(INPUTS))("say for %s what the findings say", (_, input) => {
    const context = ruleContext(input);
    for (const rule of RULES) {
      const verdicts = rule
        .judge(context)
        .map(({ axis, assessment }) =>
          assessment.ok ? [axis, assessment.level, assessment.value] : [axis, "cannot", null],
        );
      expect(verdicts, rule.id).toEqual(
        rule.evaluate(context).map(({ axis, level, value }) => [axis, level, value]),
      );
    }
  });
});
