import { afterLineEnd, CHAR, isBlank, isLineEnd, lineEnd, skipBlanks, trimBlanks } from "../chars";
import { Pieces } from "../pieces";
import { readScalar, type Scalar } from "../scalar";
import { TreeBuilder, type NameAt, type ScalarAt } from "../tree";
import { PIECE, type Document } from "../types";

interface Reader {
  readonly build: TreeBuilder;
  readonly pieces: Pieces;
  readonly text: string;
}

/** Reads assignments as a shell has them: `NAME=value`, `export NAME="value"`. Never throws on a text. */
export function parseEnv(path: string, text: string): Document {
  const build = new TreeBuilder(text);
  const reader: Reader = { build, text, pieces: new Pieces(text.length / 6) };
  let at = text.charCodeAt(0) === CHAR.byteOrderMark ? 1 : 0;
  reader.pieces.put(PIECE.space, 0, at);
  while (at < text.length) at = readLine(reader, at);
  const { entries, diagnostics } = build;
  return {
    path,
    format: "env",
    text,
    pieces: reader.pieces.triples(),
    entries,
    diagnostics: diagnostics.all(),
  };
}

function readLine(reader: Reader, start: number): number {
  const { text, pieces } = reader;
  const from = skipBlanks(text, start, text.length);
  pieces.put(PIECE.space, start, from);
  let end = from;
  if (text.charCodeAt(from) === CHAR.hash) end = readComment(reader, from);
  else if (from < text.length && !isLineEnd(text.charCodeAt(from))) end = readAssignment(reader, from);
  const after = afterLineEnd(text, end);
  pieces.put(PIECE.lineEnd, end, after);
  return after;
}

interface Assignment {
  readonly name: NameAt;
  readonly value: ScalarAt;
  readonly closed: boolean;
}

const HEAD = /^(export[ \t]+)?([A-Za-z_][\w.-]*)([ \t]*=[ \t]*)/;
const LONGEST_HEAD = 400;

/** `NAME=value` at an offset; null where none stands. A value in quotes may go over several lines. */
function assignmentAt(text: string, start: number, end: number): Assignment | null {
  const head = HEAD.exec(text.slice(start, Math.min(end, start + LONGEST_HEAD)));
  if (!head) return null;
  const [whole, exported = "", name = "", mark = ""] = head;
  const keyStart = start + exported.length;
  const keyEnd = keyStart + name.length;
  const place = { name, start: keyStart, end: keyEnd };
  const at = start + whole.length;
  // Blanks before a comment or before nothing are no part of the mark.
  if (
    at >= end ||
    isLineEnd(text.charCodeAt(at)) ||
    (text.charCodeAt(at) === CHAR.hash && mark.endsWith(" "))
  ) {
    const empty = keyEnd + mark.trimEnd().length;
    return { name: place, value: { start: empty, end: empty, value: { kind: "none" } }, closed: true };
  }
  const quote = text.charAt(at);
  if (quote === '"' || quote === "'" || quote === "`") return quoted(text, place, { at, quote, end });
  const stop = endOfBare(text, at, end);
  const value = readScalar(text, at, stop, { c: false });
  return { name: place, value: { start: at, end: stop, value }, closed: true };
}

function quoted(
  text: string,
  name: NameAt,
  { at, quote, end }: { readonly at: number; readonly quote: string; readonly end: number },
): Assignment {
  const close = closeOf(text, { at, quote, end });
  const stop = close < 0 ? trimBlanks(text, at, Math.min(end, lineEnd(text, at))) : close;
  const inner = text.slice(at + 1, close < 0 ? stop : stop - 1);
  const value: Scalar = { kind: "text", value: quote === '"' ? unescape(inner) : inner };
  return { name, value: { start: at, end: stop, value }, closed: close > 0 };
}

/** Offset behind the closing quote; -1 for none. A backslash guards the next character between double quotes. */
function closeOf(text: string, { at, quote, end }: { at: number; quote: string; end: number }): number {
  for (let i = at + 1; i < end; i++) {
    if (text.charAt(i) === quote) return i + 1;
    if (quote === '"' && text.charCodeAt(i) === CHAR.backslash) i++;
  }
  return -1;
}

const ESCAPES: ReadonlyMap<string, string> = new Map([
  ["n", "\n"],
  ["r", "\r"],
  ["t", "\t"],
]);

function unescape(inner: string): string {
  return inner.replace(/\\([^])/g, (_, one: string) => ESCAPES.get(one) ?? one);
}

/** Up to a blank and a `#`, or to the end of the line. */
function endOfBare(text: string, at: number, end: number): number {
  let i = at;
  while (i < end && !isLineEnd(text.charCodeAt(i))) {
    if (text.charCodeAt(i) === CHAR.hash && isBlank(text.charCodeAt(i - 1))) break;
    i++;
  }
  return trimBlanks(text, at, i);
}

function readAssignment(reader: Reader, start: number): number {
  const { build, text, pieces } = reader;
  const found = assignmentAt(text, start, text.length);
  if (!found) return readOther(reader, start);
  const { name, value, closed } = found;
  pieces.put(PIECE.directive, start, name.start);
  pieces.put(PIECE.key, name.start, name.end);
  pieces.put(PIECE.separator, name.end, value.start);
  pieces.put(PIECE.value, value.start, value.end);
  const subtree = build.open(build.root, name);
  const entry = build.scalar(build.root, name, value);
  build.close(subtree);
  if (!closed) tellOpen(build, name, value);
  else if (value.value.kind === "text") tellExpansion(build, name, value);
  const from = skipBlanks(text, value.end, text.length);
  const end = lineEnd(text, from);
  pieces.put(PIECE.space, value.end, from);
  if (from === end) return end;
  const comment = text.charCodeAt(from) === CHAR.hash;
  if (comment) entry.setComment(from, end, text.slice(from, end).replace(/^#+/, "").trim());
  else build.unread(from, end, "something follows the closing quote.");
  pieces.put(comment ? PIECE.comment : PIECE.unread, from, end);
  return end;
}

function tellOpen({ lines, diagnostics }: TreeBuilder, { name }: NameAt, { start, end }: ScalarAt): void {
  const span = lines.span(start, end);
  const message = `The value of “${name}” on line ${span.line} opens a quote that is not closed. It is kept and taken up to the end of its line; close it.`;
  diagnostics.add("unclosed-quote", "warning", span, message);
}

/** `$NAME` and `$(…)` are filled in by the shell, which is not at hand here. */
function tellExpansion(build: TreeBuilder, { name }: NameAt, { start, end }: ScalarAt): void {
  const raw = build.text.slice(start, end);
  if (raw.startsWith("'") || !/\$[A-Za-z_{(]/.test(raw)) return;
  const span = build.lines.span(start, end);
  const message = `The value of “${name}” on line ${span.line} has a “$” that a shell fills in. It is kept and read as it stands; write the value itself.`;
  build.diagnostics.add("not-standard", "warning", span, message);
}

function readOther({ build, text, pieces }: Reader, start: number): number {
  const end = lineEnd(text, start);
  const stop = trimBlanks(text, start, end);
  build.unread(start, stop, "something stands here that is neither an assignment nor a comment.");
  pieces.put(PIECE.unread, start, stop);
  pieces.put(PIECE.space, stop, end);
  return end;
}

/** A comment alone on its line may hold a disabled assignment. */
function readComment({ build, text, pieces }: Reader, start: number): number {
  const end = lineEnd(text, start);
  pieces.put(PIECE.comment, start, end);
  let from = start;
  while (from < end && (text.charCodeAt(from) === CHAR.hash || isBlank(text.charCodeAt(from)))) from++;
  const found = assignmentAt(text, from, end);
  if (!found?.closed || found.value.value.kind === "none") return end;
  const { value, name } = found;
  const prose =
    value.value.kind === "text" && /\s/.test(value.value.value) && !/^["'`]/.test(text.charAt(value.start));
  if (prose || skipBlanks(text, value.end, end) < end) return end;
  build.scalar(build.root, name, value).disabled = true;
  return end;
}
