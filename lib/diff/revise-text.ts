import { keptLines } from "./kept-lines";
import { markMoved } from "./moved-lines";
import { pairLines, type LinePair } from "./pair-lines";
import { splitLines, substance, withoutLineEnd } from "./text-lines";
import type { RevisionLine, RevisionSegment, RevisionStretch } from "./types";
import { reviseWords } from "./words";

/**
 * A text as a drawing revision: every line once, changed lines with their old and new words beside each other, moved
 * blocks told as moved.
 * Unchanged runs of more than 2·context + 2 lines are closed but for `context` lines beside each change.
 */
export function reviseText(was: string, toBe: string, context = 3): RevisionStretch[] {
  return stretches(markMoved(reviseLines(splitLines(was), splitLines(toBe))), context);
}

interface Cursor {
  readonly was: readonly string[];
  readonly toBe: readonly string[];
  readonly rows: RevisionLine[];
  wasAt: number;
  toBeAt: number;
}

function reviseLines(was: readonly string[], toBe: readonly string[]): RevisionLine[] {
  const cursor: Cursor = { was, toBe, rows: [], wasAt: 0, toBeAt: 0 };
  for (const { wasIndex, toBeIndex } of keptLines(was, toBe)) {
    takeChanged(cursor, wasIndex - cursor.wasAt, toBeIndex - cursor.toBeAt);
    takeSame(cursor);
  }
  takeChanged(cursor, was.length - cursor.wasAt, toBe.length - cursor.toBeAt);
  return cursor.rows;
}

function takeSame(cursor: Cursor): void {
  const text = withoutLineEnd(cursor.was[cursor.wasAt] ?? "");
  cursor.rows.push({
    kind: "same",
    wasLine: ++cursor.wasAt,
    toBeLine: ++cursor.toBeAt,
    segments: text === "" ? [] : [{ kind: "same", text }],
    onlySpace: false,
  });
}

function takeChanged(cursor: Cursor, removed: number, added: number): void {
  if (removed === 0 && added === 0) return;
  const was = cursor.was.slice(cursor.wasAt, cursor.wasAt + removed);
  const toBe = cursor.toBe.slice(cursor.toBeAt, cursor.toBeAt + added);
  const pairs = pairLines(was.map(withoutLineEnd), toBe.map(withoutLineEnd));
  for (const pair of pairs) cursor.rows.push(changedRow(cursor, pair, { was, toBe }));
  cursor.wasAt += removed;
  cursor.toBeAt += added;
}

interface Sides {
  readonly was: readonly string[];
  readonly toBe: readonly string[];
}

function changedRow(cursor: Cursor, pair: LinePair, sides: Sides): RevisionLine {
  const was = pair.was === null ? null : withoutLineEnd(sides.was[pair.was] ?? "");
  const toBe = pair.toBe === null ? null : withoutLineEnd(sides.toBe[pair.toBe] ?? "");
  return {
    kind: was === null ? "added" : toBe === null ? "removed" : "changed",
    wasLine: pair.was === null ? null : cursor.wasAt + pair.was + 1,
    toBeLine: pair.toBe === null ? null : cursor.toBeAt + pair.toBe + 1,
    segments: segmentsOf(was, toBe),
    onlySpace: substance(was ?? "") === substance(toBe ?? ""),
  };
}

function segmentsOf(was: string | null, toBe: string | null): RevisionSegment[] {
  if (was !== null && toBe !== null) return reviseWords(was, toBe);
  const segment: RevisionSegment =
    was === null ? { kind: "to_be", text: toBe ?? "" } : { kind: "was", text: was };
  return segment.text === "" ? [] : [segment];
}

function stretches(rows: readonly RevisionLine[], context: number): RevisionStretch[] {
  const out: RevisionStretch[] = [];
  let open: RevisionLine[] = [];
  for (let at = 0; at < rows.length;) {
    const end = endOfRun(rows, at);
    const run = rows.slice(at, end);
    const closable = rows[at]?.kind === "same" && run.length > 2 * context + 2;
    const front = closable ? (at === 0 ? 0 : context) : run.length;
    const back = closable && end < rows.length ? run.length - context : run.length;
    for (const row of run.slice(0, front)) open.push(row);
    if (closable) {
      if (open.length > 0) out.push({ closed: false, lines: open });
      out.push({ closed: true, lines: run.slice(front, back) });
      open = run.slice(back);
    }
    at = end;
  }
  if (open.length > 0) out.push({ closed: false, lines: open });
  return out;
}

/** End of the run of unchanged, or of changed, rows that begins at `start`. */
function endOfRun(rows: readonly RevisionLine[], start: number): number {
  const unchanged = rows[start]?.kind === "same";
  let end = start;
  while (end < rows.length && (rows[end]?.kind === "same") === unchanged) end++;
  return end;
}
