import type { Span } from "@/lib/domain/span";
import { CHAR, isBlank, isWordChar, lineEnd, afterLineEnd, skipBlanks } from "../chars";
import { diagnosticList, type DiagnosticList } from "../diagnostic-list";
import { Place } from "../place";
import type { Manner } from "../scalar";
import { Pieces } from "../pieces";
import { PIECE, type Document, type Entry, type ParsedValue } from "../types";
import { readValue } from "../value";
import { Conditions, decide, under } from "./conditions";
import { guardOf } from "./guard";
import { cutDirective, lexDefines } from "./lex";
import { collectLines, type HeaderLine } from "./logical-lines";

const MANNER: Manner = { c: true };

type Draft = { -readonly [K in keyof Entry]: Entry[K] };

/** Enabled entries of one key that may still count. */
interface Counting {
  fresh: Draft[];
  /** Those that a conditional `#undef` may take back. */
  doubtful: Draft[];
  readonly byBranch: Map<number, Draft>;
}

interface Reader {
  readonly text: string;
  readonly pieces: Pieces;
  readonly place: Place;
  readonly entries: Draft[];
  readonly diagnostics: DiagnosticList;
  readonly conditions: Conditions;
  readonly counting: Map<string, Counting>;
}

/** Reads a C header of `#define` lines. Never throws on a text; what it cannot read is kept and reported. */
export function parseDefines(path: string, text: string): Document {
  const pieces = lexDefines(text);
  const reader: Reader = {
    text,
    pieces,
    place: new Place(text),
    entries: [],
    diagnostics: diagnosticList(),
    conditions: new Conditions(),
    counting: new Map(),
  };
  const lines = collectLines(text, pieces);
  const guard = guardOf(lines);
  for (const line of lines) readLine(reader, line, guard);
  for (const { opener, span } of reader.conditions.unclosed())
    reader.diagnostics.add(
      "unclosed-conditional",
      "warning",
      span,
      `“${opener}” on line ${span.line} has no #endif. All that follows counts as conditional; put the #endif where the block ends.`,
    );
  reportUnclosedComment(reader);
  const { entries, diagnostics } = reader;
  return { path, format: "defines", text, pieces: pieces.triples(), entries, diagnostics: diagnostics.all() };
}

function readLine(reader: Reader, line: HeaderLine, guard: ReturnType<typeof guardOf>): void {
  if (line.kind === "comment") return readComment(reader, line.start, line.end);
  if (line.kind === "code") return reportCode(reader, line);
  const span = reader.place.span(line.start, line.end);
  if (line.word === "define") return line === guard?.define ? undefined : readDefine(reader, line);
  if (line.word === "undef") return readUndef(reader, line.key);
  if (line.word.startsWith("if")) {
    const verdict = line.word === "if" ? decide(line.body) : null;
    return reader.conditions.open(`#${line.word} ${line.body}`, verdict, span, line === guard?.open);
  }
  const matched = readInnerDirective(reader, line);
  if (!matched)
    reader.diagnostics.add(
      "unmatched-conditional",
      "warning",
      span,
      `#${line.word} on line ${span.line} has no #if before it. It is kept and changes nothing; delete it or add its #if.`,
    );
}

/** `#elif`, `#else`, `#endif`; false where no block is open. Every other directive is kept and means nothing here. */
function readInnerDirective({ conditions }: Reader, line: HeaderLine): boolean {
  switch (line.word) {
    case "elif":
      return conditions.alternative(`#elif ${line.body}`, decide(line.body));
    case "elifdef":
    case "elifndef":
      return conditions.alternative(`#${line.word} ${line.body}`, null);
    case "else":
      return conditions.alternative("#else", true);
    case "endif":
      return conditions.close();
    default:
      return true;
  }
}

function reportCode(reader: Reader, line: HeaderLine): void {
  const span = reader.place.span(line.start, line.end);
  const message = `From line ${span.line} on stands code that is neither a #define nor a comment. It is kept as it is and not used.`;
  reader.diagnostics.add("unreadable-line", "note", span, message);
}

function readDefine(reader: Reader, line: HeaderLine): void {
  const { branch } = reader.conditions;
  const entry = addEntry(reader, reader.pieces, line.at);
  if (!entry) return;
  entry.conditions = branch.conditions;
  entry.disabled = branch.never;
  if (!branch.never) count(reader, entry, branch.id);
}

/** Lets a new enabled entry take the place of earlier ones: of all when it is unconditional, else of its own branch's. */
function count(reader: Reader, entry: Draft, branch: number): void {
  const counting = reader.counting.get(entry.key) ?? noneCounting();
  const before = branch === 0 ? [...counting.fresh, ...counting.doubtful] : [counting.byBranch.get(branch)];
  for (const old of before) if (old && !old.shadowed) shadow(reader, old, entry);
  const next = branch === 0 ? noneCounting() : counting;
  next.fresh.push(entry);
  if (branch !== 0) next.byBranch.set(branch, entry);
  reader.counting.set(entry.key, next);
}

function noneCounting(): Counting {
  return { fresh: [], doubtful: [], byBranch: new Map() };
}

function shadow(reader: Reader, before: Draft, by: Draft): void {
  before.shadowed = true;
  const message = `“${before.key}” on line ${before.keySpan.line} is defined again on line ${by.keySpan.line}, and the later value counts. Both are kept; delete the one that is not wanted.`;
  reader.diagnostics.add("duplicate-key", "warning", before.keySpan, message);
}

/** An unconditional `#undef` ends earlier entries; a conditional one makes them conditional. */
function readUndef(reader: Reader, key: string): void {
  const counting = reader.counting.get(key);
  const { branch } = reader.conditions;
  if (!counting || branch.never) return;
  if (branch.id === 0) {
    for (const entry of [...counting.fresh, ...counting.doubtful]) entry.shadowed = true;
    reader.counting.delete(key);
    return;
  }
  const own = counting.byBranch.get(branch.id);
  if (own) own.shadowed = true;
  counting.byBranch.delete(branch.id);
  const left = counting.fresh.filter((entry) => !entry.shadowed);
  for (const entry of left)
    entry.conditions = under(entry.conditions, `unless #undef under ${branch.conditions.at(-1)}`);
  for (const entry of left) counting.doubtful.push(entry);
  counting.fresh = [];
}

interface Found {
  key: Span | null;
  parameters: boolean;
  value: Span | null;
  comment: Span | null;
}

/** Spans of a `#define` whose directive is the piece at `at`; asked for in the order of the text. */
function find(reader: Reader, pieces: Pieces, at: number): Found {
  const found: Found = { key: null, parameters: false, value: null, comment: null };
  let after = 0;
  for (let i = at + 1; i < pieces.count && pieces.kind(i) !== PIECE.lineEnd; i++) {
    const start = pieces.start(i);
    const end = pieces.end(i);
    const kind = pieces.kind(i);
    if (kind === PIECE.key) found.key = reader.place.span(start, end);
    else if (kind === PIECE.separator) found.parameters = true;
    else if (kind === PIECE.value) found.value = reader.place.span(start, end);
    else if (kind === PIECE.comment) found.comment ??= reader.place.span(start, end);
    if (kind === PIECE.key || kind === PIECE.separator) after = end;
  }
  if (found.key)
    found.value ??= {
      ...found.key,
      start: after,
      end: after,
      column: found.key.column + after - found.key.start,
    };
  return found;
}

function addEntry(reader: Reader, pieces: Pieces, at: number): Draft | null {
  const { text } = reader;
  const { key: keySpan, value: valueSpan, comment, parameters } = find(reader, pieces, at);
  if (!keySpan || !valueSpan) return null;
  const key = text.slice(keySpan.start, keySpan.end);
  const raw = text.slice(valueSpan.start, valueSpan.end);
  const entry: Draft = {
    id: reader.entries.length,
    path: [key],
    key,
    keySpan,
    valueSpan,
    raw,
    value: parameters ? { kind: "text", value: raw } : readDefined(reader, valueSpan, key),
    comment: comment && commentText(text, comment),
    commentSpan: comment,
    disabled: false,
    conditions: [],
    shadowed: false,
  };
  reader.entries.push(entry);
  return entry;
}

function readDefined(reader: Reader, span: Span, key: string): ParsedValue {
  const { value, fault } = readValue({ text: reader.text, span, manner: MANNER });
  if (!fault) return value;
  const what = fault === "unclosed-quote" ? "a quote" : "a bracket";
  const message = `The value of “${key}” on line ${span.line} opens ${what} that is not closed. It is kept and taken as plain text; close it.`;
  reader.diagnostics.add(fault, "warning", span, message);
  return value;
}

/** Content of a comment without its marks. */
function commentText(text: string, span: Span): string {
  const body = text.slice(span.start + 2, span.end);
  const line = text.charCodeAt(span.start + 1) === CHAR.slash;
  return (line ? body.replace(/^[/!<]+/, "") : body.replace(/^[*!<]+/, "").replace(/\*+\/$/, "")).trim();
}

/** Finds disabled `#define` lines inside a comment. */
function readComment(reader: Reader, start: number, end: number): void {
  const { text } = reader;
  const block = text.charCodeAt(start + 1) === CHAR.star;
  const closed = block && end - start >= 4 && text.startsWith("*/", end - 2);
  const limit = closed ? end - 2 : end;
  let at = start + 2;
  while (at < limit) {
    const from = skipDecoration(text, at, limit);
    const isDefine = text.charCodeAt(from) === CHAR.hash && definesAt(text, from, limit);
    const stop = isDefine ? readDisabled(reader, from, limit) : lineEnd(text, from);
    at = Math.max(afterLineEnd(text, stop), at + 1);
  }
}

/** A comment that is not closed reaches to the end of the text, so it is the last piece. */
function reportUnclosedComment({ text, pieces, diagnostics }: Reader): void {
  const last = pieces.count - 1;
  const start = pieces.start(last);
  if (pieces.kind(last) !== PIECE.comment || text.charCodeAt(start + 1) !== CHAR.star) return;
  if (text.length - start >= 4 && text.endsWith("*/")) return;
  const span = new Place(text).span(start, text.length);
  const message = `The comment that opens on line ${span.line} is not closed, so the rest of the text is a comment. Everything is kept; put “*/” where it ends.`;
  diagnostics.add("unclosed-comment", "warning", span, message);
}

/** Blanks, stars and slashes that lead a line of a comment. */
function skipDecoration(text: string, start: number, limit: number): number {
  let i = start;
  while (i < limit) {
    const code = text.charCodeAt(i);
    if (!isBlank(code) && code !== CHAR.star && code !== CHAR.slash) break;
    i++;
  }
  return i;
}

function definesAt(text: string, hash: number, limit: number): boolean {
  const word = skipBlanks(text, hash + 1, limit);
  return text.startsWith("define", word) && word + 6 < limit && !isWordChar(text.charCodeAt(word + 6));
}

function readDisabled(reader: Reader, start: number, limit: number): number {
  const cut = new Pieces(8);
  const end = cutDirective(reader.text, start, limit, cut);
  const entry = addEntry(reader, cut, 0);
  const { branch } = reader.conditions;
  if (entry) {
    entry.disabled = true;
    entry.conditions = branch.conditions;
  }
  return end;
}
