import { createScanner } from "jsonc-parser";
import { CHAR } from "../chars";
import type { Pieces } from "../pieces";
import type { Scalar } from "../scalar";
import { PIECE } from "../types";

/** Kinds of tokens as the scanner numbers them. */
export const TOKEN = {
  openBrace: 1,
  closeBrace: 2,
  openBracket: 3,
  closeBracket: 4,
  comma: 5,
  colon: 6,
  null: 7,
  true: 8,
  false: 9,
  string: 10,
  number: 11,
  lineComment: 12,
  blockComment: 13,
  lineBreak: 14,
  blank: 15,
  unknown: 16,
  end: 17,
} as const;

export interface Token {
  readonly kind: number;
  readonly start: number;
  readonly end: number;
  /** A string without its quotes and escapes; the spelling of anything else. */
  readonly value: string;
  /** The scanner found it cut short or wrongly spelt. */
  readonly faulty: boolean;
}

/** The tokens of a text of JSON with comments (RFC 8259), white space and comments among them. */
export function* tokensOf(text: string): Generator<Token> {
  const scanner = createScanner(text, false);
  if (text.charCodeAt(0) === CHAR.byteOrderMark) {
    scanner.setPosition(1);
    yield { kind: TOKEN.blank, start: 0, end: 1, value: "", faulty: false };
  }
  for (let kind: number = scanner.scan(); kind !== TOKEN.end; kind = scanner.scan()) {
    const start = scanner.getTokenOffset();
    // The scanner counts one too many for a comment that is not closed.
    const end = Math.min(text.length, start + scanner.getTokenLength());
    yield { kind, start, end, value: scanner.getTokenValue(), faulty: Number(scanner.getTokenError()) !== 0 };
  }
}

/** The piece that a token makes, but for the strings that are keys. */
export function putPiece(pieces: Pieces, { kind, start, end }: Token): void {
  pieces.put(PIECE_OF.get(kind) ?? PIECE.separator, start, end);
}

const PIECE_OF: ReadonlyMap<number, number> = new Map([
  [TOKEN.null, PIECE.value],
  [TOKEN.true, PIECE.value],
  [TOKEN.false, PIECE.value],
  [TOKEN.string, PIECE.value],
  [TOKEN.number, PIECE.value],
  [TOKEN.lineComment, PIECE.comment],
  [TOKEN.blockComment, PIECE.comment],
  [TOKEN.lineBreak, PIECE.lineEnd],
  [TOKEN.blank, PIECE.space],
  [TOKEN.unknown, PIECE.unread],
]);

/** What a token says that is a value. */
export function scalarOf({ kind, value }: Token): Scalar {
  switch (kind) {
    case TOKEN.string:
      return { kind: "text", value };
    case TOKEN.number:
      return Number.isFinite(Number(value))
        ? { kind: "number", value: Number(value), unit: null }
        : { kind: "text", value };
    case TOKEN.null:
      return { kind: "none" };
    default:
      return { kind: "boolean", value: kind === TOKEN.true };
  }
}
