import { parameterRank, type ParameterName } from "@/lib/domain/parameters";
import type { ParameterValue } from "@/lib/domain/values";

export interface ParameterDifference {
  readonly axis: string | null;
  readonly parameter: ParameterName;
  readonly was: ParameterValue | null;
  readonly toBe: ParameterValue | null;
  /** (toBe − was)/|was| in the basis of `was`; null where either is missing, `was` is 0, or they do not compare. */
  readonly change: number | null;
}

const SAME = 1e-9;
/** Peak and rms differ by √2, which no text can write out: six written digits are the same current. */
const SAME_ACROSS_BASES = 1e-5;

/** Parameters whose meaning differs. Another unit, notation or basis of the same value is no change. */
export function diffParameters(
  before: readonly ParameterValue[],
  after: readonly ParameterValue[],
): ParameterDifference[] {
  const pairs = new Map<string, { was: ParameterValue | null; toBe: ParameterValue | null }>();
  for (const was of before) pairs.set(keyOf(was), { was, toBe: null });
  for (const toBe of after) pairs.set(keyOf(toBe), { was: pairs.get(keyOf(toBe))?.was ?? null, toBe });
  const found: ParameterDifference[] = [];
  for (const { was, toBe } of pairs.values()) {
    const either = toBe ?? was;
    if (!either || (was && toBe && isSame(was, toBe))) continue;
    found.push({ axis: either.axis, parameter: either.parameter, was, toBe, change: relative(was, toBe) });
  }
  return inOrder(found, [...before, ...after]);
}

function keyOf({ axis, parameter }: ParameterValue): string {
  return `${axis?.toLowerCase() ?? ""}\u0000${parameter}`;
}

/** A value in the basis of another; null where they do not compare. */
function inBasisOf(value: ParameterValue, other: ParameterValue): number | null {
  if (value.unit !== other.unit) return null;
  if (value.basis === other.basis) return value.value;
  if (value.basis === null || other.basis === null) return null;
  return other.basis === "peak" ? value.value * Math.SQRT2 : value.value / Math.SQRT2;
}

function isSame(was: ParameterValue, toBe: ParameterValue): boolean {
  const value = inBasisOf(toBe, was);
  if (value === null) return false;
  const share = was.basis === toBe.basis ? SAME : SAME_ACROSS_BASES;
  return Math.abs(value - was.value) <= share * Math.max(Math.abs(was.value), Math.abs(value));
}

function relative(was: ParameterValue | null, toBe: ParameterValue | null): number | null {
  const value = was && toBe ? inBasisOf(toBe, was) : null;
  return was && value !== null && was.value !== 0 ? (value - was.value) / Math.abs(was.value) : null;
}

/** By axis as they first appear, then in the order of the parameter list. */
function inOrder(found: ParameterDifference[], all: readonly ParameterValue[]): ParameterDifference[] {
  const axes = new Map<string, number>();
  for (const { axis } of all) if (!axes.has(nameOf(axis))) axes.set(nameOf(axis), axes.size);
  const rank = ({ axis }: ParameterDifference) => axes.get(nameOf(axis)) ?? axes.size;
  return found.sort((a, b) => rank(a) - rank(b) || parameterRank(a.parameter) - parameterRank(b.parameter));
}

function nameOf(axis: string | null): string {
  return axis === null ? "\u0000" : axis.toLowerCase();
}
