import { splitWords } from "./words";

/** Indices into the removed and the added lines of one changed run; null where a line stands alone. */
export interface LinePair {
  readonly was: number | null;
  readonly toBe: number | null;
}

/** Runs up to this many pairs are matched by likeness; larger ones line by line. */
const MOST_COMPARED = 10_000;
/** Lines less alike than this are one removed and one added line. */
const LEAST_LIKENESS = 0.4;

/** Matches removed with added lines, in order, so that the lines of one key stand together. */
export function pairLines(removed: readonly string[], added: readonly string[]): LinePair[] {
  if (removed.length * added.length > MOST_COMPARED) return pairByPlace(removed.length, added.length);
  const likeness = removed.map((was) => added.map((toBe) => alike(was, toBe)));
  return trace(bestTotals(likeness, removed.length, added.length), likeness);
}

function pairByPlace(removed: number, added: number): LinePair[] {
  const pairs: LinePair[] = [];
  for (let i = 0; i < Math.max(removed, added); i++)
    pairs.push({ was: i < removed ? i : null, toBe: i < added ? i : null });
  return pairs;
}

/** 0 to 1: share of common words; lines that begin with the same key are alike in any case. */
function alike(was: string, toBe: string): number {
  const one = splitWords(was).filter((word) => word.trim() !== "");
  const other = splitWords(toBe).filter((word) => word.trim() !== "");
  if (one.length === 0 || other.length === 0) return one.length === other.length ? 1 : 0;
  const left = new Map<string, number>();
  for (const word of one) left.set(word, (left.get(word) ?? 0) + 1);
  let common = 0;
  for (const word of other) {
    const count = left.get(word) ?? 0;
    if (count > 0) common++;
    left.set(word, count - 1);
  }
  const share = (2 * common) / (one.length + other.length);
  return sameKey(one, other) ? Math.max(share, 0.5) + 0.5 : share;
}

/** The first word that is a name is the same one. */
function sameKey(one: readonly string[], other: readonly string[]): boolean {
  const key = firstName(one);
  return key !== undefined && key === firstName(other);
}

function firstName(words: readonly string[]): string | undefined {
  return words.find((word) => /^[A-Za-z$]/.test(word) && word !== "define");
}

type Grid = readonly (readonly number[])[];

/** Best sum of likeness from each pair of places to the ends. */
function bestTotals(likeness: Grid, removed: number, added: number): Grid {
  const totals = Array.from({ length: removed + 1 }, () => new Array<number>(added + 1).fill(0));
  for (let i = removed - 1; i >= 0; i--)
    for (let j = added - 1; j >= 0; j--) {
      const row = totals[i];
      if (row)
        row[j] = Math.max(paired(totals, likeness, i, j), cell(totals, i + 1, j), cell(totals, i, j + 1));
    }
  return totals;
}

function cell(grid: Grid, i: number, j: number): number {
  return grid[i]?.[j] ?? 0;
}

function paired(totals: Grid, likeness: Grid, i: number, j: number): number {
  const own = cell(likeness, i, j);
  return own >= LEAST_LIKENESS ? own + cell(totals, i + 1, j + 1) : 0;
}

function trace(totals: Grid, likeness: Grid): LinePair[] {
  const removed = likeness.length;
  const added = (totals[0]?.length ?? 1) - 1;
  const pairs: LinePair[] = [];
  let i = 0;
  let j = 0;
  while (i < removed && j < added) {
    const best = cell(totals, i, j);
    if (best > 0 && paired(totals, likeness, i, j) === best) pairs.push({ was: i++, toBe: j++ });
    else if (cell(totals, i + 1, j) === best) pairs.push({ was: i++, toBe: null });
    else pairs.push({ was: null, toBe: j++ });
  }
  while (i < removed) pairs.push({ was: i++, toBe: null });
  while (j < added) pairs.push({ was: null, toBe: j++ });
  return pairs;
}
