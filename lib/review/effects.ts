import type { Finding } from "@/lib/domain/findings";
import { gravest, levelRank, type Level } from "@/lib/domain/levels";
import type { ParameterName } from "@/lib/domain/parameters";
import { QUANTITIES, type Quantity, type QuantityName } from "@/lib/domain/quantities";
import { QUANTITY_CHECKS, type QuantityChecks } from "./quantity-checks";
import type { CheckReport, Effect, ParameterChange } from "./types";

/** Two numbers closer than this share of their size are the same. */
const SAME = 1e-9;

export interface EffectsInput {
  readonly before: CheckReport;
  readonly after: CheckReport;
  readonly changes: readonly ParameterChange[];
}

/**
 * What a change does physically, by axis (the machine last) and in the order of QUANTITY_CHECKS: every quantity that
 * moves, every one with a limit that rests on a changed parameter, and on the changed axes what cannot be checked on
 * either side. A revision letter stands at a quantity that rests on that parameter, as its findings say or its definition
 * does (`restsOn`); this needs no further evaluation. Units as in QUANTITIES.
 */
export function effects(input: EffectsInput): Effect[] {
  return axesOf(input).flatMap((axis) =>
    QUANTITY_CHECKS.flatMap((checks) => effectOf(input, { axis, checks }) ?? []),
  );
}

interface Place {
  readonly axis: string | null;
  readonly checks: QuantityChecks;
}

/** One side of an effect. */
interface Side {
  readonly quantity: Quantity | undefined;
  readonly findings: readonly Finding[];
  readonly level: Level | null;
}

function effectOf(input: EffectsInput, place: Place): Effect | null {
  const was = sideOf(input.before, place);
  const toBe = sideOf(input.after, place);
  const letters = lettersAt(input, { place, findings: [...was.findings, ...toBe.findings] });
  const limits = { ...NO_LIMIT, ...(limitsOf(place, toBe) ?? limitsOf(place, was)) };
  const { name, unit } = toBe.quantity ?? was.quantity ?? unitOf(place.checks.quantity);
  const effect = {
    axis: place.axis,
    quantity: name,
    label: labelOf(name, unit),
    unit,
    was: was.quantity?.value ?? null,
    toBe: toBe.quantity?.value ?? null,
    ...limits,
    levelWas: was.level,
    levelToBe: toBe.level,
    letters,
    missing: toBe.quantity ? [] : [...new Set(toBe.findings.flatMap(({ needs }) => needs))],
  };
  return isWorthShowing(effect, input.changes) ? effect : null;
}

function isWorthShowing(effect: Effect, changes: readonly ParameterChange[]): boolean {
  const { was, toBe, levelWas, levelToBe } = effect;
  if (was === null && toBe === null)
    return (
      (levelWas === "cannot" || levelToBe === "cannot") && changes.some((change) => reaches(change, effect))
    );
  if (was === null || toBe === null) return true;
  if (Math.abs(toBe - was) > SAME * Math.max(Math.abs(was), Math.abs(toBe)) || levelWas !== levelToBe)
    return true;
  return effect.limit !== null && effect.letters.length > 0;
}

/** Whether a change and a place share an axis; what belongs to the machine touches every axis. */
function reaches(change: ParameterChange, place: { readonly axis: string | null }): boolean {
  return change.axis === null || place.axis === null || sameAxis(change.axis, place.axis);
}

function lettersAt(
  { changes, before, after }: EffectsInput,
  { place, findings }: { readonly place: Place; readonly findings: readonly Finding[] },
): string[] {
  const { restsOn } = place.checks;
  const names =
    restsOn === "findings"
      ? findings.flatMap(({ parameters }) => parameters)
      : [before, after].flatMap((report) => restsOn((name) => statedBy(report, place.axis, name)));
  return changes
    .filter((change) => names.includes(change.parameter) && reaches(change, place))
    .map(({ letter }) => letter);
}

function statedBy({ parameters }: CheckReport, axis: string | null, name: ParameterName) {
  return parameters.find((value) => value.parameter === name && sameAxis(value.axis, axis));
}

function sideOf(report: CheckReport, { axis, checks }: Place): Side {
  const quantity = report.quantities.find(
    (candidate) => candidate.name === checks.quantity && sameAxis(candidate.axis, axis),
  );
  const findings = report.findings.filter(
    (finding) => checks.ruleIds.includes(finding.ruleId) && sameAxis(finding.axis, axis),
  );
  const level = findings.length === 0 ? null : gravest(findings.map((finding) => finding.level));
  return { quantity, findings, level };
}

type Limits = Pick<Effect, "limit" | "limitSense" | "nearLimit" | "ruleId">;
const NO_LIMIT: Limits = { limit: null, limitSense: null, nearLimit: null, ruleId: null };

/** The limit of the gravest check that has one; a graver check without limit still says where `near` begins. */
function limitsOf({ checks }: Place, { findings }: Side): Limits | null {
  const ranked = [...findings].sort(
    (a, b) => levelRank(a.level) - levelRank(b.level) || (a.margin ?? Infinity) - (b.margin ?? Infinity),
  );
  const [gravestOne] = ranked;
  if (!gravestOne) return null;
  const limiting = ranked.find(({ limit }) => limit !== null) ?? gravestOne;
  const { ruleId, value, limit, nearLimit, limitSense } = limiting;
  if (checks.limit === "none") return { ...NO_LIMIT, ruleId };
  if (checks.limit === "own")
    return { ruleId, limit, limitSense, nearLimit: gravestOne.nearLimit ?? nearLimit };
  const near = value === null || !limit || !nearLimit ? null : (value * limit) / nearLimit;
  return { ruleId, limit: value, limitSense: value === null ? null : "lower", nearLimit: near };
}

function axesOf({ before, after }: EffectsInput): (string | null)[] {
  const axes = new Map<string, string>();
  for (const { axis } of [after, before].flatMap(({ quantities, findings }) => [...findings, ...quantities]))
    if (axis !== null && !axes.has(axis.toLowerCase())) axes.set(axis.toLowerCase(), axis);
  return [...axes.values(), null];
}

function sameAxis(one: string | null, other: string | null): boolean {
  return one === other || (one !== null && one.toLowerCase() === other?.toLowerCase());
}

function unitOf(name: QuantityName): { name: QuantityName; unit: string } {
  return { name, unit: QUANTITIES[name].unit };
}

function labelOf(name: QuantityName, unit: string): string {
  return unit === "1/deg" ? QUANTITIES[name].label.replace("per mm", "per degree") : QUANTITIES[name].label;
}
