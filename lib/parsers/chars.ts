/** UTF-16 code units that the lexers meet. */
export const CHAR = {
  tab: 9,
  lineFeed: 10,
  carriageReturn: 13,
  space: 32,
  doubleQuote: 34,
  hash: 35,
  percent: 37,
  singleQuote: 39,
  openParen: 40,
  closeParen: 41,
  star: 42,
  plus: 43,
  comma: 44,
  minus: 45,
  dot: 46,
  slash: 47,
  zero: 48,
  nine: 57,
  colon: 58,
  semicolon: 59,
  equals: 61,
  openBracket: 91,
  backslash: 92,
  closeBracket: 93,
  underscore: 95,
  openBrace: 123,
  closeBrace: 125,
  byteOrderMark: 0xfeff,
} as const;

/** Space or tab; other spaces are not white space to a firmware, and `inspectText` reports them. */
export function isBlank(code: number): boolean {
  return code === CHAR.space || code === CHAR.tab;
}

export function isLineEnd(code: number): boolean {
  return code === CHAR.lineFeed || code === CHAR.carriageReturn;
}

export function isSpace(code: number): boolean {
  return isBlank(code) || isLineEnd(code);
}

export function isDigit(code: number): boolean {
  return code >= CHAR.zero && code <= CHAR.nine;
}

/** ASCII letter. */
export function isLetter(code: number): boolean {
  const lower = code | 32;
  return lower >= 97 && lower <= 122;
}

/** Letter, digit or underscore. */
export function isWordChar(code: number): boolean {
  return isLetter(code) || isDigit(code) || code === CHAR.underscore;
}

/** First offset from `start` that holds no blank, at most `end`. */
export function skipBlanks(text: string, start: number, end: number): number {
  let i = start;
  while (i < end && isBlank(text.charCodeAt(i))) i++;
  return i;
}

/** End of `start..end` without its trailing blanks. */
export function trimBlanks(text: string, start: number, end: number): number {
  let i = end;
  while (i > start && isBlank(text.charCodeAt(i - 1))) i--;
  return i;
}

/** Offset of the line end (or the end of the text) at or after `start`. Line ends are LF, CR LF and CR. */
export function lineEnd(text: string, start: number): number {
  let i = start;
  while (i < text.length && !isLineEnd(text.charCodeAt(i))) i++;
  return i;
}

/** Offset after the line end that stands at `at`. */
export function afterLineEnd(text: string, at: number): number {
  if (at >= text.length) return at;
  const pair = text.charCodeAt(at) === CHAR.carriageReturn && text.charCodeAt(at + 1) === CHAR.lineFeed;
  return at + (pair ? 2 : 1);
}

/**
 * Offset after the quote that closes the one at `start`, or -1 where none does before `end`. A backslash
 * guards the next character between double quotes; between single quotes it is an ordinary character.
 */
export function closeQuote(text: string, start: number, end: number): number {
  const quote = text.charCodeAt(start);
  const escapes = quote === CHAR.doubleQuote;
  for (let i = start + 1; i < end; i++) {
    const code = text.charCodeAt(i);
    if (code === quote) return i + 1;
    if (escapes && code === CHAR.backslash) i++;
  }
  return -1;
}

export function isQuote(code: number): boolean {
  return code === CHAR.doubleQuote || code === CHAR.singleQuote;
}

/** A quote opens only where a word may begin; in the middle of one it is an apostrophe. */
export function startsToken(text: string, at: number): boolean {
  if (at === 0) return true;
  const before = text.charCodeAt(at - 1);
  if (isSpace(before) || before === CHAR.comma || before === CHAR.equals || before === CHAR.colon)
    return true;
  return before === CHAR.openParen || before === CHAR.openBracket || before === CHAR.openBrace;
}
