import { CHAR, isDigit, isLetter, isLineEnd, isQuote } from "../chars";
import { MOST_DEPTH, type ScalarAt } from "../tree";
import { PIECE } from "../types";
import type { Cursor } from "./cursor";
import { opensString, readBare, readString } from "./scalar";

export interface KeyAt {
  readonly names: readonly string[];
  readonly start: number;
  readonly end: number;
}

export type Node =
  | { readonly kind: "scalar"; readonly at: ScalarAt }
  | { readonly kind: "list"; readonly start: number; readonly end: number; readonly items: readonly Node[] }
  | {
      readonly kind: "table";
      readonly start: number;
      readonly end: number;
      readonly members: readonly Member[];
    };

export interface Member {
  readonly key: KeyAt;
  readonly node: Node;
}

/** A bare, quoted or dotted key (TOML 1.0, “Keys”); null where none stands. It is one piece. */
export function readKey(cursor: Cursor): KeyAt | null {
  const start = cursor.at;
  const names: string[] = [];
  const probe = cursor.at;
  let end = probe;
  for (;;) {
    const name = readName(cursor);
    if (name === null) break;
    names.push(name);
    end = cursor.at;
    const dot = cursor.blanksEnd();
    if (cursor.text.charCodeAt(dot) !== CHAR.dot || dot >= cursor.end) break;
    cursor.at = dot + 1;
    cursor.at = cursor.blanksEnd();
  }
  const whole = names.length > 0 && (end === cursor.at || cursor.at === start);
  cursor.at = start;
  if (!whole) return null;
  cursor.cut(PIECE.key, end);
  return { names, start, end };
}

function readName(cursor: Cursor): string | null {
  if (isQuote(cursor.code)) return readQuotedName(cursor);
  const { text, at, end } = cursor;
  let i = at;
  while (i < end && isBareChar(text.charCodeAt(i))) i++;
  cursor.at = i;
  return i === at ? null : text.slice(at, i);
}

/** The cursor's pieces must not see the parts of a key, so a quoted name is read on a cursor of its own. */
function readQuotedName(cursor: Cursor): string | null {
  const part = cursor.aside();
  const { end, value } = readString(part, PIECE.key);
  if (part.faults.length > 0) return null;
  cursor.at = end;
  return value.kind === "text" ? value.value : null;
}

function isBareChar(code: number): boolean {
  return isLetter(code) || isDigit(code) || code === CHAR.underscore || code === CHAR.minus;
}

/** The value at the cursor. `depth`: how many lists and inline tables are open around it. */
export function readNode(cursor: Cursor, depth: number): Node {
  const { code, at } = cursor;
  if (code === CHAR.openBracket || code === CHAR.openBrace) {
    if (depth >= MOST_DEPTH) return skipDeep(cursor);
    return code === CHAR.openBracket ? readList(cursor, depth) : readTable(cursor, depth);
  }
  if (!opensString(cursor)) return { kind: "scalar", at: readBare(cursor, depth > 0) };
  const said = readString(cursor, PIECE.value);
  const follows = cursor.blanksEnd();
  if (depth === 0 && follows < cursor.lineEnd() && cursor.text.charCodeAt(follows) !== CHAR.hash)
    cursor.fault("unreadable-line", follows, cursor.lineEnd(), "something follows the closing quote.");
  return { kind: "scalar", at: { ...said, start: at } };
}

/** Everything up to the closing bracket of what lies too deep. */
function skipDeep(cursor: Cursor): Node {
  const start = cursor.at;
  cursor.fault("too-deep", start, start + 1, "");
  const aside = cursor.aside();
  let open = 0;
  while (!aside.done) {
    const { code } = aside;
    if (isQuote(code)) {
      readString(aside, PIECE.value);
      continue;
    }
    if (code === CHAR.openBracket || code === CHAR.openBrace) open++;
    if (code === CHAR.closeBracket || code === CHAR.closeBrace) open--;
    aside.at = code === CHAR.hash ? aside.lineEnd() : aside.at + 1;
    if (open === 0) break;
  }
  cursor.cut(PIECE.unread, aside.at);
  return { kind: "table", start, end: cursor.at, members: [] };
}

/** Blanks, line ends and comments inside a list. */
function skipBetween(cursor: Cursor): void {
  while (!cursor.done) {
    const { code } = cursor;
    if (isLineEnd(code)) cursor.cut(PIECE.lineEnd, cursor.afterLineEnd());
    else if (code === CHAR.hash) cursor.cut(PIECE.comment, cursor.lineEnd());
    else {
      const blanks = cursor.blanksEnd();
      if (blanks === cursor.at) return;
      cursor.cut(PIECE.space, blanks);
    }
  }
}

function readList(cursor: Cursor, depth: number): Node {
  const start = cursor.at;
  const items: Node[] = [];
  cursor.cut(PIECE.separator, start + 1);
  for (;;) {
    skipBetween(cursor);
    if (cursor.done) return unclosed(cursor, { start, items });
    if (cursor.code === CHAR.closeBracket) break;
    const before = cursor.at;
    items.push(readNode(cursor, depth + 1));
    skipBetween(cursor);
    if (cursor.code === CHAR.comma) cursor.cut(PIECE.separator, cursor.at + 1);
    else if (cursor.code !== CHAR.closeBracket) return unclosed(cursor, { start, items });
    if (cursor.at === before) return unclosed(cursor, { start, items });
  }
  cursor.cut(PIECE.separator, cursor.at + 1);
  return { kind: "list", start, end: cursor.at, items };
}

/** A list that is not closed where it must be ends here; its elements are read as far as they go. */
function unclosed(cursor: Cursor, { start, items }: { start: number; items: readonly Node[] }): Node {
  cursor.fault("unclosed-list", start, start + 1, "a bracket opens here and is not closed; close it.");
  return { kind: "list", start, end: cursor.at, items };
}

/** `{ a = 1, b.c = 2 }` on one line (TOML 1.0, “Inline Table”). */
function readTable(cursor: Cursor, depth: number): Node {
  const start = cursor.at;
  const members: Member[] = [];
  cursor.cut(PIECE.separator, start + 1);
  for (;;) {
    cursor.cut(PIECE.space, cursor.blanksEnd());
    if (cursor.code === CHAR.closeBrace && members.length === 0) break;
    const member = readMember(cursor, depth + 1);
    if (member) members.push(member);
    cursor.cut(PIECE.space, cursor.blanksEnd());
    if (!member || (cursor.code !== CHAR.comma && cursor.code !== CHAR.closeBrace)) {
      cursor.fault(
        "unclosed-list",
        start,
        start + 1,
        "an inline table is not closed on its line, or something in it is no key with a value.",
      );
      return { kind: "table", start, end: cursor.at, members };
    }
    if (cursor.code === CHAR.closeBrace) break;
    cursor.cut(PIECE.separator, cursor.at + 1);
  }
  cursor.cut(PIECE.separator, cursor.at + 1);
  return { kind: "table", start, end: cursor.at, members };
}

/** `key = value` at the cursor; null where none stands. */
export function readMember(cursor: Cursor, depth: number): Member | null {
  const key = readKey(cursor);
  if (!key) return null;
  const mark = cursor.blanksEnd();
  if (cursor.text.charCodeAt(mark) !== CHAR.equals || mark >= cursor.end) return null;
  const after = cursor.aside(mark + 1).blanksEnd();
  cursor.cut(PIECE.separator, after);
  return { key, node: readNode(cursor, depth) };
}
