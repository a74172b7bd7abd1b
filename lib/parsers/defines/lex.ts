import { afterLineEnd, CHAR, isBlank, isLineEnd, isQuote, isWordChar, lineEnd, skipBlanks } from "../chars";
import { Pieces } from "../pieces";
import { PIECE } from "../types";

/** A line has six pieces or so for every thirty characters and more. */
const CHARACTERS_OF_A_PIECE = 6;

/**
 * Cuts a C header into pieces that tile it. Comments, strings and spliced
 * lines (a backslash before the line end) follow the translation phases of ISO/IEC 9899, 5.1.1.2. A directive
 * is its word; then come a key for `#define` and `#undef`, and the rest of the logical line as a value.
 */
export function lexDefines(text: string): Pieces {
  const out = new Pieces(text.length / CHARACTERS_OF_A_PIECE);
  let at = 0;
  if (text.charCodeAt(0) === CHAR.byteOrderMark) {
    out.add(PIECE.space, 0, 1);
    at = 1;
  }
  while (at < text.length) at = cutLine(text, at, out);
  return out;
}

/** Cuts one logical line with its line end; returns the offset after it. */
function cutLine(text: string, start: number, out: Pieces): number {
  let at = cutBetween(text, start, text.length, out);
  if (at < text.length && !isLineEnd(text.charCodeAt(at)))
    at =
      text.charCodeAt(at) === CHAR.hash
        ? cutDirective(text, at, text.length, out)
        : cutCode(text, at, text.length, out);
  const after = afterLineEnd(text, at);
  out.put(PIECE.lineEnd, at, after);
  return after;
}

/** White space, spliced lines and comments; returns the offset of what follows them. */
function cutBetween(text: string, start: number, limit: number, out: Pieces): number {
  let at = start;
  for (;;) {
    const from = skipSpace(text, at, limit);
    out.put(PIECE.space, at, from);
    const end = endOfComment(text, from, limit);
    if (end < 0) return from;
    out.put(PIECE.comment, from, end);
    at = end;
  }
}

function skipSpace(text: string, start: number, limit: number): number {
  let i = start;
  while (i < limit) {
    if (isBlank(text.charCodeAt(i))) i++;
    else if (isSplice(text, i)) i = afterLineEnd(text, i + 1);
    else break;
  }
  return Math.min(i, limit);
}

/** A backslash directly before a line end joins two lines. */
function isSplice(text: string, at: number): boolean {
  return text.charCodeAt(at) === CHAR.backslash && isLineEnd(text.charCodeAt(at + 1));
}

/** End of the comment that begins at `start`, or -1 where none does. */
function endOfComment(text: string, start: number, limit: number): number {
  if (text.charCodeAt(start) !== CHAR.slash || start + 1 >= limit) return -1;
  const next = text.charCodeAt(start + 1);
  if (next === CHAR.slash) return endOfLine(text, start, limit);
  if (next !== CHAR.star) return -1;
  const close = text.indexOf("*/", start + 2);
  return close < 0 ? limit : Math.min(close + 2, limit);
}

/** End of the logical line: spliced line ends do not count. */
function endOfLine(text: string, start: number, limit: number): number {
  let end = lineEnd(text, start);
  while (end < limit && text.charCodeAt(end - 1) === CHAR.backslash)
    end = lineEnd(text, afterLineEnd(text, end));
  return Math.min(end, limit);
}

/** Cuts a directive up to the end of its logical line or `limit`; returns that offset. `start` stands on its `#`. */
export function cutDirective(text: string, start: number, limit: number, out: Pieces): number {
  const word = skipBlanks(text, start + 1, limit);
  const wordEnd = skipWord(text, word, limit);
  out.add(PIECE.directive, start, wordEnd);
  const name = text.slice(word, wordEnd);
  let at = cutBetween(text, wordEnd, limit, out);
  if (name === "define" || name === "undef") at = cutName(text, at, limit, out);
  return cutBody(text, at, limit, out);
}

function skipWord(text: string, start: number, limit: number): number {
  let i = start;
  while (i < limit && isWordChar(text.charCodeAt(i))) i++;
  return i;
}

/** The macro's name; the parameters of a function-like one are its separator. */
function cutName(text: string, start: number, limit: number, out: Pieces): number {
  const end = skipWord(text, start, limit);
  out.put(PIECE.key, start, end);
  if (end === start || text.charCodeAt(end) !== CHAR.openParen) return end;
  const stop = endOfLine(text, end, limit);
  let close = end;
  while (close < stop && text.charCodeAt(close) !== CHAR.closeParen) close++;
  if (close === stop) return end;
  out.add(PIECE.separator, end, close + 1);
  return close + 1;
}

/** What follows name or directive, without the comments around it. */
function cutBody(text: string, start: number, limit: number, out: Pieces): number {
  const from = cutBetween(text, start, limit, out);
  const end = endOfBody(text, from, limit);
  out.put(PIECE.value, from, end);
  return cutBetween(text, end, limit, out);
}

/** End of the last character of the logical line that is neither white space nor part of a trailing comment. */
function endOfBody(text: string, start: number, limit: number): number {
  const skipString = stringSkipper(text, limit);
  let end = start;
  let i = start;
  while (i < limit) {
    const code = text.charCodeAt(i);
    if (isLineEnd(code)) break;
    if (isBlank(code) || isSplice(text, i)) {
      i = skipSpace(text, i, limit);
      continue;
    }
    const comment = code === CHAR.slash ? endOfComment(text, i, limit) : -1;
    if (comment >= 0) i = comment;
    else end = i = isQuote(code) ? skipString(i) : i + 1;
  }
  return end;
}

/** Skips a string or character constant; a quote without a partner on its line counts as an ordinary character. */
function stringSkipper(text: string, limit: number): (at: number) => number {
  const dead = new Set<number>();
  return (at) => {
    const quote = text.charCodeAt(at);
    if (dead.has(quote) || (quote === CHAR.singleQuote && isWordChar(text.charCodeAt(at - 1)))) return at + 1;
    for (let i = at + 1; i < limit; i++) {
      const code = text.charCodeAt(i);
      if (code === quote) return i + 1;
      if (isSplice(text, i)) i = afterLineEnd(text, i + 1) - 1;
      else if (isLineEnd(code)) break;
      else if (code === CHAR.backslash) i++;
    }
    dead.add(quote);
    return at + 1;
  };
}

/** Anything that is no directive: kept unread, though comments in it are told apart. */
function cutCode(text: string, start: number, limit: number, out: Pieces): number {
  const end = endOfBody(text, start, limit);
  out.put(PIECE.unread, start, end);
  return cutBetween(text, end, limit, out);
}
