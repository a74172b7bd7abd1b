import type { Span } from "@/lib/domain/span";
import { CHAR, closeQuote, isLineEnd, isQuote, isSpace, startsToken } from "./chars";
import { Place } from "./place";
import { readScalar, type Manner, type Scalar } from "./scalar";
import type { ListItem, ParsedValue } from "./types";

/** A value that its own text leaves open. */
export type ValueFault = "unclosed-quote" | "unclosed-list";

export interface ReadValue {
  readonly value: ParsedValue;
  readonly fault: ValueFault | null;
}

/** A stretch of a text that holds one value, without outer blanks. */
export interface ValueRange {
  readonly text: string;
  readonly span: Span;
  readonly manner: Manner;
}

const CLOSERS: ReadonlyMap<number, number> = new Map([
  [CHAR.openBracket, CHAR.closeBracket],
  [CHAR.openBrace, CHAR.closeBrace],
  [CHAR.openParen, CHAR.closeParen],
]);

/** Reads a value as far as its own spelling allows: number, boolean, text, or a list whose elements have spans. */
export function readValue(range: ValueRange): ReadValue {
  const { text, span, manner } = range;
  const first = text.charCodeAt(span.start);
  if (CLOSERS.has(first) && span.start < span.end) return readBracketed(range);
  const scalar = readScalar(text, span.start, span.end, manner);
  if (scalar.kind !== "text") return { value: scalar, fault: null };
  if (isQuote(first)) {
    const close = closeQuote(text, span.start, span.end);
    if (close === span.end) return { value: scalar, fault: null };
    if (close < 0) return { value: scalar, fault: "unclosed-quote" };
  }
  const items = commaItems(range) ?? spacedNumbers(range);
  return { value: items ? { kind: "list", items } : scalar, fault: null };
}

function readBracketed(range: ValueRange): ReadValue {
  const { text, span } = range;
  const close = closeBracket(text, span.start, span.end);
  const whole: ParsedValue = { kind: "text", value: text.slice(span.start, span.end) };
  if (close < 0) return { value: whole, fault: "unclosed-list" };
  if (close !== span.end - 1) return { value: whole, fault: null };
  const cuts = itemRanges(text, span.start + 1, close) ?? [];
  if (text.charCodeAt(span.start) === CHAR.openParen && cuts.length === 2) return unwrap(range, close);
  const items = toItems(range, cuts);
  const alone = items.length === 1 ? items[0] : undefined;
  if (alone?.value.kind !== "text") return { value: { kind: "list", items }, fault: null };
  const spaced = spacedCuts(range, alone.span.start, alone.span.end);
  return { value: { kind: "list", items: spaced ? toItems(range, spaced) : items }, fault: null };
}

/** Parentheses around parentheses are peeled so often; deeper ones are text. */
const MOST_PARENTHESES = 8;

/** `(80)` is 80 and not a list of one; `(80 80 400)` is a list. */
function unwrap(range: ValueRange, close: number): ReadValue {
  const { text, manner } = range;
  const [start, end] = peel(text, range.span.start + 1, close);
  const scalar = readScalar(text, start, end, manner);
  if (scalar.kind !== "text") return { value: scalar, fault: null };
  const cuts = spacedCuts(range, start, end);
  if (cuts) return { value: { kind: "list", items: toItems(range, cuts) }, fault: null };
  return { value: isQuote(text.charCodeAt(start)) ? scalar : wholeText(range), fault: null };
}

function peel(text: string, from: number, to: number): [number, number] {
  let [start, end] = trimSpace(text, from, to);
  for (let depth = 0; depth < MOST_PARENTHESES; depth++) {
    if (text.charCodeAt(start) !== CHAR.openParen) break;
    if (closeBracket(text, start, end) !== end - 1) break;
    [start, end] = trimSpace(text, start + 1, end - 1);
  }
  return [start, end];
}

function wholeText({ text, span }: ValueRange): ParsedValue {
  return { kind: "text", value: text.slice(span.start, span.end) };
}

/** Skips quoted stretches. A kind of quote that once found no partner is not looked for again, so that a pass stays linear. */
class QuoteSkipper {
  private dead = 0;

  constructor(
    private readonly text: string,
    private readonly end: number,
  ) {}

  /** Offset of the closing quote, or `at` where the quote is an ordinary character. */
  skip(at: number): number {
    const quote = this.text.charCodeAt(at);
    const bit = quote === CHAR.doubleQuote ? 1 : 2;
    if ((this.dead & bit) !== 0 || !startsToken(this.text, at)) return at;
    const close = closeQuote(this.text, at, this.end);
    if (close > 0) return close - 1;
    this.dead |= bit;
    return at;
  }
}

/** Offset of the bracket that closes the one at `start`, or -1. Brackets in quotes do not count. */
function closeBracket(text: string, start: number, end: number): number {
  const open: number[] = [];
  const quotes = new QuoteSkipper(text, end);
  for (let i = start; i < end; i++) {
    const code = text.charCodeAt(i);
    const closer = CLOSERS.get(code);
    if (closer !== undefined) open.push(closer);
    else if (code === open[open.length - 1]) {
      open.pop();
      if (open.length === 0) return i;
    } else if (isQuote(code)) i = quotes.skip(i);
  }
  return -1;
}

/** White space inside a value: blanks, line ends, and in C the backslash before a line end. */
function isSpaceAt(text: string, at: number): boolean {
  const code = text.charCodeAt(at);
  return isSpace(code) || (code === CHAR.backslash && isLineEnd(text.charCodeAt(at + 1)));
}

function trimSpace(text: string, from: number, to: number): [number, number] {
  const start = skipSpace(text, from, to);
  return [start, trimEnd(text, start, to)];
}

function skipSpace(text: string, from: number, to: number): number {
  let i = from;
  while (i < to && isSpaceAt(text, i)) i++;
  return i;
}

function trimEnd(text: string, from: number, to: number): number {
  let i = to;
  while (i > from && isSpaceAt(text, i - 1)) i--;
  return i;
}

/** Start and end of each element between outer commas, trimmed; a trailing comma adds none. null: brackets stay open. */
function itemRanges(text: string, start: number, end: number): number[] | null {
  const cuts: number[] = [];
  const open: number[] = [];
  const quotes = new QuoteSkipper(text, end);
  let from = start;
  for (let i = start; i < end; i++) {
    const code = text.charCodeAt(i);
    const closer = CLOSERS.get(code);
    if (closer !== undefined) open.push(closer);
    else if (code === open[open.length - 1]) open.pop();
    else if (isQuote(code)) i = quotes.skip(i);
    else if (code === CHAR.comma && open.length === 0) {
      const start = skipSpace(text, from, i);
      cuts.push(start, trimEnd(text, start, i));
      from = i + 1;
    }
  }
  const [lastStart, lastEnd] = trimSpace(text, from, end);
  if (lastStart < lastEnd) cuts.push(lastStart, lastEnd);
  return open.length === 0 ? cuts : null;
}

function toItems(range: ValueRange, cuts: readonly number[]): ListItem[] {
  return takeItems(range, cuts, () => true) ?? [];
}

/** The elements; null as soon as one does not fit. */
function takeItems(
  { text, span, manner }: ValueRange,
  cuts: readonly number[],
  fits: (item: ListItem) => boolean,
): ListItem[] | null {
  const place = new Place(text, span);
  const items: ListItem[] = [];
  for (let i = 0; i + 1 < cuts.length; i += 2) {
    const start = cuts[i] ?? 0;
    const end = cuts[i + 1] ?? start;
    const value = readItem(text, start, end, manner);
    const item = { raw: text.slice(start, end), span: place.span(start, end), value };
    if (!fits(item)) return null;
    items.push(item);
  }
  return items;
}

function readItem(text: string, start: number, end: number, manner: Manner): Scalar {
  if (text.charCodeAt(start) !== CHAR.openParen) return readScalar(text, start, end, manner);
  const [from, to] = peel(text, start, end);
  const inner = readScalar(text, from, to, manner);
  return inner.kind === "text" ? { kind: "text", value: text.slice(start, end) } : inner;
}

/** `80, 80, 400`: commas make a list when each element is a number, a truth value, quoted, or one word; prose is text. */
function commaItems(range: ValueRange): ListItem[] | null {
  const { text, span } = range;
  if (!text.slice(span.start, span.end).includes(",")) return null;
  const cuts = itemRanges(text, span.start, span.end);
  if (!cuts || cuts.length < 2) return null;
  return takeItems(range, cuts, isPlainItem);
}

function isPlainItem(item: ListItem): boolean {
  if (item.value.kind !== "text") return item.value.kind !== "none";
  return isQuote(item.raw.charCodeAt(0)) || !/\s/.test(item.raw);
}

function spacedNumbers(range: ValueRange): ListItem[] | null {
  const cuts = spacedCuts(range, range.span.start, range.span.end);
  return cuts && toItems(range, cuts);
}

/** `80 80 400`: two numbers or more with nothing but white space between them. */
function spacedCuts({ text, manner }: ValueRange, start: number, end: number): number[] | null {
  if (manner.c) return null;
  const cuts: number[] = [];
  let i = start;
  while (i < end) {
    const from = i;
    while (i < end && !isSpaceAt(text, i)) i++;
    if (readScalar(text, from, i, manner).kind !== "number") return null;
    cuts.push(from, i);
    while (i < end && isSpaceAt(text, i)) i++;
  }
  return cuts.length >= 4 ? cuts : null;
}
