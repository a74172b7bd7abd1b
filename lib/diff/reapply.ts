import { diffArrays } from "diff";

/** A stretch of edited lines that the new base no longer has room for. */
export interface UnfittingEdit {
  /** First line of the stretch in the edited text, from 1; for removed lines the line that now stands there. */
  readonly line: number;
  /** The lines as edited; where lines were only removed, those. */
  readonly text: string;
  readonly kind: "changed" | "added" | "removed";
}

export interface ReapplyInput {
  readonly oldBase: string;
  readonly edited: string;
  readonly newBase: string;
}

export interface ReapplyResult {
  readonly text: string;
  readonly notFitting: readonly UnfittingEdit[];
}

/**
 * The edits that lead from `oldBase` to `edited`, made once more on `newBase`, line by line. An edit fits where the new
 * base still holds the lines that it replaces, side by side (for added lines: the two lines around them). What the new
 * base already holds counts as made. Line ends are not compared; reapplied lines take those of the new base.
 */
export function reapplyText({ oldBase, edited, newBase }: ReapplyInput): ReapplyResult {
  const now = linesOf(newBase);
  const places = placesIn(linesOf(oldBase), now);
  const notFitting: UnfittingEdit[] = [];
  const patches: Patch[] = [];
  for (const edit of editsBetween(linesOf(oldBase), linesOf(edited))) {
    const place = isMade(edit, places, now) ? "made" : placeOf(edit, places);
    if (place === null) notFitting.push(unfitting(edit));
    else if (place !== "made") patches.push({ ...place, lines: edit.put });
  }
  return { text: patched(now, patches), notFitting };
}

/** Lines [start, end) of the old base give way to `put`; `line` is where that stands in the edited text, from 0. */
interface LineEdit {
  readonly start: number;
  readonly end: number;
  readonly line: number;
  readonly struck: readonly string[];
  readonly put: readonly string[];
}

/** Where the lines of the old base stand in the new one. One place more than lines: the end. */
interface Places {
  /** Null where the line is gone. */
  readonly kept: readonly (number | null)[];
  /** Also where the line was rewritten and its successor is plain: the stretch kept its number of lines. */
  readonly standing: readonly (number | null)[];
}

interface Patch {
  readonly start: number;
  readonly end: number;
  readonly lines: readonly string[];
}

/** Lines with their line ends; an empty text has none. */
function linesOf(text: string): string[] {
  return text.match(/[^\r\n]*(?:\r\n|\r|\n)|[^\r\n]+$/g) ?? [];
}

function content(line: string | undefined): string | undefined {
  return line?.replace(/[\r\n]+$/, "");
}

interface Stretch {
  readonly struck: string[];
  readonly put: string[];
  readonly same: number;
}

/** Alternating stretches: what differs, then how many lines are the same. */
function stretches(before: readonly string[], after: readonly string[]): Stretch[] {
  const parts = diffArrays([...before], [...after], {
    comparator: (left, right) => content(left) === content(right),
  });
  const result: Stretch[] = [];
  let [struck, put]: string[][] = [[], []];
  for (const { removed, added, value } of parts) {
    if (removed) struck = [...(struck ?? []), ...value];
    else if (added) put = [...(put ?? []), ...value];
    else {
      result.push({ struck: struck ?? [], put: put ?? [], same: value.length });
      [struck, put] = [[], []];
    }
  }
  return [...result, { struck: struck ?? [], put: put ?? [], same: 0 }];
}

/** Single-line edits where a stretch keeps its number of lines, so that one line in the way does not hold up the others. */
function editsBetween(old: readonly string[], wanted: readonly string[]): LineEdit[] {
  const edits: LineEdit[] = [];
  let [start, line] = [0, 0];
  for (const { struck, put, same } of stretches(old, wanted)) {
    if (struck.length + put.length > 0)
      edits.push(...split({ start, end: start + struck.length, line, struck, put }));
    start += struck.length + same;
    line += put.length + same;
  }
  return edits;
}

function split(edit: LineEdit): LineEdit[] {
  if (edit.struck.length !== edit.put.length) return [edit];
  return edit.struck.map((struck, index) => ({
    start: edit.start + index,
    end: edit.start + index + 1,
    line: edit.line + index,
    struck: [struck],
    put: edit.put.slice(index, index + 1),
  }));
}

function placesIn(old: readonly string[], now: readonly string[]): Places {
  const kept: (number | null)[] = [];
  const standing: (number | null)[] = [];
  let at = 0;
  for (const { struck, put, same } of stretches(old, now)) {
    const paired = struck.length === put.length;
    struck.forEach((_, index) => {
      kept.push(null);
      standing.push(paired ? at + index : null);
    });
    at += put.length;
    for (let index = 0; index < same; index += 1, at += 1) {
      kept.push(at);
      standing.push(at);
    }
  }
  return { kept: [...kept, now.length], standing: [...standing, now.length] };
}

function placeOf({ start, end, struck }: LineEdit, places: Places): { start: number; end: number } | null {
  if (struck.length === 0) {
    const [before, after] = around({ start, end }, places);
    return before !== null && after === before + 1 ? { start: after, end: after } : null;
  }
  const first = places.kept[start] ?? null;
  if (first === null) return null;
  const together = struck.every((_, index) => places.kept[start + index] === first + index);
  return together ? { start: first, end: first + struck.length } : null;
}

/** The lines of the new base just before and just after the stretch; −1 and the number of lines at the ends. */
function around({ start, end }: Pick<LineEdit, "start" | "end">, { standing }: Places) {
  return [start === 0 ? -1 : (standing[start - 1] ?? null), standing[end] ?? null] as const;
}

function isMade(edit: LineEdit, places: Places, now: readonly string[]): boolean {
  const [before, after] = around(edit, places);
  if (before === null || after === null) return false;
  const there = now.slice(before + 1, after);
  return (
    edit.put.length === there.length &&
    edit.put.every((line, index) => content(line) === content(there[index]))
  );
}

function unfitting({ line, struck, put }: LineEdit): UnfittingEdit {
  const kind = put.length === 0 ? "removed" : struck.length === 0 ? "added" : "changed";
  return { line: line + 1, text: (put.length === 0 ? struck : put).join(""), kind };
}

function patched(now: readonly string[], patches: readonly Patch[]): string {
  const lineEnd = /\r\n|\r|\n/.exec(now[0] ?? "")?.[0];
  const out: string[] = [];
  let at = 0;
  for (const { start, end, lines } of patches) {
    out.push(...now.slice(at, start));
    for (const line of lines) out.push(lineEnd === undefined ? line : line.replace(/[\r\n]+$/, lineEnd));
    at = end;
  }
  out.push(...now.slice(at));
  return out.map((line, index) => (index < out.length - 1 ? closed(line, lineEnd) : line)).join("");
}

/** A line that is not the last one ends. */
function closed(line: string, lineEnd = "\n"): string {
  return /[\r\n]$/.test(line) ? line : line + lineEnd;
}
