import { substance } from "./text-lines";
import type { RevisionLine } from "./types";

/** So many places of one line are looked at; lines that stand more often say nothing about a move. */
const MOST_PLACES = 20;
/** A moved block has at least so many characters that a firmware reads. */
const LEAST_SUBSTANCE = 4;

/**
 * Tells blocks that went in one place and came in another as moved: each of their rows gets the line number of the
 * other text. The longest blocks first among those that begin with a line; rows that stay or change are left alone.
 */
export function markMoved(rows: readonly RevisionLine[]): RevisionLine[] {
  const gone = placesOf(rows, "removed");
  const moved = new Map<number, number>();
  for (let at = 0; at < rows.length; at++) {
    if (rows[at]?.kind !== "added" || moved.has(at)) continue;
    const block = longestBlock({ rows, gone, moved }, at);
    for (let step = 0; step < block.length; step++) {
      moved.set(at + step, block.from + step);
      moved.set(block.from + step, at + step);
    }
  }
  if (moved.size === 0) return [...rows];
  return rows.map((row, index) => withPlace(row, rows[moved.get(index) ?? -1]));
}

function withPlace(row: RevisionLine, other: RevisionLine | undefined): RevisionLine {
  const line = other?.toBeLine ?? other?.wasLine;
  return line === undefined || line === null ? row : { ...row, moved: line };
}

function textOf({ segments }: RevisionLine): string {
  return segments.map(({ text }) => text).join("");
}

function placesOf(rows: readonly RevisionLine[], kind: RevisionLine["kind"]): Map<string, number[]> {
  const places = new Map<string, number[]>();
  rows.forEach((row, index) => {
    if (row.kind !== kind) return;
    const known = places.get(textOf(row));
    if (known) known.push(index);
    else places.set(textOf(row), [index]);
  });
  return places;
}

interface Search {
  readonly rows: readonly RevisionLine[];
  readonly gone: ReadonlyMap<string, readonly number[]>;
  readonly moved: ReadonlyMap<number, number>;
}

interface Block {
  readonly from: number;
  readonly length: number;
}

const NO_BLOCK: Block = { from: 0, length: 0 };

function longestBlock(search: Search, at: number): Block {
  const { rows, gone, moved } = search;
  const first = rows[at];
  const places = (first && gone.get(textOf(first))) ?? [];
  if (places.length > MOST_PLACES) return NO_BLOCK;
  return places
    .filter((from) => !moved.has(from))
    .map((from) => ({ from, length: lengthOf(search, { at, from }) }))
    .filter((block) => hasSubstance(rows, block))
    .reduce((best, block) => (block.length > best.length ? block : best), NO_BLOCK);
}

function lengthOf({ rows, moved }: Search, { at, from }: { at: number; from: number }): number {
  let length = 0;
  for (;;) {
    const [came, went] = [rows[at + length], rows[from + length]];
    const taken = moved.has(at + length) || moved.has(from + length);
    if (came?.kind !== "added" || went?.kind !== "removed" || taken || textOf(came) !== textOf(went))
      return length;
    length++;
  }
}

function hasSubstance(rows: readonly RevisionLine[], { from, length }: Block): boolean {
  const read = rows.slice(from, from + length).map((row) => substance(textOf(row)));
  return read.join("").length >= LEAST_SUBSTANCE;
}
