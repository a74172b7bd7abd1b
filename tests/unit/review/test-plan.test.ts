import { describe, expect, it } from "vitest";
import type { Assembly } from "@/lib/domain/assembly";
import type { Test } from "@/lib/domain/test-sheets";
import { levelOf } from "@/lib/physics/evidence/ladder";
import { planTest, PLAN_DEFAULTS, type PlanChoices } from "@/lib/review/test-plan";
import { ruleContext } from "@/lib/rules/view";
import { assemblyWith, exampleAssembly, EXAMPLE_TEXT, world, type Texts } from "../rules/world";

interface Asked {
  readonly test: Test;
  readonly texts?: Texts;
  readonly assembly?: Assembly;
  readonly choices?: Partial<PlanChoices>;
}

function planOf({ test, texts = EXAMPLE_TEXT, assembly = exampleAssembly(), choices = {} }: Asked) {
  const { input } = world(texts, assembly);
  return planTest({ ...input, axis: "X", test }, { ...PLAN_DEFAULTS, ...choices });
}

function plan(asked: Asked) {
  const planned = planOf(asked);
  if (!planned?.ok) throw new Error(planned?.why ?? "no such axis");
  return planned.plan;
}

const marginAt = (name: "acceleration" | "run_current", value: number): number => {
  const view = ruleContext(world().input).axes[0]!;
  const found = view.withValue(name, value).quantity("torque_margin");
  return found.ok ? found.value : NaN;
};

describe("an acceleration ladder", () => {
  const { ladder } = plan({ test: "acceleration_ladder" });

  it("turns where the predicted torque margin is 0, and at the latest where the true pull-out may end", () => {
    expect(marginAt("acceleration", ladder!.predicted!.careful)).toBeCloseTo(0, 6);
    expect(marginAt("acceleration", ladder!.predicted!.farthest!)).toBeCloseTo(-0.26, 6);
  });

  it("starts within one step of the prediction, on a whole step", () => {
    const { start, step, predicted } = ladder!;
    expect(Math.abs(start - predicted!.careful)).toBeLessThanOrEqual(step);
    expect(start / step).toBeCloseTo(Math.round(start / step), 9);
    expect(step / predicted!.careful).toBeGreaterThan(0.02);
    expect(step / predicted!.careful).toBeLessThanOrEqual(0.06);
    expect(levelOf(ladder!, 2)).toBeCloseTo(start + 2 * step, 12);
  });

  it("warns where the start lies far from what the text sets", () => {
    expect(ladder!.start).toBeGreaterThan(2 * 3);
    expect(ladder!.why).toMatch(
      /The start is [\d.]+ times away from the 3000 mm\/s² in the text: go there by hand/,
    );
    const near = plan({ test: "acceleration_ladder", choices: { start: 4, step: 0.2 } });
    expect(near.ladder!.why).toBe("Start and step were chosen by hand.");
  });

  it("keeps the margin that the policy wants at the speed of the test", () => {
    expect(ladder!.margin).toBe(world().input.policy.torque_margin_below_limit_speed);
  });

  it("prints what to expect", () => {
    const [reading] = plan({ test: "acceleration_ladder" }).expected;
    expect(reading).toMatch(/^Steps are lost from about [\d.]+ mm\/s² on, reckoned with care/);
    expect(reading).toContain("The text sets 3000 mm/s².");
  });

  it("asks for start and step where no boundary can be predicted, and says what is missing", () => {
    const assembly = assemblyWith((axis) => delete axis.motor!.inductance_mh);
    const refused = planOf({ test: "acceleration_ladder", assembly });
    expect(refused).toMatchObject({ ok: false, why: expect.stringContaining("winding inductance") });
    const byHand = plan({ test: "acceleration_ladder", assembly, choices: { start: 3, step: 0.2 } });
    expect(byHand.ladder).toMatchObject({ start: 3, step: 0.2, predicted: null, load: null });
    expect(byHand.ladder!.why).toContain("winding inductance");
  });

  it("asks for them too where the text does not state the setting", () => {
    const { acceleration: _, ...texts } = EXAMPLE_TEXT;
    expect(planOf({ test: "acceleration_ladder", texts })).toEqual({
      ok: false,
      why: "Not in the text: acceleration.",
    });
  });
});

describe("a ladder of currents", () => {
  const { ladder } = plan({ test: "current_ladder" });

  it("fails below, and never recommends more than the rated current", () => {
    expect(ladder).toMatchObject({ fails: "below", basis: "rms", most: 1.5, set: 0.8 });
    expect(marginAt("run_current", ladder!.predicted!.careful)).toBeCloseTo(0, 6);
    expect(ladder!.predicted!.farthest!).toBeLessThan(ladder!.predicted!.careful);
  });
});

describe("a ladder of corner speeds", () => {
  it("starts at the speed that is sure and may go on to the whole bound", () => {
    const { predicted } = plan({ test: "corner_ladder" }).ladder!;
    expect(predicted!.farthest).toBeCloseTo(2 * predicted!.careful, 12);
  });
});

describe("runs and records", () => {
  it("asks for as many moves as the reliability takes", () => {
    expect(plan({ test: "move_run" }).run).toEqual({ trials: 29, reliability: 0.9, confidence: 0.95 });
    expect(plan({ test: "move_run", choices: { reliability: 0.95 } }).run!.trials).toBe(59);
  });

  it("prints the expected rises settled and after half an hour", () => {
    const { heat, expected } = plan({ test: "heat_record" });
    const [motor] = heat!.expected;
    expect(motor).toMatchObject({ place: "case" });
    expect(motor!.riseAfter30! / motor!.settledRise).toBeCloseTo(1 - Math.exp(-1800 / 1200), 9);
    expect(expected[0]).toMatch(/^Motor case: .* K above ambient once settled .* °C in a room of 35 °C/);
  });

  it("says that the reading after half an hour is not known without the time constant", () => {
    const assembly = assemblyWith((axis) => delete axis.motor!.thermal_time_constant_s);
    expect(plan({ test: "heat_record", assembly }).expected[0]).toContain("thermal time constant is missing");
  });

  it("knows how far a full step and a belt tooth move the axis", () => {
    const { fullStep, toothSteps } = plan({ test: "move_run" });
    expect(fullStep).toBeCloseTo(0.04 / 200, 12);
    expect(toothSteps).toBeCloseTo(10, 9);
  });

  it("warns of a load that falls only where there is one", () => {
    expect(plan({ test: "hold_run" }).falls).toBe(false);
    const upright = assemblyWith((axis) => (axis.load!.incline_deg = 90));
    expect(plan({ test: "hold_run", assembly: upright }).falls).toBe(true);
  });

  it("knows no plan for an axis that the machine does not have", () => {
    expect(planTest({ ...world().input, axis: "q", test: "move_run" })).toBeNull();
  });
});
