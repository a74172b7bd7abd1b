import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { EXPLANATIONS, faultFingerprint, type HeatMeasurement } from "@/lib/physics/fingerprint";
import { windingSteadyState } from "@/lib/physics/motor-heat";

const PREDICTED = {
  current: 0.7,
  holdCurrent: 0.42,
  resistanceAt20: 2.1,
  windingResistance: 8.5,
  caseResistance: 7,
  spread: 0.1,
};

/** Winding and case of a motor, °C, as the laws of its heat have it. */
function truth({ current = 1, resistance = 1, air = 1, ambient = 25 } = {}): HeatMeasurement[] {
  const { temperature, power } = windingSteadyState({
    current: PREDICTED.current * current,
    resistanceAt20: PREDICTED.resistanceAt20 * resistance,
    thermalResistance: PREDICTED.windingResistance + PREDICTED.caseResistance * (air - 1),
    ambient,
  })!;
  return [
    { place: "winding", celsius: temperature, ambient },
    { place: "case", celsius: ambient + PREDICTED.caseResistance * air * power, ambient },
  ];
}

const first = (measured: readonly HeatMeasurement[], spread = PREDICTED.spread) =>
  faultFingerprint({ ...PREDICTED, spread }, measured);

describe("the fingerprint of a fault", () => {
  test.each([
    ["as_predicted", truth()],
    ["peak_for_rms", truth({ current: Math.SQRT2 })],
    ["peak_for_rms", truth({ current: Math.SQRT1_2 })],
    ["hold_current", truth({ current: 0.6 })],
    ["sense_resistor", truth({ current: 2 })],
    ["other_winding", truth({ resistance: 2.9 })],
    ["less_airflow", truth({ air: 2.2 })],
  ] as const)("finds %s in the temperatures that it gives", (explanation, measured) => {
    const { explanations } = first(measured);
    expect(explanations[0]?.explanation).toBe(explanation);
  });

  test("leaves hold current out where it is not known or is the run current, and weighs one of 0", () => {
    const odds = (holdCurrent: number | null, measured: HeatMeasurement[]) =>
      faultFingerprint({ ...PREDICTED, holdCurrent }, measured).explanations;
    for (const same of [null, PREDICTED.current])
      expect(odds(same, truth()).map(({ explanation }) => explanation)).not.toContain("hold_current");
    expect(odds(0, truth({ current: 0 }))[0]).toMatchObject({ explanation: "hold_current", factor: 0 });
    expect(odds(0, truth()).find(({ explanation }) => explanation === "hold_current")?.factor).toBe(0);
  });

  test("finds the factor of a path to the air that is more resistive", () => {
    const { explanations } = first(truth({ air: 2.2 }), 0.02);
    const { factor } = explanations.find(({ explanation }) => explanation === "less_airflow")!;
    expect(factor).toBeGreaterThan(2);
    expect(factor).toBeLessThan(2.4);
  });

  test("gives odds that add up to one, whatever was measured", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -20, max: 300, noNaN: true }),
        fc.double({ min: -20, max: 60, noNaN: true }),
        fc.constantFrom("winding" as const, "case" as const),
        (celsius, ambient, place) => {
          const { explanations } = first([{ place, celsius, ambient }]);
          expect(explanations.map(({ explanation }) => explanation).sort()).toEqual([...EXPLANATIONS].sort());
          expect(explanations.reduce((sum, { odds }) => sum + odds, 0)).toBeCloseTo(1, 9);
          for (const { odds, factor } of explanations) {
            expect(odds).toBeGreaterThanOrEqual(0);
            expect(Number.isFinite(factor)).toBe(true);
          }
        },
      ),
      { numRuns: 30 },
    );
  });

  test("is less sure the less the thermal data are known", () => {
    const [sure] = first(truth({ current: Math.SQRT2 }), 0.05).explanations;
    const unsure = first(truth({ current: Math.SQRT2 }), 0.4).explanations;
    expect(unsure.find(({ explanation }) => explanation === sure?.explanation)!.odds).toBeLessThan(
      sure!.odds,
    );
  });

  test("asks for the current where a winding of twice the resistance would be as warm as peak for rms", () => {
    const { telling } = first(truth({ current: Math.SQRT2 }));
    expect(telling?.measurement).toBe("winding_current");
    const of = (name: string) => telling!.expected.find(({ explanation }) => explanation === name)!.mean;
    expect(of("peak_for_rms") / of("as_predicted")).toBeCloseTo(Math.SQRT2, 3);
    expect(of("other_winding")).toBeCloseTo(of("as_predicted"), 9);
  });

  test("has nothing to say without a measurement, and all explanations are as likely", () => {
    const { explanations, telling } = first([]);
    expect(telling).toBeNull();
    for (const { odds } of explanations) expect(odds).toBeCloseTo(1 / EXPLANATIONS.length, 9);
  });

  test("does without the case where its thermal resistance is not known", () => {
    const [winding] = truth({ current: 2 });
    const { explanations, telling } = faultFingerprint({ ...PREDICTED, caseResistance: null }, [winding!]);
    expect(explanations[0]?.explanation).toBe("sense_resistor");
    expect(telling?.measurement).not.toBe("case");
  });
});
