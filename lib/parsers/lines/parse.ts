import type { Span } from "@/lib/domain/span";
import { CHAR, skipBlanks, trimBlanks } from "../chars";
import { diagnosticList, type DiagnosticList } from "../diagnostic-list";
import { Pieces } from "../pieces";
import { readScalar, type Manner } from "../scalar";
import { PIECE, type Document, type Entry } from "../types";
import { readValue, type ValueFault } from "../value";
import { isName, isTechnical, readsAsKey } from "./disabled";
import { cutLine, lexLines } from "./lex";
import { contentOfComment, LineEntry } from "./line-entry";

const MANNER: Manner = { c: false };
/** A key table's key has at most so many characters; a longer section name is cut, so that keys stay small. */
const LONGEST_SECTION = 200;

interface Reader {
  readonly text: string;
  readonly pieces: Pieces;
  readonly entries: LineEntry[];
  readonly diagnostics: DiagnosticList;
  /** Enabled entry that counts for each key so far: by the key up to its last dot, then by the rest. */
  readonly counting: Map<string, Map<string, LineEntry>>;
  /** The part of `counting` for keys of this section without a dot. */
  inSection: Map<string, LineEntry>;
  /** Comments that may be prose or a disabled key in `key value` form; the text's own manner decides in the end. */
  readonly doubtful: LineEntry[];
  section: string | null;
  /** Section named in a comment, for the disabled keys below it. */
  disabledSection: string | null;
  /** How many keys are apart from their values by white space alone, and by `=` or `:`. */
  spacedKeys: number;
  markedKeys: number;
  line: number;
  lineStart: number;
  /** For the contents of comments. */
  readonly scratch: Pieces;
}

/** Reads a text of the line family. Never throws on a text; what it cannot read is kept and reported. */
export function parseLines(path: string, text: string): Document {
  const pieces = lexLines(text);
  const root = new Map<string, LineEntry>();
  const reader: Reader = {
    text,
    pieces,
    entries: [],
    diagnostics: diagnosticList(),
    counting: new Map([["", root]]),
    inSection: root,
    doubtful: [],
    section: null,
    disabledSection: null,
    spacedKeys: 0,
    markedKeys: 0,
    line: 1,
    lineStart: 0,
    scratch: new Pieces(8),
  };
  for (let i = 0; i < pieces.count; i++) readPiece(reader, i);
  const entries = settle(reader);
  return {
    path,
    format: "lines",
    text,
    pieces: pieces.triples(),
    entries,
    diagnostics: reader.diagnostics.all(),
  };
}

function readPiece(reader: Reader, i: number): void {
  const { pieces } = reader;
  switch (pieces.kind(i)) {
    case PIECE.lineEnd:
      reader.line++;
      reader.lineStart = pieces.end(i);
      return;
    case PIECE.key:
      return readKey(reader, i);
    case PIECE.section:
      return readSection(reader, pieces.start(i), pieces.end(i));
    case PIECE.comment:
      return standsAlone(reader, pieces.start(i))
        ? readComment(reader, pieces.start(i), pieces.end(i))
        : undefined;
    case PIECE.unread:
      return reportUnread(reader, pieces.start(i), pieces.end(i));
  }
}

/** Whether a comment has nothing but blanks before it on its line. */
function standsAlone({ text, lineStart }: Reader, start: number): boolean {
  const mark = text.charCodeAt(lineStart) === CHAR.byteOrderMark ? 1 : 0;
  return skipBlanks(text, lineStart + mark, start) === start;
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
  reader.inSection = countingUnder(reader, reader.section ?? "");
}

function sectionName(text: string, start: number, end: number): string {
  let from = start;
  let to = end;
  while (from < to && text.charCodeAt(from) === CHAR.openBracket) from++;
  while (to > from && text.charCodeAt(to - 1) === CHAR.closeBracket) to--;
  return text.slice(skipBlanks(text, from, to), trimBlanks(text, from, to));
}

function countingUnder({ counting }: Reader, name: string): Map<string, LineEntry> {
  const found = counting.get(name);
  if (found) return found;
  const made = new Map<string, LineEntry>();
  counting.set(name, made);
  return made;
}

/** The entry whose key is the piece at `i`, with the offsets of its other pieces. */
function entryAt({ text, line, lineStart }: Reader, pieces: Pieces, i: number): LineEntry {
  const entry = new LineEntry(text, pieces.start(i), pieces.end(i), line, lineStart);
  for (let k = i + 1; k < pieces.count && pieces.kind(k) !== PIECE.lineEnd; k++) {
    const kind = pieces.kind(k);
    const start = pieces.start(k);
    const end = pieces.end(k);
    if (kind === PIECE.separator) {
      entry.marked = skipBlanks(text, start, end) < end;
      entry.valueStart = entry.valueEnd = end;
    } else if (kind === PIECE.value) {
      entry.valueStart = start;
      entry.valueEnd = end;
    } else if (kind === PIECE.comment) {
      entry.commentStart = start;
      entry.commentEnd = end;
    }
  }
  return entry;
}

function readKey(reader: Reader, i: number): void {
  const entry = entryAt(reader, reader.pieces, i);
  const { keyStart, keyEnd, valueStart, valueEnd } = entry;
  reader.disabledSection = null;
  if (valueStart === keyEnd && !isName(reader.text, keyStart, keyEnd))
    return reportUnread(reader, keyStart, keyEnd);
  if (valueEnd > valueStart) {
    if (entry.marked) reader.markedKeys++;
    else reader.spacedKeys++;
    const fault = readValueOf(reader, entry);
    if (fault) reportFault(reader, fault, entry);
  }
  place(reader, entry, reader.section);
  count(reader, entry);
}

/** Reads the value of an entry. Numbers and truth values, the most of them, come first and need no span. */
function readValueOf({ text }: Reader, entry: LineEntry): ValueFault | null {
  entry.value = readScalar(text, entry.valueStart, entry.valueEnd, MANNER);
  if (entry.value.kind !== "text") return null;
  const { value, fault } = readValue({ text, span: entry.valueSpan, manner: MANNER });
  entry.value = value;
  return fault;
}

function reportFault(reader: Reader, fault: ValueFault, entry: LineEntry): void {
  const what = fault === "unclosed-quote" ? "a quote" : "a bracket";
  const message = `The value of “${entry.name}” on line ${reader.line} opens ${what} that is not closed on that line. It is kept and taken as plain text; close it.`;
  reader.diagnostics.add(fault, "warning", entry.valueSpan, message);
}

function place({ entries }: Reader, entry: LineEntry, section: string | null): void {
  entry.section = section;
  entry.id = entries.length;
  entries.push(entry);
}

/** Lets a new enabled entry take the place of an earlier one of the same key. */
function count(reader: Reader, entry: LineEntry): void {
  const { name } = entry;
  const dot = name.lastIndexOf(".");
  const rest = dot < 0 ? name : name.slice(dot + 1);
  const under = dot < 0 ? reader.inSection : countingUnder(reader, entry.key.slice(0, -rest.length - 1));
  const before = under.get(rest);
  if (before) shadow(reader, before, entry);
  under.set(rest, entry);
}

function shadow(reader: Reader, before: LineEntry, by: LineEntry): void {
  before.shadowed = true;
  const message = `“${before.key}” on line ${before.keySpan.line} stands again on line ${by.keySpan.line}, and the later value counts. Both are kept; delete the one that is not wanted.`;
  reader.diagnostics.add("duplicate-key", "warning", before.keySpan, message);
}

function readComment(reader: Reader, start: number, end: number): void {
  const { text, scratch } = reader;
  scratch.clear();
  cutLine(text, contentOfComment(text, start, end), end, scratch);
  if (scratch.kind(0) === PIECE.section) return readDisabledSection(reader);
  if (scratch.kind(0) !== PIECE.key) return;
  const entry = entryAt(reader, scratch, 0);
  const { keyStart, keyEnd, valueStart, valueEnd } = entry;
  if (valueStart === valueEnd || !isName(text, keyStart, keyEnd)) return;
  entry.section = reader.disabledSection ?? reader.section;
  if (entry.marked || isTechnical(text, keyStart, keyEnd)) addDisabled(reader, entry);
  else if (STARTS_PLAIN.includes(text.charAt(valueStart))) reader.doubtful.push(entry);
}

/** What a number, a list or a truth value begins with. */
const STARTS_PLAIN = "0123456789+-.[{(tfynoTFYNO";

/** `# [axis.y]` names the section of the disabled keys below it, when nothing else stands on its line. */
function readDisabledSection(reader: Reader): void {
  const { scratch, text } = reader;
  const start = scratch.start(0);
  const end = scratch.end(0);
  if (scratch.count > 1 || text.charCodeAt(end - 1) !== CHAR.closeBracket) return;
  reader.disabledSection = sectionName(text, start, end).slice(0, LONGEST_SECTION) || null;
}

function addDisabled(reader: Reader, entry: LineEntry): void {
  const fault = readValueOf(reader, entry);
  if (fault || !readsAsKey(reader.text, entry)) return;
  entry.disabled = true;
  place(reader, entry, entry.section);
}

/** Takes the doubtful comments as disabled keys where the text writes most of its own keys so. */
function settle(reader: Reader): readonly Entry[] {
  const { entries, doubtful } = reader;
  const certain = entries.length;
  if (reader.spacedKeys > reader.markedKeys) for (const entry of doubtful) addDisabled(reader, entry);
  if (entries.length === certain) return entries;
  entries.sort((a, b) => a.keyStart - b.keyStart);
  entries.forEach((entry, id) => (entry.id = id));
  return entries;
}
