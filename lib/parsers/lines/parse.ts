import { canonicalUnit } from "@/lib/domain/units";
import type { Span } from "@/lib/domain/span";
import { CHAR, isBlank, isDigit, isLetter, isQuote, isWordChar, skipBlanks, trimBlanks } from "../chars";
import { diagnosticList, type DiagnosticList } from "../diagnostic-list";
import { PIECE, type Document, type Entry, type ParsedValue } from "../types";
import { readValue, type ValueFault } from "../value";
import type { Manner } from "../scalar";
import { cutLine, lexLines } from "./lex";

const MANNER: Manner = { c: false };
/** A key table's key has at most so many characters; a longer section name is cut, so that keys stay small. */
const LONGEST_SECTION = 200;

type Draft = { -readonly [K in keyof Entry]: Entry[K] };

interface Reader {
  readonly text: string;
  readonly entries: Draft[];
  readonly diagnostics: DiagnosticList;
  /** Enabled entry that counts for each key so far. */
  readonly counting: Map<string, Draft>;
  /** Disabled entries in `key value` form: kept only where the text writes its keys so. */
  readonly doubtful: Set<Draft>;
  section: string | null;
  /** Section named in a comment, for the disabled keys below it. */
  disabledSection: string | null;
  spacedKeys: number;
  markedKeys: number;
  line: number;
  lineStart: number;
}

/** Reads a text of the line family. Never throws on a text; what it cannot read is kept and reported. */
export function parseLines(path: string, text: string): Document {
  const pieces = lexLines(text);
  const reader: Reader = {
    text,
    entries: [],
    diagnostics: diagnosticList(),
    counting: new Map(),
    doubtful: new Set(),
    section: null,
    disabledSection: null,
    spacedKeys: 0,
    markedKeys: 0,
    line: 1,
    lineStart: 0,
  };
  for (let i = 0; i < pieces.length; i += 3) readPiece(reader, pieces, i);
  return {
    path,
    format: "lines",
    text,
    pieces,
    entries: settle(reader),
    diagnostics: reader.diagnostics.all(),
  };
}

function readPiece(reader: Reader, pieces: readonly number[], i: number): void {
  const start = pieces[i + 1] ?? 0;
  const end = pieces[i + 2] ?? start;
  switch (pieces[i]) {
    case PIECE.lineEnd:
      reader.line++;
      reader.lineStart = end;
      return;
    case PIECE.key:
      return readKey(reader, pieces, i);
    case PIECE.section:
      return readSection(reader, start, end);
    case PIECE.comment:
      return readComment(reader, { start, end, trailing: follows(pieces, i) });
    case PIECE.unread:
      return reportUnread(reader, start, end);
  }
}

/** Whether something other than white space stands before the piece on its line. */
function follows(pieces: readonly number[], i: number): boolean {
  for (let k = i - 3; k >= 0 && pieces[k] !== PIECE.lineEnd; k -= 3)
    if (pieces[k] !== PIECE.space) return true;
  return false;
}

function spanOf(reader: Reader, start: number, end: number): Span {
  return { start, end, line: reader.line, column: start - reader.lineStart + 1 };
}

function reportUnread(reader: Reader, start: number, end: number): void {
  const { line } = reader;
  const message = `Line ${line} has something that is neither a key with a value, a section nor a comment. It is kept as it is and not used.`;
  reader.diagnostics.add("unreadable-line", "warning", spanOf(reader, start, end), message);
}

function readSection(reader: Reader, start: number, end: number): void {
  const { text, diagnostics, line } = reader;
  reader.disabledSection = null;
  if (text.charCodeAt(end - 1) !== CHAR.closeBracket)
    diagnostics.add(
      "unclosed-section",
      "warning",
      spanOf(reader, start, end),
      `Line ${line} opens a section with “[” and does not close it. The rest of the line is taken as its name; put a “]” after it.`,
    );
  const name = sectionName(text, start, end);
  if (name.length > LONGEST_SECTION)
    diagnostics.add(
      "unreadable-line",
      "warning",
      spanOf(reader, start, end),
      `The section name on line ${line} has ${name.length} characters; only the first ${LONGEST_SECTION} count in its keys.`,
    );
  reader.section = name.slice(0, LONGEST_SECTION) || null;
}

function sectionName(text: string, start: number, end: number): string {
  let from = start;
  let to = end;
  while (from < to && text.charCodeAt(from) === CHAR.openBracket) from++;
  while (to > from && text.charCodeAt(to - 1) === CHAR.closeBracket) to--;
  return text.slice(skipBlanks(text, from, to), trimBlanks(text, from, to));
}

/** Start and end of the pieces of one key's line; a missing value is an empty range after key and separator. */
interface Parts {
  readonly keyStart: number;
  readonly keyEnd: number;
  readonly valueStart: number;
  readonly valueEnd: number;
  readonly marked: boolean;
  readonly comment: readonly [number, number] | null;
}

function partsAt(text: string, pieces: readonly number[], i: number): Parts {
  const keyStart = pieces[i + 1] ?? 0;
  const keyEnd = pieces[i + 2] ?? keyStart;
  let valueStart = keyEnd;
  let valueEnd = keyEnd;
  let marked = false;
  let comment: [number, number] | null = null;
  for (let k = i + 3; k < pieces.length && pieces[k] !== PIECE.lineEnd; k += 3) {
    const start = pieces[k + 1] ?? 0;
    const end = pieces[k + 2] ?? start;
    if (pieces[k] === PIECE.separator) {
      marked = !isBlank(text.charCodeAt(start));
      valueStart = valueEnd = end;
    } else if (pieces[k] === PIECE.value) {
      valueStart = start;
      valueEnd = end;
    } else if (pieces[k] === PIECE.comment) comment = [start, end];
  }
  return { keyStart, keyEnd, valueStart, valueEnd, marked, comment };
}

function readKey(reader: Reader, pieces: readonly number[], i: number): void {
  const parts = partsAt(reader.text, pieces, i);
  reader.disabledSection = null;
  if (parts.valueStart === parts.keyEnd && !isName(reader.text, parts.keyStart, parts.keyEnd))
    return reportUnread(reader, parts.keyStart, parts.keyEnd);
  if (parts.valueEnd > parts.keyEnd) {
    if (parts.marked) reader.markedKeys++;
    else reader.spacedKeys++;
  }
  const entry = addEntry(reader, parts, reader.section);
  const before = reader.counting.get(entry.key);
  if (before) shadow(reader, before, entry);
  reader.counting.set(entry.key, entry);
}

function shadow(reader: Reader, before: Draft, by: Draft): void {
  before.shadowed = true;
  const message = `“${before.key}” on line ${before.keySpan.line} stands again on line ${by.keySpan.line}, and the later value counts. Both are kept; delete the one that is not wanted.`;
  reader.diagnostics.add("duplicate-key", "warning", before.keySpan, message);
}

function addEntry(reader: Reader, parts: Parts, section: string | null): Draft {
  const { text } = reader;
  const valueSpan = spanOf(reader, parts.valueStart, parts.valueEnd);
  const { value, fault } = readValue({ text, span: valueSpan, manner: MANNER });
  const name = keyName(text, parts.keyStart, parts.keyEnd);
  const entry: Draft = {
    id: reader.entries.length,
    path: section === null ? [name] : [section, name],
    key: section === null ? name : `${section}.${name}`,
    keySpan: spanOf(reader, parts.keyStart, parts.keyEnd),
    valueSpan,
    raw: text.slice(parts.valueStart, parts.valueEnd),
    value,
    comment: parts.comment && commentText(text, parts.comment[0], parts.comment[1]),
    commentSpan: parts.comment && spanOf(reader, parts.comment[0], parts.comment[1]),
    disabled: false,
    conditions: ALWAYS,
    shadowed: false,
  };
  if (fault) reportFault(reader, fault, entry);
  reader.entries.push(entry);
  return entry;
}

const ALWAYS: readonly string[] = [];

function reportFault(reader: Reader, fault: ValueFault, entry: Draft): void {
  const what = fault === "unclosed-quote" ? "a quote" : "a bracket";
  const message = `The value of “${entry.key}” on line ${reader.line} opens ${what} that is not closed on that line. It is kept and taken as plain text; close it.`;
  reader.diagnostics.add(fault, "warning", entry.valueSpan, message);
}

/** A key in quotes loses them. */
function keyName(text: string, start: number, end: number): string {
  const quoted = end - start >= 2 && isQuote(text.charCodeAt(start));
  const closed = quoted && text.charCodeAt(end - 1) === text.charCodeAt(start);
  return closed ? text.slice(start + 1, end - 1) : text.slice(start, end);
}

/** A key that stands alone must look like one: letters, digits, _ . $ - and at least one letter or $. */
function isName(text: string, start: number, end: number): boolean {
  let named = false;
  for (let i = start; i < end; i++) {
    const code = text.charCodeAt(i);
    if (isLetter(code) || code === DOLLAR) named = true;
    else if (!isWordChar(code) && code !== CHAR.dot && code !== CHAR.minus) return false;
  }
  return named;
}

const DOLLAR = 36;

function commentText(text: string, start: number, end: number): string {
  const from = contentOfComment(text, start, end);
  return text.slice(from, Math.max(from, end));
}

/** Offset of the first character after the marks of a comment and the blanks behind them. */
function contentOfComment(text: string, start: number, end: number): number {
  const mark = text.charCodeAt(start);
  let i = start;
  while (i < end && text.charCodeAt(i) === mark) i++;
  return skipBlanks(text, i, end);
}

function readComment(reader: Reader, at: { start: number; end: number; trailing: boolean }): void {
  if (at.trailing) return;
  const { text } = reader;
  const from = contentOfComment(text, at.start, at.end);
  const cut: number[] = [];
  cutLine(text, from, at.end, cut);
  if (cut[0] === PIECE.section) return readDisabledSection(reader, cut);
  if (cut[0] !== PIECE.key) return;
  const parts = partsAt(text, cut, 0);
  const probe = readValue({ text, span: spanOf(reader, parts.valueStart, parts.valueEnd), manner: MANNER });
  if (probe.fault || !isName(text, parts.keyStart, parts.keyEnd) || !readsAsKey(text, parts, probe.value))
    return;
  const entry = addEntry(reader, parts, reader.disabledSection ?? reader.section);
  entry.disabled = true;
  if (!parts.marked) reader.doubtful.add(entry);
}

/** `# [axis.y]` names the section of the disabled keys below it, when nothing else stands on its line. */
function readDisabledSection(reader: Reader, cut: readonly number[]): void {
  const start = cut[1] ?? 0;
  const end = cut[2] ?? start;
  if (cut.length > 3 || reader.text.charCodeAt(end - 1) !== CHAR.closeBracket) return;
  reader.disabledSection = sectionName(reader.text, start, end).slice(0, LONGEST_SECTION) || null;
}

/**
 * Tells a commented-out key from prose. After `=` any single word or readable value will do; after `:` or
 * white space, where prose is common, it must be a number in a known unit, a truth value, or a list of those.
 */
function readsAsKey(text: string, parts: Parts, value: ParsedValue): boolean {
  if (isPlain(value)) return true;
  const equals = parts.marked && text.slice(parts.keyEnd, parts.valueStart).includes("=");
  if (!equals || value.kind === "none" || value.kind === "number") return false;
  if (value.kind === "list") return true;
  return isQuote(text.charCodeAt(parts.valueStart)) || (value.kind === "text" && !/\s/.test(value.value));
}

function isPlain(value: ParsedValue): boolean {
  if (value.kind === "number") return value.unit === null || canonicalUnit(value.unit) !== null;
  if (value.kind === "list")
    return value.items.length > 0 && value.items.every((item) => isPlain(item.value));
  return value.kind === "boolean";
}

/** Leaves out doubtful disabled keys where the text's own keys are not written that way, and numbers the rest. */
function settle(reader: Reader): Entry[] {
  const { entries, doubtful } = reader;
  if (doubtful.size === 0 || reader.spacedKeys > reader.markedKeys) return entries;
  const kept = entries.filter((entry) => !doubtful.has(entry) || isTechnical(entry));
  kept.forEach((entry, id) => (entry.id = id));
  return kept;
}

/** A name that prose would not have: with a digit, an underscore, a dot or a dollar sign. */
function isTechnical(entry: Draft): boolean {
  const name = entry.path[entry.path.length - 1] ?? "";
  for (let i = 0; i < name.length; i++) {
    const code = name.charCodeAt(i);
    if (isDigit(code) || code === CHAR.underscore || code === CHAR.dot || code === DOLLAR) return true;
  }
  return false;
}
