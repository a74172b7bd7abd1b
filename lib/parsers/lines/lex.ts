import {
  afterLineEnd,
  CHAR,
  closeQuote,
  isBlank,
  isQuote,
  isWordChar,
  lineEnd,
  skipBlanks,
  startsToken,
  trimBlanks,
} from "../chars";
import { Pieces } from "../pieces";
import { PIECE } from "../types";

/** A line has four pieces or so for every eight characters and more. */
const CHARACTERS_OF_A_PIECE = 6;

/**
 * Cuts a text of the line family into pieces that tile it. One line is blank, a comment, a `[section]`, or a key with an optional separator (`=`, `:`, or white space) and value.
 */
export function lexLines(text: string): Pieces {
  const out = new Pieces(text.length / CHARACTERS_OF_A_PIECE);
  let at = 0;
  if (text.charCodeAt(0) === CHAR.byteOrderMark) {
    out.add(PIECE.space, 0, 1);
    at = 1;
  }
  while (at < text.length) {
    const end = lineEnd(text, at);
    cutLine(text, at, end, out);
    at = afterLineEnd(text, end);
    if (at > end) out.add(PIECE.lineEnd, end, at);
  }
  return out;
}

/** Appends the pieces of one line, or of the content of a comment that may hold a key. */
export function cutLine(text: string, start: number, end: number, out: Pieces): void {
  const from = skipBlanks(text, start, end);
  out.put(PIECE.space, start, from);
  if (from === end) return;
  if (isCommentStart(text, from, end)) cutComment(text, from, end, out);
  else if (text.charCodeAt(from) === CHAR.openBracket) cutSection(text, from, end, out);
  else cutEntry(text, from, end, out);
}

function isCommentStart(text: string, at: number, end: number): boolean {
  const code = text.charCodeAt(at);
  if (code === CHAR.hash || code === CHAR.semicolon) return true;
  return code === CHAR.slash && at + 1 < end && text.charCodeAt(at + 1) === CHAR.slash;
}

function cutComment(text: string, start: number, end: number, out: Pieces): void {
  const stop = trimBlanks(text, start, end);
  out.put(PIECE.comment, start, stop);
  out.put(PIECE.space, stop, end);
}

/** What follows a section's bracket or a closed value: blanks, then a comment or something unread. */
function cutRest(text: string, start: number, end: number, out: Pieces): void {
  const from = skipBlanks(text, start, end);
  out.put(PIECE.space, start, from);
  if (from === end) return;
  if (isCommentStart(text, from, end)) cutComment(text, from, end, out);
  else cutUnread(text, from, end, out);
}

function cutUnread(text: string, start: number, end: number, out: Pieces): void {
  const stop = trimBlanks(text, start, end);
  out.put(PIECE.unread, start, stop);
  out.put(PIECE.space, stop, end);
}

/** A section reaches to its bracket, or, unclosed, to a trailing comment or the end of the line. */
function cutSection(text: string, start: number, end: number, out: Pieces): void {
  const stop = endOfSection(text, start, end);
  out.put(PIECE.section, start, stop);
  cutRest(text, stop, end, out);
}

function endOfSection(text: string, start: number, end: number): number {
  let i = start;
  while (i < end && text.charCodeAt(i) !== CHAR.closeBracket) i++;
  if (i === end) return trimBlanks(text, start, startOfComment(text, start, end));
  const double =
    text.charCodeAt(start + 1) === CHAR.openBracket && text.charCodeAt(i + 1) === CHAR.closeBracket;
  return Math.min(end, i + (double ? 2 : 1));
}

function cutEntry(text: string, start: number, end: number, out: Pieces): void {
  const keyEnd = endOfKey(text, start, end);
  if (keyEnd === start) return cutUnread(text, start, end, out);
  const next = skipBlanks(text, keyEnd, end);
  if (next === end) return cutBareKey(text, start, keyEnd, end, out);
  const mark = separatorLength(text, next, end);
  if (mark > 0) return cutAssigned(text, { start, keyEnd, after: next + mark, end }, out);
  if (next === keyEnd) return cutBareKey(text, start, keyEnd, end, out);
  if (isCommentStart(text, next, end)) return cutBareKey(text, start, keyEnd, end, out);
  const spaced = spacedSeparator(text, next, end);
  if (spaced < 0) {
    out.add(PIECE.key, start, keyEnd);
    out.add(PIECE.separator, keyEnd, next);
    return cutValue(text, next, end, out);
  }
  const wordsEnd = trimBlanks(text, start, spaced);
  const after = spaced + separatorLength(text, spaced, end);
  cutAssigned(text, { start, keyEnd: wordsEnd, after, end }, out);
}

/** A key with its mark; `after` is the offset behind the mark. */
interface Assigned {
  readonly start: number;
  readonly keyEnd: number;
  readonly after: number;
  readonly end: number;
}

/** The separator takes the blanks around its mark with it, but none before a missing value. */
function cutAssigned(text: string, at: Assigned, out: Pieces): void {
  out.add(PIECE.key, at.start, at.keyEnd);
  const value = skipBlanks(text, at.after, at.end);
  const comment = value > at.after && value < at.end && isCommentStart(text, value, at.end);
  if (comment || value === at.end) {
    out.add(PIECE.separator, at.keyEnd, at.after);
    out.put(PIECE.space, at.after, value);
    if (comment) cutComment(text, value, at.end, out);
    return;
  }
  out.add(PIECE.separator, at.keyEnd, value);
  cutValue(text, value, at.end, out);
}

function cutBareKey(text: string, start: number, keyEnd: number, end: number, out: Pieces): void {
  out.add(PIECE.key, start, keyEnd);
  cutRest(text, keyEnd, end, out);
}

/** A key ends at `=`, `:` or white space; one in quotes ends at its quote. */
function endOfKey(text: string, start: number, end: number): number {
  if (isQuote(text.charCodeAt(start))) {
    const close = closeQuote(text, start, end);
    if (close > 0) return close;
  }
  let i = start;
  while (i < end) {
    const code = text.charCodeAt(i);
    if (code === CHAR.equals || code === CHAR.colon || isBlank(code)) break;
    i++;
  }
  return i;
}

/** 1 for `=` and `:`, 2 for `:=`, 0 for anything else. */
function separatorLength(text: string, at: number, end: number): number {
  const code = text.charCodeAt(at);
  if (code === CHAR.equals) return 1;
  if (code !== CHAR.colon) return 0;
  return at + 1 < end && text.charCodeAt(at + 1) === CHAR.equals ? 2 : 1;
}

/**
 * Offset of the separator of a key of several words (`Max speed = 300`, `Max speed (mm/s): 300`), or -1. A `:`
 * must be followed by white space; a second `=` on the line means that the first word was the key.
 */
function spacedSeparator(text: string, start: number, end: number): number {
  let i = start;
  for (; i < end; i++) {
    const code = text.charCodeAt(i);
    if (code === CHAR.equals) break;
    if (code === CHAR.colon) return i + 1 === end || isBlank(text.charCodeAt(i + 1)) ? i : -1;
    if (!isBlank(code) && !isKeyChar(code)) return -1;
    if (code === CHAR.slash && isBlank(text.charCodeAt(i - 1))) return -1;
  }
  if (i === end) return -1;
  for (let k = i + 1; k < end; k++) if (text.charCodeAt(k) === CHAR.equals) return -1;
  return i;
}

/** What the words of a key may hold: letters of any language, digits, _ - . and a unit in parentheses. */
function isKeyChar(code: number): boolean {
  if (isWordChar(code) || code > 127) return true;
  return "-.()/%^".includes(String.fromCharCode(code));
}

/** The value reaches to the blanks before a trailing comment or to the end of the line. */
function cutValue(text: string, start: number, end: number, out: Pieces): void {
  const comment = startOfComment(text, start, end);
  const stop = trimBlanks(text, start, comment);
  out.put(PIECE.value, start, stop);
  out.put(PIECE.space, stop, comment);
  if (comment < end) cutComment(text, comment, end, out);
}

/** A trailing comment begins after white space and outside quotes; a quote opens only where a word may begin. */
function startOfComment(text: string, start: number, end: number): number {
  let dead = 0;
  for (let i = start; i < end; i++) {
    const code = text.charCodeAt(i);
    if (code > CHAR.semicolon || code === CHAR.space) continue;
    if (isQuote(code)) {
      if (code === dead || !startsToken(text, i)) continue;
      const close = closeQuote(text, i, end);
      if (close > 0) i = close - 1;
      else dead = code;
    } else if (i > start && isBlank(text.charCodeAt(i - 1)) && isCommentStart(text, i, end)) return i;
  }
  return end;
}
