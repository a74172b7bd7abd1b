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
    shared(was, toBe, { from: head, to: was.length - tail }),
    shared(toBe, was, { from: head, to: toBe.length - tail }),
  );
  return [...run(head, 0, 0), ...middle, ...run(tail, was.length - tail, toBe.length - tail)];
}

function run(count: number, wasFrom: number, toBeFrom: number): KeptLine[] {
  return Array.from({ length: count }, (_, index) => ({
    wasIndex: wasFrom + index,
    toBeIndex: toBeFrom + index,
  }));
}

interface NumberedLine {
  readonly index: number;
  readonly line: string;
}

/** The lines of a stretch that the other text has too; the others cannot stay, and need no comparing. */
function shared(
  lines: readonly string[],
  others: readonly string[],
  { from, to }: { from: number; to: number },
): NumberedLine[] {
  const there = new Set(others);
  const found: NumberedLine[] = [];
  for (let index = from; index < to; index++) {
    const line = lines[index];
    if (line !== undefined && there.has(line)) found.push({ index, line });
  }
  return found;
}

function keptBetween(was: NumberedLine[], toBe: NumberedLine[]): KeptLine[] {
  const comparator = (one: NumberedLine, other: NumberedLine) => one.line === other.line;
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
