import { describe, expect, it } from "vitest";
import { changeSummary } from "@/lib/review/change-summary";
import type { Effect, ParameterChange } from "@/lib/review/types";
import { finding } from "./support/findings";

const change = (fields: Partial<ParameterChange>): ParameterChange => ({
  letter: "A",
  axis: "x",
  parameter: "run_current",
  was: { value: 0.85, unit: "A", basis: "rms", line: 42, path: "axes.conf" },
  toBe: { value: 1.05, unit: "A", basis: "rms", line: 42, path: "axes.conf" },
  change: 0.2353,
  ...fields,
});

const effect = (fields: Partial<Effect>): Effect => ({
  axis: "x",
  quantity: "case_c",
  label: "Motor case",
  unit: "°C",
  was: 51.2,
  toBe: 64.1,
  limit: 58,
  limitSense: "upper",
  nearLimit: 48,
  levelWas: "near",
  levelToBe: "over",
  ruleId: "mount-temperature",
  letters: ["A"],
  missing: [],
  ...fields,
});

describe("changeSummary", () => {
  it("reads as plain lines: parameters, effects with limit and level, findings that stand, gravest first", () => {
    const lines = changeSummary({
      changes: [
        change({}),
        change({
          letter: "B",
          axis: null,
          parameter: "max_step_rate",
          was: null,
          change: null,
          toBe: { value: 45_000, unit: "Hz", basis: null, line: 3, path: "axes.conf" },
        }),
        change({
          letter: "C",
          parameter: "direction_reversed",
          change: null,
          was: { value: 0, unit: "", basis: null, line: 50, path: "axes.conf" },
          toBe: { value: 1, unit: "", basis: null, line: 50, path: "axes.conf" },
        }),
      ],
      effects: [
        effect({}),
        effect({
          axis: null,
          label: "Bus voltage after braking",
          was: null,
          toBe: null,
          limit: null,
          limitSense: null,
          levelWas: "cannot",
          levelToBe: "cannot",
          letters: [],
          missing: ["supply.bus_capacitance_uf"],
        }),
        effect({
          label: "Torque margin",
          unit: "",
          was: 0.91,
          toBe: 0.83,
          limit: 1,
          limitSense: "lower",
          nearLimit: 1.2,
          letters: ["A", "B"],
        }),
      ],
      findings: [
        finding({ ruleId: "step-rate", level: "near", sentence: "The step rate is near." }),
        finding({ ruleId: "torque-margin", level: "within" }),
        finding({
          ruleId: "mount-temperature",
          level: "over",
          sentence: "The motor case would reach 64 °C.",
        }),
      ],
    });
    expect(lines).toEqual([
      "Parameters (was → to be)",
      "  A  X axis, run current: 0.85 A rms → 1.05 A rms (+23.5 %), axes.conf line 42",
      "  B  Maximum step rate: not in the text → 45 kHz, axes.conf line 3",
      "  C  X axis, direction reversed: no → yes, axes.conf line 50",
      "",
      "Effects (was → to be; in the gauges o is was, * is to be, # the limit)",
      "  X axis, motor case: 51.2 °C → 64.1 °C, limit ≤ 58 °C, over limit (A)",
      "    [-------------=o#/*//////]",
      "  Bus voltage after braking: no number, cannot check, not known: bus capacitance of the supply",
      "  X axis, torque margin: 0.91 → 0.83, limit ≥ 1, over limit (A, B)",
      "    [------------===#/o*/////]",
      "",
      "Findings",
      "  over limit: X axis, temperature of the mount. The motor case would reach 64 °C.",
      "  near limit: X axis, step rate. The step rate is near.",
    ]);
  });

  it("leaves out what there is nothing to say about", () => {
    expect(changeSummary({ changes: [], effects: [], findings: [] })).toEqual([]);
  });
});
