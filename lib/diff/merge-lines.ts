import { diffIndices } from "node-diff3";
import { keptLines } from "./kept-lines";

/** Lines [start, end) of a text, from 0. */
export interface LineRange {
  readonly start: number;
  readonly end: number;
}

/**
 * A stretch of three texts. `same`: as in the base on both sides; `ours`, `theirs`: only that side differs from the
 * base; `agreed`: both sides made the same of it; `conflict`: each made something else of it.
 */
export interface MergeRegion {
  readonly kind: "same" | "ours" | "theirs" | "agreed" | "conflict";
  readonly base: LineRange;
  readonly ours: LineRange;
  readonly theirs: LineRange;
}

type Lines = readonly string[];

export interface MergeSides {
  readonly base: Lines;
  readonly ours: Lines;
  readonly theirs: Lines;
}

/** Three texts, cut into regions that tile all of them. Exchanging the sides exchanges their names and nothing else. */
export function mergeRegions(sides: MergeSides): MergeRegion[] {
  const regions: MergeRegion[] = [];
  const at = { base: 0, ours: 0, theirs: 0 };
  const next = (base: number, ours: number, theirs: number): MergeRegion => ({
    kind: "same",
    base: { start: at.base, end: (at.base += base) },
    ours: { start: at.ours, end: (at.ours += ours) },
    theirs: { start: at.theirs, end: (at.theirs += theirs) },
  });
  const keep = (end: number): void => {
    const kept = end - at.base;
    if (kept > 0) regions.push(next(kept, kept, kept));
  };
  for (const { start, end, ours, theirs, even } of groups(sides)) {
    keep(start);
    const region = next(end - start, end - start + ours, end - start + theirs);
    regions.push(...settled(region, { sides, even }));
  }
  keep(sides.base.length);
  return regions;
}

interface Hunk extends LineRange {
  readonly side: "ours" | "theirs";
  /** Lines more than the base has there. */
  readonly more: number;
}

/** Stretches of the base where hunks touch, with the lines that each side has more there. */
interface Group extends LineRange {
  readonly ours: number;
  readonly theirs: number;
  /** Each hunk replaces lines by as many: line stands against line. */
  readonly even: boolean;
}

function groups({ base, ours, theirs }: MergeSides): Group[] {
  const hunks = [...hunksOf(base, ours, "ours"), ...hunksOf(base, theirs, "theirs")];
  hunks.sort((one, other) => one.start - other.start || one.end - other.end);
  const found: Group[] = [];
  for (const { start, end, side, more } of hunks) {
    const last = found.at(-1);
    const touches = last !== undefined && start <= last.end;
    if (touches) found.pop();
    const group = touches ? last : { start, end, ours: 0, theirs: 0, even: true };
    const even = group.even && more === 0;
    found.push({ ...group, end: Math.max(end, group.end), even, [side]: group[side] + more });
  }
  return found;
}

/** Largest product of lines that node-diff3 compares: it looks at each pair of equal lines, so blank lines cost their square. */
const MOST_COMPARED = 40_000;

/** Where a side differs from the base. Equal ends are set aside first: most texts differ in a few lines. */
function hunksOf(base: Lines, other: Lines, side: Hunk["side"]): Hunk[] {
  const shorter = Math.min(base.length, other.length);
  let head = 0;
  while (head < shorter && base[head] === other[head]) head++;
  let tail = 0;
  while (tail < shorter - head && base[base.length - 1 - tail] === other[other.length - 1 - tail]) tail++;
  const [was, is] = [base.slice(head, base.length - tail), other.slice(head, other.length - tail)];
  const differing = was.length * is.length > MOST_COMPARED ? longDifferences(was, is) : differences(was, is);
  return differing.map(({ start, length, count }) => ({
    side,
    start: head + start,
    end: head + start + length,
    more: count - length,
  }));
}

/** `length` lines from `start` give way to `count` others. */
interface Difference {
  readonly start: number;
  readonly length: number;
  readonly count: number;
}

function differences(was: Lines, is: Lines): Difference[] {
  return diffIndices([...was], [...is]).map(({ buffer1: [start, length], buffer2: [, count] }) => ({
    start,
    length,
    count,
  }));
}

function longDifferences(was: Lines, is: Lines): Difference[] {
  const found: Difference[] = [];
  let [wasAt, isAt] = [0, 0];
  for (const { wasIndex, toBeIndex } of [
    ...keptLines(was, is),
    { wasIndex: was.length, toBeIndex: is.length },
  ]) {
    if (wasIndex > wasAt || toBeIndex > isAt)
      found.push({ start: wasAt, length: wasIndex - wasAt, count: toBeIndex - isAt });
    [wasAt, isAt] = [wasIndex + 1, toBeIndex + 1];
  }
  return found;
}

interface Settling {
  readonly sides: MergeSides;
  readonly even: boolean;
}

/** A stretch that at least one side changed: whose it is, or line by line where line stands against line. */
function settled(region: MergeRegion, { sides, even }: Settling): MergeRegion[] {
  const kind = kindOf(region, sides);
  if (kind !== "conflict" || !even) return [{ ...region, kind }];
  const regions: MergeRegion[] = [];
  for (let index = 0; index < region.base.end - region.base.start; index++) {
    const line = {
      base: lineAt(region.base, index),
      ours: lineAt(region.ours, index),
      theirs: lineAt(region.theirs, index),
    };
    add(regions, { kind: kindOf(line, sides), ...line });
  }
  return regions;
}

function lineAt({ start }: LineRange, index: number): LineRange {
  return { start: start + index, end: start + index + 1 };
}

/** Lines of one kind that stand together are one region. */
function add(regions: MergeRegion[], next: MergeRegion): void {
  const last = regions.at(-1);
  if (last?.kind !== next.kind) return void regions.push(next);
  const over = (side: keyof MergeSides): LineRange => ({ start: last[side].start, end: next[side].end });
  regions.splice(-1, 1, { kind: next.kind, base: over("base"), ours: over("ours"), theirs: over("theirs") });
}

function kindOf(region: Omit<MergeRegion, "kind">, sides: MergeSides): MergeRegion["kind"] {
  const [base, ours, theirs] = [
    sides.base.slice(region.base.start, region.base.end),
    sides.ours.slice(region.ours.start, region.ours.end),
    sides.theirs.slice(region.theirs.start, region.theirs.end),
  ];
  if (equal(ours, base)) return equal(theirs, base) ? "same" : "theirs";
  if (equal(theirs, base)) return "ours";
  return equal(ours, theirs) ? "agreed" : "conflict";
}

function equal(one: Lines, other: Lines): boolean {
  return one.length === other.length && one.every((line, index) => line === other[index]);
}
