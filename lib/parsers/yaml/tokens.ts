import { CST, Lexer } from "yaml";
import { Pieces } from "../pieces";
import { PIECE } from "../types";

/** A stretch of the text. */
export interface Stretch {
  readonly start: number;
  readonly end: number;
}

const KINDS: ReadonlyMap<string, number> = new Map([
  ["byte-order-mark", PIECE.space],
  ["space", PIECE.space],
  ["newline", PIECE.lineEnd],
  ["comment", PIECE.comment],
  ["scalar", PIECE.value],
  ["single-quoted-scalar", PIECE.value],
  ["double-quoted-scalar", PIECE.value],
  ["alias", PIECE.value],
  ["directive-line", PIECE.directive],
  ["error", PIECE.unread],
]);

/** The lexer's marks of its own, which stand for no character of the text. */
const MARKS: readonly string[] = [CST.DOCUMENT, CST.FLOW_END, CST.SCALAR];

/** Whether what the lexer gives at an offset is such a mark and not the text's own character. */
export function isMark(lexeme: string, text: string, at: number): boolean {
  return MARKS.includes(lexeme) && !text.startsWith(lexeme, at);
}

/** Cuts a text into pieces that tile it, and finds its comments. `keys` are the offsets at which a key begins. */
export function cutYaml(text: string, keys: ReadonlySet<number>): { pieces: Pieces; comments: Stretch[] } {
  const pieces = new Pieces(text.length / 4);
  const comments: Stretch[] = [];
  let at = 0;
  for (const source of new Lexer().lex(text)) {
    if (isMark(source, text, at)) continue;
    const end = Math.min(text.length, at + source.length);
    const type = source === CST.SCALAR ? "scalar" : (CST.tokenType(source) ?? "scalar");
    if (type === "comment") comments.push({ start: at, end });
    const kind = KINDS.get(type) ?? PIECE.separator;
    pieces.put(kind === PIECE.value && keys.has(at) ? PIECE.key : kind, at, end);
    at = end;
  }
  pieces.put(PIECE.unread, at, text.length);
  return { pieces, comments };
}
