import type { Assembly } from "@/lib/domain/assembly";
import type { Finding } from "@/lib/domain/findings";
import { gravest, levelRank, type Level } from "@/lib/domain/levels";
import { parameterRank } from "@/lib/domain/parameters";
import type { Policy } from "@/lib/domain/policy";
import type { ParameterValue } from "@/lib/domain/values";
import { evaluateRules } from "@/lib/rules/evaluate-rules";
import type { RuleResult } from "@/lib/rules/types";
import { parameterKey } from "./axis-word";
import { attributeConsequences, byGravity } from "./drift-consequences";
import { machineSentence, unknownSentence } from "./drift-machine-sentence";
import { differingPairs, withValues, type DifferingPair } from "./drift-pairs";
import { driftSentence, type Checked, type DriftSide } from "./drift-sentence";
import type { Consequence, Drift, DriftItem } from "./drift-types";
import type { CountedValue } from "./standing";
import type { CheckReport } from "./types";

const DAY_MS = 86_400_000;

export interface DriftInput {
  /** The report of the machine's required text, on the machine's own hardware and today's policy. */
  readonly required: CheckReport;
  readonly counted: readonly CountedValue[];
  readonly assembly: Assembly;
  readonly policy: Policy;
  /** The moment at which a reading is fresh or stale. */
  readonly asOf: Date;
}

/**
 * Where a machine stands against its required configuration, each difference with its physical consequence. The
 * required configuration and the actual one (what counts put in place of what is required) are both evaluated; what is
 * worse is laid to the drifted values by evaluating each alone. A value that no layer has is *not read*, one older than
 * the policy's days is *stale*: both keep the machine from being on baseline. A value that nothing requires is an item
 * only where it makes a check worse.
 */
export function driftOf(input: DriftInput): Drift {
  const desk = openDesk(input);
  const items = [...differingItems(desk), ...unknownItems(desk)].sort(compareItems);
  const { parameters } = input.required;
  return {
    level: parameters.length === 0 ? "cannot" : items.length === 0 ? null : gravest(items.map(levelOf)),
    items,
    sentence: machineSentence({ items, required: parameters }),
    findings: desk.actual.findings,
  };
}

interface Desk {
  readonly input: DriftInput;
  readonly pairs: readonly DifferingPair[];
  readonly actual: Pick<RuleResult, "findings" | "quantities">;
  readonly sides: { readonly required: DriftSide; readonly actual: DriftSide };
  readonly consequences: ReadonlyMap<string, readonly Consequence[]>;
}

function openDesk(input: DriftInput): Desk {
  const { required, assembly, policy } = input;
  const evaluate = (values: readonly ParameterValue[]) =>
    evaluateRules({ parameters: withValues(required.parameters, values), assembly, policy });
  const pairs = differingPairs(required.parameters, input.counted);
  const values = pairs.map(({ counted }) => counted.value);
  const actual = values.length === 0 ? required : evaluate(values);
  const alone = values.map((value) => ({
    value,
    findings: values.length === 1 ? actual.findings : evaluate([value]).findings,
  }));
  const parameters = withValues(required.parameters, values);
  return {
    input,
    pairs,
    actual,
    sides: { required, actual: { parameters, quantities: actual.quantities } },
    consequences: attributeConsequences({ required: required.findings, actual: actual.findings, alone }),
  };
}

function differingItems(desk: Desk): DriftItem[] {
  return desk.pairs.flatMap((pair) => {
    const consequences = desk.consequences.get(parameterKey(pair.counted)) ?? [];
    if (pair.required === null && consequences.length === 0) return [];
    return [differingItem(desk, pair, consequences)];
  });
}

function differingItem(desk: Desk, pair: DifferingPair, consequences: readonly Consequence[]): DriftItem {
  const { axis, parameter, value } = pair.counted;
  const staleDays = staleDaysOf(desk, pair.counted);
  const checked = howChecked(value, desk.actual.findings);
  const sentence = driftSentence({
    axis,
    parameter,
    required: pair.required,
    actual: value,
    consequence: consequences[0] ?? null,
    checked,
    sides: desk.sides,
  });
  const levels: Level[] = consequences.map(({ toBe }) => toBe.level);
  if (parameter === "direction_reversed") levels.push("near");
  if (checked === "cannot" || staleDays !== null) levels.push("cannot");
  return {
    kind: "differs",
    axis,
    parameter,
    required: pair.required,
    actual: value,
    ...readingOf(pair.counted),
    staleDays,
    share: shareOf(pair),
    level: gravest(levels),
    consequences,
    sentence: staleDays === null ? sentence : `${sentence}, read ${staleDays} days ago`,
  };
}

/** A drift that its checks could not judge is never within limits for that. */
function howChecked({ axis, parameter }: ParameterValue, findings: readonly Finding[]): Checked {
  const resting = findings.filter(
    (finding) =>
      finding.parameters.includes(parameter) &&
      (axis === null || finding.axis === null || finding.axis.toLowerCase() === axis.toLowerCase()),
  );
  if (resting.length === 0) return "no_check";
  return resting.every(({ level }) => level === "cannot") ? "cannot" : "judged";
}

/** Required values that no layer has, and values as required whose reading is too old. */
function unknownItems(desk: Desk): DriftItem[] {
  const { required, counted } = desk.input;
  const known = new Map(counted.map((value) => [parameterKey(value), value]));
  const differing = new Set(desk.pairs.map((pair) => parameterKey(pair.counted)));
  return required.parameters.flatMap((value) => {
    const found = known.get(parameterKey(value));
    if (differing.has(parameterKey(value))) return [];
    const staleDays = found ? staleDaysOf(desk, found) : null;
    return found && staleDays === null ? [] : [unknownItem(value, found ?? null, staleDays)];
  });
}

function unknownItem(
  required: ParameterValue,
  found: CountedValue | null,
  staleDays: number | null,
): DriftItem {
  const { axis, parameter } = required;
  return {
    kind: found ? "stale" : "not_read",
    axis,
    parameter,
    required,
    actual: found?.value ?? null,
    ...readingOf(found),
    staleDays,
    share: null,
    level: "cannot",
    consequences: [],
    sentence: unknownSentence({ axis, parameter, staleDays }),
  };
}

function readingOf(counted: CountedValue | null): Pick<DriftItem, "layer" | "readingId" | "readAt"> {
  return {
    layer: counted?.layer ?? null,
    readingId: counted?.readingId ?? null,
    readAt: counted?.readAt ?? null,
  };
}

function staleDaysOf({ input }: Desk, { readAt }: CountedValue): number | null {
  const days = (input.asOf.getTime() - readAt.getTime()) / DAY_MS;
  return days > input.policy.stale_after_days ? Math.floor(days) : null;
}

function shareOf({ required, counted, change }: DifferingPair): number | null {
  if (required === null) return null;
  return Math.max(-1, Math.min(1, change ?? Math.sign(counted.value.value - required.value)));
}

function levelOf({ level }: DriftItem): Level {
  return level;
}

const KIND_RANK: Record<DriftItem["kind"], number> = { differs: 0, not_read: 1, stale: 2 };

function compareItems(one: DriftItem, other: DriftItem): number {
  const [first, second] = [one.consequences[0], other.consequences[0]];
  return (
    levelRank(one.level) - levelRank(other.level) ||
    KIND_RANK[one.kind] - KIND_RANK[other.kind] ||
    (first && second ? byGravity(first, second) : Number(!first) - Number(!second)) ||
    parameterRank(one.parameter) - parameterRank(other.parameter)
  );
}
