import { diffArrays } from "diff";

/** A line that both texts have, by its index in each. */
export interface KeptLine {
  readonly wasIndex: number;
  readonly toBeIndex: number;
}

/** Where more line edits than these part the lines that both texts have, only their equal ends are kept. */
const MOST_EDITS = 1500;

/** The lines that stay, in order: equal ends first, then the longest common run of what lies between. */
export function keptLines(was: readonly string[], toBe: readonly string[]): KeptLine[] {
  const shorter = Math.min(was.length, toBe.length);
  let head = 0;
  while (head < shorter && was[head] === toBe[head]) head++;
  let tail = 0;
  while (tail < shorter - head && was[was.length - 1 - tail] === toBe[toBe.length - 1 - tail]) tail++;
  const middle = keptBetween(
    shared(was.slice(head, was.length - tail), toBe.slice(head, toBe.length - tail), head),
  );
  return [...run(head, 0, 0), ...middle, ...run(tail, was.length - tail, toBe.length - tail)];
}

function run(count: number, wasFrom: number, toBeFrom: number): KeptLine[] {
  return Array.from({ length: count }, (_, index) => ({
    wasIndex: wasFrom + index,
    toBeIndex: toBeFrom + index,
  }));
}

/** A line by its place and by a number that equal lines share: numbers compare faster than long lines. */
interface NumberedLine {
  readonly index: number;
  readonly id: number;
}

/** The lines that both stretches have; the others cannot stay, and need no comparing. */
function shared(was: readonly string[], toBe: readonly string[], from: number): NumberedLine[][] {
  const ids = new Map<string, number>();
  for (const line of was) if (!ids.has(line)) ids.set(line, ids.size);
  const there = new Set<number>();
  const numbered = (line: string, index: number): NumberedLine => ({
    index: from + index,
    id: ids.get(line) ?? -1,
  });
  const right = toBe.map(numbered).filter(({ id }) => id >= 0);
  for (const { id } of right) there.add(id);
  return [was.map(numbered).filter(({ id }) => there.has(id)), right];
}

function keptBetween([was = [], toBe = []]: NumberedLine[][]): KeptLine[] {
  const comparator = (one: NumberedLine, other: NumberedLine) => one.id === other.id;
  const parts = diffArrays(was, toBe, { comparator, maxEditLength: MOST_EDITS }) ?? [];
  const kept: KeptLine[] = [];
  let wasAt = 0;
  let toBeAt = 0;
  for (const { count, added, removed } of parts) {
    for (let i = 0; i < count && !added && !removed; i++) {
      const one = was[wasAt + i];
      const other = toBe[toBeAt + i];
      if (one && other) kept.push({ wasIndex: one.index, toBeIndex: other.index });
    }
    if (!added) wasAt += count;
    if (!removed) toBeAt += count;
  }
  return kept;
}
