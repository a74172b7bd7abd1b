import { describe, expect, test } from "vitest";
import { seededRandom } from "@/lib/review/random";
import { toleranceOdds, USUAL_SPREADS, type OddsInput, type Spreads } from "@/lib/review/tolerance-odds";
import { assemblyWith, EXAMPLE_TEXT, exampleAssembly, texts, world } from "../rules/world";

const NONE: Spreads = { label: 0, resistance: 0, senseResistor: 0, supply: 0, ambientK: 0 };

function asked(more: Partial<OddsInput> = {}): OddsInput {
  return { input: world().input, axis: "X", spreads: USUAL_SPREADS, samples: 400, seed: 7, ...more };
}

const row = (input: OddsInput, ruleId: string) =>
  toleranceOdds(input).limits.find((limit) => limit.ruleId === ruleId)!;

const atLimit = (mA: number) =>
  world(texts({ run_current: { typed: mA, unit: "mA", factor: 1e-3, basis: "rms" } })).input;

describe("numbers from a seed", () => {
  test("are the same for the same seed and spread evenly", () => {
    const [one, other] = [seededRandom(3), seededRandom(3)];
    const drawn = Array.from({ length: 20_000 }, () => one());
    expect(Array.from({ length: 20_000 }, () => other())).toEqual(drawn);
    const mean = drawn.reduce((sum, number) => sum + number, 0) / drawn.length;
    expect(Math.abs(mean - 0.5)).toBeLessThan(4 * Math.sqrt(1 / 12 / drawn.length));
    expect(Math.min(...drawn)).toBeGreaterThanOrEqual(0);
    expect(Math.max(...drawn)).toBeLessThan(1);
  });
});

describe("tolerance odds", () => {
  test("are the same for the same seed and others for another", () => {
    const input = atLimit(1450);
    const first = toleranceOdds(asked({ input }));
    expect(toleranceOdds(asked({ input }))).toEqual(first);
    expect(toleranceOdds(asked({ input, seed: 8 }))).not.toEqual(first);
  });

  test("without any spread are nothing but the nominal verdicts", () => {
    const { limits } = toleranceOdds(asked({ spreads: NONE, samples: 50 }));
    for (const { level, over, nearOrOver, value, low, high, ruleId } of limits.filter(
      (one) => one.ruleId !== "supply-voltage",
    )) {
      expect([over, nearOrOver], ruleId).toEqual([level === "over" ? 1 : 0, level === "within" ? 0 : 1]);
      expect([low, high], ruleId).toEqual([value, value]);
    }
  });

  test("of a current at its rating agree with the share of labels below it, within four standard errors", () => {
    // 1.45 A on a label of 1.5 A ± 10 %, rectangular: over where the true rating is below 1.45 A, (0.1 − 0.0333)/0.2.
    const input = asked({ input: atLimit(1450), spreads: { ...NONE, label: 0.1 }, samples: 2000 });
    const { over, standardError } = row(input, "run-current-motor");
    const exact = (0.1 - (1 - 1.45 / 1.5)) / 0.2;
    expect(standardError).toBeCloseTo(Math.sqrt((over * (1 - over)) / 2000), 12);
    expect(Math.abs(over - exact)).toBeLessThan(4 * standardError);
  });

  test("move the current against the sense resistor", () => {
    const input = asked({ spreads: { ...NONE, senseResistor: 0.05 } });
    const { low, high, value } = row(input, "run-current-motor");
    expect(low! / value!).toBeGreaterThan(1 / 1.05);
    expect(low! / value!).toBeLessThan(0.97);
    expect(high! / value!).toBeGreaterThan(1.03);
    expect(high! / value!).toBeLessThan(1 / 0.95);
  });

  test("move no current of a driver recorded without a sense resistor", () => {
    const bare = assemblyWith((axis) => {
      axis.driver!.set_point = { method: "direct", sense_resistance_ohm: 0 };
    });
    const { input } = world(EXAMPLE_TEXT, bare);
    const { low, high, value } = row(
      asked({ input, spreads: { ...NONE, senseResistor: 0.05 }, samples: 50 }),
      "run-current-motor",
    );
    expect([low, high]).toEqual([value, value]);
  });

  test("draw the supply in place of its own tolerance", () => {
    const { high } = row(asked({ spreads: { ...NONE, supply: 0.05 } }), "supply-voltage");
    expect(high!).toBeLessThanOrEqual(24 * 1.05);
    const still = row(asked({ spreads: NONE, samples: 50 }), "supply-voltage");
    expect(still.high).toBeCloseTo(24, 12);
  });

  test("spread a temperature by the room as far as the room goes", () => {
    const { low, high, value } = row(asked({ spreads: { ...NONE, ambientK: 5 } }), "winding-temperature");
    expect(high! - value!).toBeGreaterThan(3.5);
    expect(high! - value!).toBeLessThan(6.5);
    expect(value! - low!).toBeGreaterThan(3.5);
  });

  test("name the checks that cannot be made, and count none of their samples", () => {
    const bare = assemblyWith((axis) => {
      delete axis.motor!.winding_to_ambient_k_per_w;
    });
    const { limits, cannot } = toleranceOdds(asked({ input: world(EXAMPLE_TEXT, bare).input, samples: 50 }));
    const lacking = cannot.find(({ ruleId }) => ruleId === "winding-temperature");
    expect(lacking?.needs).toContain("axes.x.motor.winding_to_ambient_k_per_w");
    expect(limits.map(({ ruleId }) => ruleId)).not.toContain("winding-temperature");
  });

  test("tell how far they are", () => {
    const shares: number[] = [];
    toleranceOdds(asked({ input: world(EXAMPLE_TEXT, exampleAssembly()).input, samples: 100 }), (share) =>
      shares.push(share),
    );
    expect(shares).toEqual([0.5, 1]);
  });
});
