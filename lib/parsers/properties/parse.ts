import { afterLineEnd, CHAR, isLineEnd, lineEnd } from "../chars";
import { Pieces } from "../pieces";
import { readScalar, type Scalar } from "../scalar";
import { TreeBuilder, type ScalarAt } from "../tree";
import { PIECE, type Document } from "../types";
import { readValue } from "../value";
import { unescape } from "./escapes";

interface Reader {
  readonly build: TreeBuilder;
  readonly pieces: Pieces;
  readonly text: string;
}

/** Space, tab and form feed are white space between the parts of a line (class description of java.util.Properties). */
const FORM_FEED = 12;

function isWhite(code: number): boolean {
  return code === CHAR.space || code === CHAR.tab || code === FORM_FEED;
}

/** Reads `.properties` after the class description of java.util.Properties. Never throws on a text. */
export function parseProperties(path: string, text: string): Document {
  const build = new TreeBuilder(text);
  const reader: Reader = { build, text, pieces: new Pieces(text.length / 6) };
  let at = text.charCodeAt(0) === CHAR.byteOrderMark ? 1 : 0;
  reader.pieces.put(PIECE.space, 0, at);
  while (at < text.length) at = readLine(reader, at);
  const { entries, diagnostics } = build;
  return {
    path,
    format: "properties",
    text,
    pieces: reader.pieces.triples(),
    entries,
    diagnostics: diagnostics.all(),
  };
}

/** One logical line, with the line end behind it. */
function readLine(reader: Reader, start: number): number {
  const { text, pieces } = reader;
  const from = skipWhite(text, start, text.length);
  pieces.put(PIECE.space, start, from);
  const code = text.charCodeAt(from);
  let end = from;
  if (code === CHAR.hash || code === EXCLAMATION) end = readComment(reader, from);
  else if (from < text.length && !isLineEnd(code)) end = readPair(reader, from);
  const after = afterLineEnd(text, end);
  pieces.put(PIECE.lineEnd, end, after);
  return after;
}

const EXCLAMATION = 33;

function skipWhite(text: string, start: number, end: number): number {
  let i = start;
  while (i < end && isWhite(text.charCodeAt(i))) i++;
  return i;
}

/** Offset of the line end that no backslash continues. */
function logicalEnd(text: string, start: number): number {
  let i = start;
  while (i < text.length && !isLineEnd(text.charCodeAt(i))) {
    if (text.charCodeAt(i) !== CHAR.backslash) i++;
    else i = isLineEnd(text.charCodeAt(i + 1)) ? afterLineEnd(text, i + 1) : i + 2;
  }
  return Math.min(i, text.length);
}

/** White space, and line ends that a backslash continues, from an offset on. */
function skipGap(text: string, start: number, end: number): number {
  let i = start;
  for (;;) {
    i = skipWhite(text, i, end);
    if (text.charCodeAt(i) !== CHAR.backslash || i + 1 >= end || !isLineEnd(text.charCodeAt(i + 1))) return i;
    i = Math.min(end, afterLineEnd(text, i + 1));
  }
}

interface Pair {
  readonly keyEnd: number;
  readonly value: number;
  readonly marked: boolean;
}

/** Where the key of a logical line ends and its value begins. */
function cutPair(text: string, start: number, end: number): Pair {
  let i = start;
  while (i < end) {
    const code = text.charCodeAt(i);
    if (code === CHAR.backslash) {
      const spliced = i + 1 < end && isLineEnd(text.charCodeAt(i + 1));
      const next = spliced ? skipGap(text, i, end) : i + 2;
      if (spliced && next >= end) break;
      i = next;
      continue;
    }
    if (isWhite(code) || isLineEnd(code) || code === CHAR.equals || code === CHAR.colon) break;
    i++;
  }
  const keyEnd = Math.min(i, end);
  const mark = skipGap(text, keyEnd, end);
  const code = mark < end ? text.charCodeAt(mark) : 0;
  const marked = code === CHAR.equals || code === CHAR.colon;
  return { keyEnd, value: marked ? skipGap(text, mark + 1, end) : mark, marked };
}

function readPair({ build, text, pieces }: Reader, start: number): number {
  const end = logicalEnd(text, start);
  const { keyEnd, value } = cutPair(text, start, end);
  pieces.put(PIECE.key, start, keyEnd);
  pieces.put(PIECE.separator, keyEnd, value);
  pieces.put(PIECE.value, value, end);
  const key = unescape(text.slice(start, keyEnd));
  const name = { name: key.said, start, end: keyEnd };
  const subtree = build.open(build.root, name);
  addValue(build, name, { start: value, end });
  build.close(subtree);
  if (key.wrong || unescape(text.slice(value, end)).wrong) tellEscape(build, start, end);
  return end;
}

function tellEscape({ lines, diagnostics }: TreeBuilder, start: number, end: number): void {
  const span = lines.span(start, end);
  const message = `Line ${span.line} has “\\u” without four hexadecimal digits behind it, which a reader of properties refuses. It is kept as it stands; write the four digits or a double backslash.`;
  diagnostics.add("not-standard", "warning", span, message);
}

function addValue(
  build: TreeBuilder,
  name: { readonly name: string; readonly start: number; readonly end: number },
  { start, end }: { readonly start: number; readonly end: number },
) {
  const { text } = build;
  const raw = text.slice(start, end);
  if (raw.includes("\\")) return build.scalar(build.root, name, { start, end, value: escaped(raw) });
  const { value } = readValue({ text, span: build.lines.span(start, end), manner: { c: false } });
  if (value.kind !== "list")
    return build.scalar(build.root, name, { start, end, value: unquoted(raw, value) });
  const items = value.items.map((item): ScalarAt => ({
    start: item.span.start,
    end: item.span.end,
    value: item.value,
  }));
  return build.list(build.root, name, { start, end, items });
}

/** Quotes are ordinary characters here. */
function unquoted(raw: string, value: Scalar): Scalar {
  return value.kind === "text" ? { kind: "text", value: raw } : value;
}

/** A value with escapes is the text that they stand for. */
function escaped(raw: string): Scalar {
  const { said } = unescape(raw);
  const scalar = readScalar(said, 0, said.length, { c: false });
  return scalar.kind === "boolean" ? scalar : { kind: "text", value: said };
}

/** A comment reaches to the end of its own line; no backslash continues it. It may hold a disabled key. */
function readComment({ build, text, pieces }: Reader, start: number): number {
  const end = lineEnd(text, start);
  pieces.put(PIECE.comment, start, end);
  let from = start;
  while (from < end && (text.charCodeAt(from) === CHAR.hash || text.charCodeAt(from) === EXCLAMATION)) from++;
  from = skipWhite(text, from, end);
  const { keyEnd, value, marked } = cutPair(text, from, end);
  const technical = /^[A-Za-z_][\w.-]*$/.test(text.slice(from, keyEnd));
  if (!marked || !technical || value >= end || text.charCodeAt(end - 1) === CHAR.backslash) return end;
  if (/[A-Za-z]{2,}\s+[A-Za-z]{2,}/.test(text.slice(value, end))) return end;
  addValue(
    build,
    { name: text.slice(from, keyEnd), start: from, end: keyEnd },
    { start: value, end },
  ).disabled = true;
  return end;
}
