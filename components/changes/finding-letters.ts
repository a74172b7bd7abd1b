import type { Finding } from "@/lib/domain/findings";
import { findingKey } from "@/lib/domain/findings";
import type { CheckReport, Effect, ParameterChange } from "@/lib/review/types";

type ByFinding<T> = Readonly<Record<string, T>>;

function sameAxis(one: string | null, other: string | null): boolean {
  return one === null || one.toLowerCase() === other?.toLowerCase();
}

/** Revision letters of the changes that a finding rests on: those that move its quantity, and those it names itself. */
export function lettersByFinding(
  findings: readonly Finding[],
  { changes, effects }: { changes: readonly ParameterChange[]; effects: readonly Effect[] },
): ByFinding<readonly string[]> {
  return Object.fromEntries(
    findings.map((finding) => [findingKey(finding), lettersOf(finding, changes, effects)]),
  );
}

function lettersOf(
  finding: Finding,
  changes: readonly ParameterChange[],
  effects: readonly Effect[],
): readonly string[] {
  const moved = effects
    .filter(({ ruleId, axis }) => ruleId === finding.ruleId && axis === finding.axis)
    .flatMap(({ letters }) => letters);
  const named = changes
    .filter(({ axis, parameter }) => sameAxis(axis, finding.axis) && finding.parameters.includes(parameter))
    .map(({ letter }) => letter);
  const order = changes.map(({ letter }) => letter);
  return [...new Set([...moved, ...named])].sort((a, b) => order.indexOf(a) - order.indexOf(b));
}

/** What each check had before the change, for the gauge's open dot. */
export function valuesBefore(baseReport: CheckReport): ByFinding<number> {
  return Object.fromEntries(
    baseReport.findings.flatMap((finding) =>
      finding.value === null ? [] : [[findingKey(finding), finding.value]],
    ),
  );
}
