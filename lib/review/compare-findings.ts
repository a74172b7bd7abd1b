import { findingKey, type Finding } from "@/lib/domain/findings";
import { levelRank, type Level } from "@/lib/domain/levels";
import type { FindingComparison } from "./types";

/**
 * Findings of two evaluations side by side. `fresh`: not there before, or graver; `cleared`: better now, or no
 * longer there; `unchanged`: the same level. What is and stays within limits is left out. Several findings of
 * one check on one axis are paired gravest with gravest.
 */
export function compareFindings(before: readonly Finding[], after: readonly Finding[]): FindingComparison {
  const pairs = pairFindings(before, after);
  const fresh: Finding[] = [];
  const cleared: { was: Finding; toBe: Finding | null }[] = [];
  const unchanged: Finding[] = [];
  for (const { was, toBe } of pairs) {
    const levelWas = was?.level ?? "within";
    const levelToBe = toBe?.level ?? "within";
    if (toBe && isGraver(levelWas, levelToBe)) fresh.push(toBe);
    else if (was && levelWas !== levelToBe) cleared.push({ was, toBe });
    else if (toBe && levelToBe !== "within") unchanged.push(toBe);
  }
  return { fresh, cleared, unchanged };
}

/**
 * Whether a level is worse than another. *Cannot check* is never better than a known level: what was near or over
 * limit and can no longer be checked is worse than before, and so is a limit met once the data are there.
 */
export function isGraver(was: Level, toBe: Level): boolean {
  if (was === toBe) return false;
  return toBe === "cannot" || levelRank(toBe) < levelRank(was);
}

interface Pair {
  readonly was: Finding | null;
  readonly toBe: Finding | null;
}

/** Findings of the same check and axis, in the order of the later evaluation; those only before come last. */
export function pairFindings(before: readonly Finding[], after: readonly Finding[]): Pair[] {
  const waiting = byKey(before);
  const pairs: Pair[] = [];
  for (const [key, later] of byKey(after)) {
    const earlier = waiting.get(key) ?? [];
    later.forEach((toBe, index) => pairs.push({ was: earlier[index] ?? null, toBe }));
    earlier.slice(later.length).forEach((was) => pairs.push({ was, toBe: null }));
    waiting.delete(key);
  }
  for (const left of waiting.values()) left.forEach((was) => pairs.push({ was, toBe: null }));
  return pairs;
}

function byKey(findings: readonly Finding[]): Map<string, Finding[]> {
  const groups = new Map<string, Finding[]>();
  for (const finding of findings) {
    const group = groups.get(findingKey(finding));
    if (group) group.push(finding);
    else groups.set(findingKey(finding), [finding]);
  }
  for (const group of groups.values()) group.sort((a, b) => levelRank(a.level) - levelRank(b.level));
  return groups;
}
