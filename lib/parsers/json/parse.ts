import { Pieces } from "../pieces";
import { MOST_DEPTH, TreeBuilder, type NameAt, type ScalarAt, type Section, type TreeEntry } from "../tree";
import { PIECE, type Document } from "../types";
import { disabledMembers } from "./disabled";
import { putPiece, scalarOf, TOKEN, tokensOf, type Token } from "./tokens";

/** What may come next in an object or array. */
type Expected = "name" | "colon" | "value" | "comma";

/** An object or array that is open. */
interface Frame {
  readonly array: boolean;
  readonly section: Section;
  /** The name that brought it; null for the outermost. */
  readonly name: NameAt | null;
  readonly owner: Section;
  readonly start: number;
  expected: Expected;
  /** Of an object: the name whose value is awaited. */
  awaiting: NameAt | null;
  subtree: ReturnType<TreeBuilder["open"]> | null;
  /** Of an array: its plain values so far, how many elements there were, whether all are plain. */
  readonly items: { readonly index: number; readonly at: ScalarAt }[];
  count: number;
  plain: boolean;
  /** Offset of a comma after which nothing has come yet; -1 for none. */
  comma: number;
}

interface Reader {
  readonly build: TreeBuilder;
  readonly pieces: Pieces;
  readonly frames: Frame[];
  /** How many brackets are open beyond the deepest level that is read. */
  beyond: number;
  /** The outermost value has been read. */
  done: boolean;
  /** One run of tokens that do not fit is told once. */
  told: boolean;
  /** The last entry on the present line, to which a comment behind it belongs. */
  last: TreeEntry | null;
}

/** Reads JSON (RFC 8259), with comments where it has any. Never throws on a text; what it cannot read is kept and reported. */
export function parseJson(path: string, text: string): Document {
  const build = new TreeBuilder(text);
  const pieces = new Pieces(text.length / 4);
  const reader: Reader = { build, pieces, frames: [], beyond: 0, done: false, told: false, last: null };
  for (const token of tokensOf(text)) readToken(reader, token);
  finish(reader);
  return {
    path,
    format: "json",
    text,
    pieces: pieces.triples(),
    entries: build.entries,
    diagnostics: build.diagnostics.all(),
  };
}

function readToken(reader: Reader, token: Token): void {
  const { kind } = token;
  const frame = reader.frames[reader.frames.length - 1];
  if (kind === TOKEN.string && reader.beyond === 0 && frame?.expected === "name")
    reader.pieces.put(PIECE.key, token.start, token.end);
  else putPiece(reader.pieces, token);
  if (kind === TOKEN.lineBreak) reader.last = null;
  else if (kind === TOKEN.lineComment || kind === TOKEN.blockComment) readComment(reader, token, frame);
  else if (kind !== TOKEN.blank) readMeaning(reader, token, frame);
}

function readMeaning(reader: Reader, token: Token, frame: Frame | undefined): void {
  const { kind } = token;
  if (reader.beyond > 0) return skipBeyond(reader, kind);
  if (token.faulty || kind === TOKEN.unknown) return misfit(reader, token, faultOf(token));
  if (!frame) return readOutermost(reader, token);
  if (kind === TOKEN.closeBrace || kind === TOKEN.closeBracket) return closeFrame(reader, frame, token);
  if (kind === TOKEN.comma) return readComma(reader, frame, token);
  if (kind === TOKEN.colon) return readColon(reader, frame, token);
  if (frame.expected === "comma") {
    tellMissing(reader, token, "a comma");
    frame.expected = frame.array ? "value" : "name";
  }
  if (frame.expected === "name") return readName(reader, frame, token);
  if (frame.expected === "colon") tellMissing(reader, token, "a colon");
  readValue(reader, frame, token);
}

function faultOf({ kind, value }: Token): string {
  if (kind === TOKEN.string)
    return "a text in quotes is not closed on its line or has an escape that does not exist.";
  if (kind === TOKEN.number) return `“${shorten(value)}” is a number cut short.`;
  return `“${shorten(value)}” is neither a value nor a name in double quotes.`;
}

const LONGEST_QUOTE = 40;

function shorten(text: string): string {
  return text.length > LONGEST_QUOTE ? `${text.slice(0, LONGEST_QUOTE)}…` : text;
}

/** Tells of something that does not fit, once for a run of such things; a value that was awaited is there, but unread. */
function misfit(reader: Reader, token: Token, what: string): void {
  const frame = reader.frames[reader.frames.length - 1];
  if (frame?.expected === "value") frame.expected = "comma";
  if (!reader.told) reader.build.unread(token.start, token.end, what);
  reader.told = true;
}

function tellMissing({ build }: Reader, { start }: Token, what: string): void {
  const span = build.lines.span(start, start);
  const message = `Line ${span.line}, column ${span.column}: ${what} is missing before this. The text is read as if it stood there; put it in.`;
  build.diagnostics.add("not-standard", "warning", span, message);
}

function readOutermost(reader: Reader, token: Token): void {
  if (reader.done) return misfit(reader, token, "more follows after the end of the text's one value.");
  reader.done = true;
  if (token.kind === TOKEN.openBrace || token.kind === TOKEN.openBracket)
    return openFrame(reader, token, { name: null, owner: reader.build.root, section: reader.build.root });
  misfit(reader, token, "a text of settings is an object in braces with a name before each value.");
}

interface Opening {
  readonly name: NameAt | null;
  readonly owner: Section;
  readonly section: Section;
}

function openFrame(reader: Reader, token: Token, { name, owner, section }: Opening): void {
  if (reader.frames.length >= MOST_DEPTH) {
    reader.build.tooDeep(token.start, token.end);
    reader.beyond = 1;
    return;
  }
  const array = token.kind === TOKEN.openBracket;
  reader.last = null;
  reader.frames.push({
    array,
    section,
    name,
    owner,
    start: token.start,
    expected: array ? "value" : "name",
    awaiting: null,
    subtree: null,
    items: [],
    count: 0,
    plain: true,
    comma: -1,
  });
}

/** Brackets beyond the deepest level are only counted. */
function skipBeyond(reader: Reader, kind: number): void {
  if (kind === TOKEN.openBrace || kind === TOKEN.openBracket) reader.beyond++;
  if (kind === TOKEN.closeBrace || kind === TOKEN.closeBracket) reader.beyond--;
  const frame = reader.frames[reader.frames.length - 1];
  if (reader.beyond === 0 && frame) settled(reader, frame);
}

function readComma(reader: Reader, frame: Frame, token: Token): void {
  if (frame.expected !== "comma")
    return misfit(reader, token, "a comma stands where a value or a name belongs.");
  reader.told = false;
  frame.comma = token.start;
  frame.expected = frame.array ? "value" : "name";
}

function readColon(reader: Reader, frame: Frame, token: Token): void {
  if (frame.expected !== "colon") return misfit(reader, token, "a colon stands where none belongs.");
  frame.expected = "value";
}

function readName(reader: Reader, frame: Frame, token: Token): void {
  if (token.kind !== TOKEN.string)
    return misfit(reader, token, "a value stands where a name in double quotes belongs.");
  reader.told = false;
  reader.last = null;
  frame.awaiting = { name: token.value, start: token.start, end: token.end };
  frame.subtree = reader.build.open(frame.section, frame.awaiting);
  frame.expected = "colon";
  frame.comma = -1;
}

function readValue(reader: Reader, frame: Frame, token: Token): void {
  reader.told = false;
  frame.comma = -1;
  const opens = token.kind === TOKEN.openBrace || token.kind === TOKEN.openBracket;
  if (opens) {
    const name = nameOfNext(frame, token);
    if (frame.array) frame.plain = false;
    return openFrame(reader, token, { name, owner: frame.section, section: frame.section.child(name.name) });
  }
  const at: ScalarAt = { start: token.start, end: token.end, value: scalarOf(token) };
  if (frame.array) frame.items.push({ index: frame.count, at });
  else if (frame.awaiting) reader.last = reader.build.scalar(frame.section, frame.awaiting, at);
  settled(reader, frame);
}

/** The name of the next value: its own in an object, its number in an array. */
function nameOfNext({ array, count, awaiting }: Frame, { start, end }: Token): NameAt {
  return array || !awaiting ? { name: String(count), start, end } : awaiting;
}

/** A value has ended. */
function settled(reader: Reader, frame: Frame): void {
  frame.count++;
  frame.expected = "comma";
  if (frame.subtree) reader.build.close(frame.subtree);
  frame.subtree = null;
  frame.awaiting = null;
}

function closeFrame(reader: Reader, frame: Frame, token: Token): void {
  if (frame.array !== (token.kind === TOKEN.closeBracket))
    return misfit(reader, token, "a bracket closes that was not opened here.");
  if (frame.expected === "colon" || (frame.expected === "value" && !frame.array))
    reader.build.unread(token.start, token.end, "a name has no value.");
  reader.told = false;
  if (frame.comma >= 0) tellTrailing(reader, frame.comma);
  reader.frames.pop();
  if (frame.array) endArray(reader, frame, token.end);
  const outer = reader.frames[reader.frames.length - 1];
  if (outer) settled(reader, outer);
}

function tellTrailing({ build }: Reader, at: number): void {
  const span = build.lines.span(at, at + 1);
  const message = `Line ${span.line}, column ${span.column} has a comma after the last value. It is read here; RFC 8259 does not allow it, and a strict reader refuses the text.`;
  build.diagnostics.add("not-standard", "note", span, message);
}

/** Plain values alone make one list; among objects and lists each is an entry of its own. */
function endArray(reader: Reader, frame: Frame, end: number): void {
  const { build } = reader;
  const { name, owner, section, items, start } = frame;
  if (frame.plain && name) {
    reader.last = build.list(owner, name, { start, end, items: items.map(({ at }) => at) });
    return;
  }
  for (const { index, at } of items)
    build.scalar(section, { name: String(index), start: at.start, end: at.end }, at);
}

function readComment(reader: Reader, { kind, start, end }: Token, frame: Frame | undefined): void {
  const { build } = reader;
  const block = kind === TOKEN.blockComment;
  const closed = block && end - start >= 4 && build.text.startsWith("*/", end - 2);
  if (block && !closed) {
    const span = build.lines.span(start, end);
    const message = `The comment that opens on line ${span.line} is not closed, so the rest of the text is a comment. Everything is kept; put “*/” where it ends.`;
    build.diagnostics.add("unclosed-comment", "warning", span, message);
  }
  const to = closed ? end - 2 : end;
  if (reader.last) return reader.last.setComment(start, end, build.text.slice(start + 2, to).trim());
  if (!frame || frame.array || reader.beyond > 0) return;
  for (const { name, at } of disabledMembers(build.text, start + 2, to))
    build.scalar(frame.section, name, at).disabled = true;
}

function finish(reader: Reader): void {
  const { build, frames } = reader;
  for (const frame of frames.splice(0).reverse()) {
    const span = build.lines.span(frame.start, frame.start + 1);
    const message = `The “${frame.array ? "[" : "{"}” on line ${span.line}, column ${span.column} is not closed. What stands in it is read as far as it goes; close it.`;
    build.diagnostics.add("unclosed-list", "warning", span, message);
    if (frame.array) endArray(reader, { ...frame, plain: false }, build.text.length);
    if (frame.subtree) build.close(frame.subtree);
  }
}
