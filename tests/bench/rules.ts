import { performance } from "node:perf_hooks";
import { DEFAULT_POLICY } from "@/lib/domain/policy";
import { evaluateRules } from "@/lib/rules/evaluate-rules";
import { EXAMPLE_TEXT, exampleAssembly, exampleAxis, parametersOf } from "../unit/rules/world";

const AXES = ["x", "y", "z", "a", "b"];
const RUNS = 200;

/** A five-axis machine on which every axis is over limit in several checks, so that clearing values are solved too. */
function fiveAxes() {
  const assembly = { ...exampleAssembly(), axes: AXES.map((axis) => exampleAxis(axis)) };
  const text = {
    ...EXAMPLE_TEXT,
    run_current: { typed: 1700, unit: "mA", factor: 1e-3, basis: "rms" as const },
    steps_per_mm: { typed: 160, unit: "steps/mm" },
    max_speed: { typed: 800, unit: "mm/s", factor: 1e-3 },
    acceleration: { typed: 20000, unit: "mm/s^2", factor: 1e-3 },
    corner_speed: { typed: 150, unit: "mm/s", factor: 1e-3 },
  };
  return {
    parameters: AXES.flatMap((axis) => parametersOf(text, assembly, axis)),
    assembly,
    policy: DEFAULT_POLICY,
  };
}

function quantile(sorted: readonly number[], share: number): string {
  return `${(sorted[Math.floor(share * (sorted.length - 1))] ?? 0).toFixed(2)} ms`;
}

/** Time of the checks of a five-axis machine, texts already read: median and p95 of 200 runs. */
export function runRulesBench(): string[] {
  const input = fiveAxes();
  for (let run = 0; run < 50; run++) evaluateRules(input);
  const times = Array.from({ length: RUNS }, () => {
    const start = performance.now();
    evaluateRules(input);
    return performance.now() - start;
  }).sort((one, other) => one - other);
  const { findings } = evaluateRules(input);
  const over = findings.filter(({ level }) => level === "over").length;
  const solved = findings.filter(({ clearingValue }) => clearingValue !== null).length;
  return [
    `checks of 5 axes: ${findings.length} findings, ${over} over limit, ${solved} clearing values`,
    `  median ${quantile(times, 0.5)}, p95 ${quantile(times, 0.95)} of ${RUNS} runs`,
  ];
}
