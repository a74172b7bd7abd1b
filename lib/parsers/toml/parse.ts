import { CHAR, isLineEnd } from "../chars";
import { Pieces } from "../pieces";
import { Section, TreeBuilder, type NameAt, type ScalarAt, type TreeEntry } from "../tree";
import { PIECE, type Document } from "../types";
import { Cursor, type Fault } from "./cursor";
import { readKey, readMember, type KeyAt, type Member, type Node } from "./value";

/** A table of the text with those below it by name; of an array of tables the last one. */
interface Table {
  readonly section: Section;
  readonly below: Map<string, Table>;
  /** How many tables of an array of tables each name has. */
  readonly counts: Map<string, number>;
  /** Offset of the header that defines it; -1 for none so far. */
  header: number;
}

interface Reader {
  readonly build: TreeBuilder;
  readonly cursor: Cursor;
  readonly root: Table;
  table: Table;
  /** Section named in a comment, for the disabled keys below it. */
  disabledSection: Section | null;
}

/** Reads TOML 1.0. Never throws on a text; what it cannot read is kept and reported. */
export function parseToml(path: string, text: string): Document {
  const build = new TreeBuilder(text);
  const pieces = new Pieces(text.length / 6);
  const root = tableOf(build.root);
  const cursor = new Cursor(text, 0, text.length, pieces);
  const reader: Reader = { build, cursor, root, table: root, disabledSection: null };
  if (text.charCodeAt(0) === CHAR.byteOrderMark) cursor.cut(PIECE.space, 1);
  while (!cursor.done) readLine(reader);
  for (const fault of cursor.faults) report(build, fault);
  return {
    path,
    format: "toml",
    text,
    pieces: pieces.triples(),
    entries: build.entries,
    diagnostics: build.diagnostics.all(),
  };
}

function tableOf(section: Section): Table {
  return { section, below: new Map(), counts: new Map(), header: -1 };
}

const KEPT = "It is kept as it is and not used.";

function report(build: TreeBuilder, { code, start, end, what }: Fault): void {
  if (code === "too-deep") return build.tooDeep(start, end);
  const span = build.lines.span(start, end);
  const kept = code === "unreadable-line" ? ` ${KEPT}` : "";
  const message = `Line ${span.line}, column ${span.column}: ${what}${kept}`;
  build.diagnostics.add(code, "warning", span, message);
}

function readLine(reader: Reader): void {
  const { cursor } = reader;
  cursor.cut(PIECE.space, cursor.blanksEnd());
  const { code } = cursor;
  const entriesBefore = reader.build.entries.length;
  if (code === CHAR.hash) readComment(reader);
  else if (code === CHAR.openBracket) readHeader(reader);
  else if (!cursor.done && !isLineEnd(code)) readStatement(reader);
  readRest(reader, reader.build.entries[entriesBefore] ? reader.build.entries.at(-1) : undefined);
  if (!cursor.done) cursor.cut(PIECE.lineEnd, cursor.afterLineEnd());
}

/** What follows on a line: a comment, which belongs to the line's key, or something that does not belong there. */
function readRest({ cursor }: Reader, entry: TreeEntry | undefined): void {
  cursor.cut(PIECE.space, cursor.blanksEnd());
  if (cursor.done || isLineEnd(cursor.code)) return;
  const start = cursor.at;
  const end = cursor.lineEnd();
  if (cursor.code === CHAR.hash) {
    if (entry && !entry.disabled) entry.setComment(start, end, contentOf(cursor.text, start, end));
    return cursor.cut(PIECE.comment, end);
  }
  if (cursor.faults.at(-1)?.end !== end)
    cursor.fault(
      "unreadable-line",
      start,
      end,
      "something stands here that is neither a key with a value, a table in brackets nor a comment.",
    );
  cursor.cut(PIECE.unread, end);
}

function contentOf(text: string, start: number, end: number): string {
  return text.slice(start, end).replace(/^#+/, "").trim();
}

function readStatement(reader: Reader): void {
  reader.disabledSection = null;
  const member = readMember(reader.cursor, 0);
  if (member) placeMember(reader, reader.table, member);
}

/** Walks down the names of a dotted key but the last, and puts the value there. */
function placeMember(reader: Reader, from: Table, { key, node }: Member): void {
  const { build } = reader;
  let table = from;
  for (const name of key.names.slice(0, -1)) table = descend(reader, table, name, key);
  const name: NameAt = { name: key.names.at(-1) ?? "", start: key.start, end: key.end };
  if (table.below.has(name.name) && node.kind !== "table") reportTaken(build, name, "a table");
  const subtree = build.open(table.section, name);
  placeNode(reader, table, name, node);
  build.close(subtree);
}

function descend({ build }: Reader, table: Table, name: string, { start, end }: KeyAt): Table {
  const known = table.below.get(name);
  if (known) return known;
  if (table.section.counting.has(name)) reportTaken(build, { name, start, end }, "a value");
  const made = tableOf(table.section.child(name));
  table.below.set(name, made);
  return made;
}

function reportTaken(build: TreeBuilder, { name, start, end }: NameAt, what: string): void {
  const span = build.lines.span(start, end);
  const message = `“${name}” on line ${span.line} is ${what} already, and TOML does not allow both. Both are kept and read; give one of them another name.`;
  build.diagnostics.add("duplicate-key", "warning", span, message);
}

function placeNode(reader: Reader, table: Table, name: NameAt, node: Node): void {
  const { build } = reader;
  if (node.kind === "scalar") return void build.scalar(table.section, name, node.at);
  if (node.kind === "table") {
    const inner = tableOf(table.section.child(name.name));
    table.below.set(name.name, inner);
    for (const member of node.members) placeMember(reader, inner, member);
    return;
  }
  const items = node.items.flatMap((item) => (item.kind === "scalar" ? [item.at] : []));
  if (items.length === node.items.length) return void build.list(table.section, name, { ...node, items });
  const inner = tableOf(table.section.child(name.name));
  node.items.forEach((item, index) =>
    placeNode(reader, inner, { ...spanOf(item), name: String(index) }, item),
  );
}

function spanOf(node: Node): { start: number; end: number } {
  const { start, end } = node.kind === "scalar" ? node.at : node;
  return { start, end };
}

interface Header {
  readonly key: KeyAt;
  readonly array: boolean;
  readonly closed: boolean;
}

/** `[a.b]` or `[[a.b]]`; null where no key stands alone in the brackets. One that is not closed on its line is taken as meant. */
function cutHeader(cursor: Cursor): Header | null {
  const start = cursor.at;
  const array = cursor.startsWith("[[");
  const inside = cursor.aside(start + (array ? 2 : 1));
  inside.at = inside.blanksEnd();
  const key = readKey(inside);
  inside.at = inside.blanksEnd();
  if (!key) return null;
  const closed = inside.startsWith(array ? "]]" : "]");
  if (!closed && inside.at < inside.lineEnd()) return null;
  cursor.cut(PIECE.section, closed ? inside.at + (array ? 2 : 1) : inside.at);
  return { key, array, closed };
}

function readHeader(reader: Reader): void {
  const { cursor, build } = reader;
  reader.disabledSection = null;
  const start = cursor.at;
  const header = cutHeader(cursor);
  if (!header) {
    const what =
      "a table’s name in brackets is not a key of TOML. The keys below it count to the table before; mend it.";
    cursor.fault("unclosed-section", start, cursor.lineEnd(), what);
    return cursor.cut(PIECE.unread, cursor.lineEnd());
  }
  if (!header.closed) {
    const what = "a table’s name in brackets is not closed. The keys below it count to that table; close it.";
    cursor.fault("unclosed-section", start, cursor.at, what);
  }
  const { key, array } = header;
  let table = reader.root;
  for (const name of key.names.slice(0, -1)) table = descend(reader, table, name, key);
  const last = key.names.at(-1) ?? "";
  reader.table = array ? nextOfArray(table, last) : descend(reader, table, last, key);
  if (reader.table.header >= 0) {
    const span = build.lines.span(start, cursor.at);
    const message = `The table “${key.names.join(".")}” on line ${span.line} stands already on line ${build.lines.line(reader.table.header)}, and TOML does not allow it twice. The keys of both are read; put them together.`;
    build.diagnostics.add("duplicate-key", "warning", span, message);
  }
  reader.table.header = start;
}

function nextOfArray(table: Table, name: string): Table {
  const count = table.counts.get(name) ?? 0;
  const next = tableOf(table.section.child(name).child(String(count)));
  table.counts.set(name, count + 1);
  table.below.set(name, next);
  return next;
}

/** A comment alone on its line may hold a disabled key, or the table of such keys. */
function readComment(reader: Reader): void {
  const { cursor, build } = reader;
  const { text, at: start } = cursor;
  const end = cursor.lineEnd();
  cursor.cut(PIECE.comment, end);
  let from = start;
  while (from < end && text.charCodeAt(from) === CHAR.hash) from++;
  const inside = new Cursor(text, from, end, null);
  inside.at = inside.blanksEnd();
  if (inside.code === CHAR.openBracket) {
    const header = cutHeader(inside);
    if (header?.closed && inside.blanksEnd() === end) reader.disabledSection = sectionOf(header.key);
    return;
  }
  const member = readMember(inside, 0);
  if (!member || inside.faults.length > 0) return;
  inside.at = inside.blanksEnd();
  if (!inside.done && inside.code !== CHAR.hash) return;
  const section = member.key.names
    .slice(0, -1)
    .reduce((above, name) => above.child(name), reader.disabledSection ?? reader.table.section);
  placeDisabled(build, section, member);
}

function sectionOf({ names }: KeyAt): Section {
  return names.reduce((above, name) => above.child(name), new Section([]));
}

function placeDisabled(build: TreeBuilder, section: Section, { key, node }: Member): void {
  const name = { name: key.names.at(-1) ?? "", start: key.start, end: key.end };
  if (node.kind === "scalar") build.scalar(section, name, node.at).disabled = true;
  if (node.kind !== "list") return;
  const items = node.items.flatMap((item): ScalarAt[] => (item.kind === "scalar" ? [item.at] : []));
  if (items.length === node.items.length) build.list(section, name, { ...node, items }).disabled = true;
}
