import { CHAR, isQuote } from "../chars";
import { readScalar } from "../scalar";
import type { Section, TreeEntry } from "../tree";
import type { Stretch } from "./tokens";
import type { Walk } from "./walk";

/** A column at which keys stand, and the map they belong to. */
interface Level {
  readonly column: number;
  readonly section: Section;
}

/** Gives comments behind values to their keys, and takes keys in comments for disabled ones of the map at their column. */
export function readDisabled(walk: Walk, comments: readonly Stretch[]): void {
  const { build, text } = walk;
  const keys = [...walk.keys].sort((a, b) => a.start - b.start);
  const ends = endsOfLines(build.entries, build.lines);
  const levels: Level[] = [];
  let next = 0;
  for (const { start, end } of comments) {
    for (let key = keys[next]; key && key.start < start; key = keys[++next])
      descend(levels, { column: columnOf(walk, key.start), section: key.section });
    const { line, column } = build.lines.span(start, start);
    const entry = ends.get(line);
    if (entry && entry.at.end <= start)
      entry.setComment(start, end, text.slice(start, end).replace(/^#+/, "").trim());
    else if (text.slice(start - column + 1, start).trim() === "")
      readKey(walk, { start, end }, { column, levels });
  }
}

/** From 1; an encoding mark before the first line is no column. */
function columnOf({ build, text }: Walk, at: number): number {
  const { line, column } = build.lines.span(at, at);
  return line === 1 && text.charCodeAt(0) === CHAR.byteOrderMark ? column - 1 : column;
}

function descend(levels: Level[], level: Level): void {
  while ((levels.at(-1)?.column ?? 0) >= level.column) levels.pop();
  levels.push(level);
}

/** The last entry that ends on each line. */
function endsOfLines(
  entries: readonly TreeEntry[],
  lines: { readonly line: (at: number) => number },
): ReadonlyMap<number, TreeEntry> {
  const ends = new Map<number, TreeEntry>();
  for (const entry of entries) {
    const line = lines.line(entry.at.end);
    const before = ends.get(line);
    const own = entry.at.keyEnd <= entry.at.start;
    if (own && (!before || before.at.end <= entry.at.end)) ends.set(line, entry);
  }
  return ends;
}

const MEMBER = /^([A-Za-z_][\w.-]*)[ \t]*:[ \t]+/;

function readKey(
  { build, text }: Walk,
  { start, end }: Stretch,
  { column, levels }: { readonly column: number; readonly levels: readonly Level[] },
): void {
  let from = start;
  while (from < end && (text.charCodeAt(from) === CHAR.hash || text.charCodeAt(from) === CHAR.space)) from++;
  const member = MEMBER.exec(text.slice(from, end));
  const level =
    levels.find((one) => one.column === column) ?? levels.find((one) => one.column === column + from - start);
  if (!member || !level) return;
  const [whole, name = ""] = member;
  const at = from + whole.length;
  const to = at + text.slice(at, end).trimEnd().length;
  const value = readScalar(text, at, to, { c: false });
  const quoted = isQuote(text.charCodeAt(at)) && text.charCodeAt(to - 1) === text.charCodeAt(at);
  if (value.kind !== "number" && value.kind !== "boolean" && !quoted) return;
  const place = { name, start: from, end: from + name.length };
  build.scalar(level.section, place, { start: at, end: to, value }).disabled = true;
}
