import { keptLines } from "./kept-lines";

export interface UnifiedInput {
  readonly path: string;
  /** Null: the file comes new, or goes. */
  readonly was: string | null;
  readonly toBe: string | null;
}

const CONTEXT = 3;

/**
 * The difference of two texts in the unified format (POSIX diff -u, with the hint of GNU diff at a last line without
 * line end), so that the usual tools make the new text of the old one byte for byte. Lines end at LF; a CR is part of
 * its line. Empty where nothing differs.
 */
export function unifiedDiff({ path, was, toBe }: UnifiedInput): string {
  if (was === toBe) return "";
  const rows = rowsOf(linesOf(was ?? ""), linesOf(toBe ?? ""));
  const head = `--- ${side("a", was === null ? null : path)}\n+++ ${side("b", toBe === null ? null : path)}\n`;
  return head + hunksOf(rows).map(wordHunk).join("");
}

/** A tab ends a name with blanks in it; a name with quotes is quoted. */
function side(prefix: "a" | "b", path: string | null): string {
  if (path === null) return "/dev/null";
  const name = `${prefix}/${path}`;
  if (/["\\]/.test(name)) return `"${name.replace(/["\\]/g, "\\$&")}"`;
  return name.includes(" ") ? `${name}\t` : name;
}

function linesOf(text: string): string[] {
  return text.match(/[^\n]*\n|[^\n]+$/g) ?? [];
}

interface Row {
  readonly mark: " " | "-" | "+";
  readonly line: string;
  /** Lines of each side before this row. */
  readonly wasAt: number;
  readonly toBeAt: number;
}

function rowsOf(was: readonly string[], toBe: readonly string[]): Row[] {
  const rows: Row[] = [];
  let [wasAt, toBeAt] = [0, 0];
  const until = (wasEnd: number, toBeEnd: number): void => {
    for (; wasAt < wasEnd; wasAt++) rows.push({ mark: "-", line: was[wasAt] ?? "", wasAt, toBeAt });
    for (; toBeAt < toBeEnd; toBeAt++) rows.push({ mark: "+", line: toBe[toBeAt] ?? "", wasAt, toBeAt });
  };
  for (const { wasIndex, toBeIndex } of keptLines(was, toBe)) {
    until(wasIndex, toBeIndex);
    rows.push({ mark: " ", line: was[wasAt] ?? "", wasAt: wasAt++, toBeAt: toBeAt++ });
  }
  until(was.length, toBe.length);
  return rows;
}

/** Changed rows with their context; where contexts meet, one hunk. */
function hunksOf(rows: readonly Row[]): Row[][] {
  const hunks: Row[][] = [];
  let end = -1;
  rows.forEach(({ mark }, index) => {
    if (mark === " ") return;
    const from = Math.max(index - CONTEXT, 0);
    const to = Math.min(index + CONTEXT + 1, rows.length);
    if (from > end || hunks.length === 0) hunks.push(rows.slice(from, to));
    else hunks.at(-1)?.push(...rows.slice(end, to));
    end = Math.max(end, to);
  });
  return hunks;
}

function wordHunk(rows: readonly Row[]): string {
  const [first] = rows;
  if (!first) return "";
  const count = (mark: Row["mark"]) => rows.filter((row) => row.mark !== mark).length;
  const range = (at: number, length: number) => `${length === 0 ? at : at + 1},${length}`;
  const head = `@@ -${range(first.wasAt, count("+"))} +${range(first.toBeAt, count("-"))} @@\n`;
  return head + rows.map(({ mark, line }) => mark + closed(line)).join("");
}

function closed(line: string): string {
  return line.endsWith("\n") ? line : `${line}\n\\ No newline at end of file\n`;
}
