import type { Pieces } from "../pieces";
import { PIECE } from "../types";

/** A directive, a comment on lines of its own, or the first line of a run of code, in the order of the text. */
export interface HeaderLine {
  readonly kind: "directive" | "comment" | "code";
  /** `define`, `if` ...; empty for comments and code. */
  readonly word: string;
  /** Name of a `#define` or `#undef`. */
  readonly key: string;
  /** The rest of the directive without comments, white space made single. */
  readonly body: string;
  /** Index of its first piece. */
  readonly at: number;
  readonly start: number;
  readonly end: number;
}

/**
 * Groups the pieces of a header. Comments behind a directive belong to it. Code up to the next directive is one run,
 * comments between its lines or not, and stands for itself by its first line.
 */
export function collectLines(text: string, pieces: Pieces): HeaderLine[] {
  const lines: HeaderLine[] = [];
  let inCode = false;
  for (let i = 0; i < pieces.count; i++) {
    const kind = pieces.kind(i);
    if (kind === PIECE.directive) {
      lines.push(directiveAt(text, pieces, i));
      i = lastPieceOfLine(pieces, i);
      inCode = false;
    } else if (kind === PIECE.comment || (kind === PIECE.unread && !inCode)) {
      inCode ||= kind === PIECE.unread;
      lines.push({
        ...BARE,
        kind: kind === PIECE.comment ? "comment" : "code",
        at: i,
        ...rangeAt(pieces, i),
      });
    }
  }
  return lines;
}

const BARE = { word: "", key: "", body: "" };

function rangeAt(pieces: Pieces, i: number): { start: number; end: number } {
  return { start: pieces.start(i), end: pieces.end(i) };
}

function lastPieceOfLine(pieces: Pieces, from: number): number {
  let i = from;
  while (i + 1 < pieces.count && pieces.kind(i + 1) !== PIECE.lineEnd) i++;
  return i;
}

function directiveAt(text: string, pieces: Pieces, at: number): HeaderLine {
  const { start, end } = rangeAt(pieces, at);
  let key = "";
  let body = "";
  for (let i = at + 1; i < pieces.count && pieces.kind(i) !== PIECE.lineEnd; i++) {
    const range = rangeAt(pieces, i);
    if (pieces.kind(i) === PIECE.key) key = text.slice(range.start, range.end);
    if (pieces.kind(i) === PIECE.value) body = text.slice(range.start, range.end);
  }
  const word = text.slice(start + 1, end).trim();
  return { kind: "directive", word, key, body: word === "define" ? body : tidy(body), at, start, end };
}

/** Long conditions are cut, since each entry below carries them. */
const LONGEST_CONDITION = 200;

function tidy(body: string): string {
  return body
    .slice(0, LONGEST_CONDITION)
    .replace(/\\\r?\n|\\\r/g, " ")
    .replace(/\s+/g, " ")
    .trim();
}
