import { createElement } from "react";
import { renderToStaticMarkup } from "react-dom/server";
import { revisionItems } from "@/components/revision/revision-items";
import { RevisionRow } from "@/components/revision/revision-row";
import { mergeRegions } from "@/lib/diff/merge-lines";
import { outlineOf } from "@/lib/diff/outline";
import { reviseText } from "@/lib/diff/revise-text";
import { splitLines } from "@/lib/diff/text-lines";

const LINES = 20_000;
const RUNS = 9;
/** Rows that a tall screen shows. */
const FIRST_ROWS = 60;
const AIM_MS = 300;

/** A text of 20,000 lines, as a dump of many axes has it: sections, blank lines, comments. */
function longText(): string[] {
  return Array.from({ length: LINES }, (_, index) => {
    const place = index % 10;
    if (place === 0) return "\n";
    if (place === 1) return `[axis.a${(index - 1) / 10}]\n`;
    return place === 2 ? "# per winding\n" : `key_${place} = ${index} ; unit ${place}\n`;
  });
}

/** A value in each 50th line, a comment in each 500th, lines that come and go, and a moved block. */
function changed(lines: readonly string[]): string[] {
  const next = lines.map((line, index) => {
    if (index % 50 === 7) return line.replace(/= \d+/, "= 1");
    return index % 500 === 2 ? "# rms per winding\n" : line;
  });
  next.splice(4000, 3);
  next.splice(9000, 0, "added = 1\n", "added_too = 2\n");
  next.push(...next.splice(12_000, 10));
  return next;
}

function firstRows(was: string, toBe: string): number {
  const stretches = structuredClone(outlineOf(reviseText(was, toBe)));
  const options = { opened: new Set<number>(), folded: () => false, toBe: () => [] };
  const items = revisionItems(stretches, options).slice(0, FIRST_ROWS);
  const context = { letters: undefined, notes: undefined, index: 0 };
  return items
    .map((item) =>
      item.kind === "line"
        ? renderToStaticMarkup(createElement(RevisionRow, { line: item.line, context }))
        : "",
    )
    .join("").length;
}

function median(work: () => unknown): number {
  const times = Array.from({ length: RUNS }, () => {
    const start = performance.now();
    work();
    return performance.now() - start;
  });
  return times.sort((one, other) => one - other)[RUNS >> 1] ?? NaN;
}

/** Was / To be of a long text up to its first rows: held against each other, handed over, drawn. And its merge with a third. */
export function runReviseBench(): string[] {
  const lines = longText();
  const other = changed(lines);
  const [was, toBe] = [lines.join(""), other.join("")];
  const first = median(() => firstRows(was, toBe));
  const theirs = lines.map((line, index) => (index % 70 === 9 ? line.replace(/= \d+/, "= 2") : line));
  const merge = median(() => mergeRegions({ base: splitLines(was), ours: other, theirs }));
  return [
    `Was / To be of ${LINES} lines, first ${FIRST_ROWS} rows, median of ${RUNS}: ${first.toFixed(0)} ms (aim: ${AIM_MS})`,
    `three texts of ${LINES} lines merged, median of ${RUNS}: ${merge.toFixed(0)} ms`,
  ];
}
