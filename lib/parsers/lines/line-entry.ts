import type { Span } from "@/lib/domain/span";
import { isQuote, skipBlanks } from "../chars";
import type { Entry, ParsedValue } from "../types";

const ALWAYS: readonly string[] = [];
const NO_VALUE: ParsedValue = { kind: "none" };

/** An entry of the line family: offsets into its text; spans and strings are made when asked for. */
export class LineEntry implements Entry {
  id = 0;
  section: string | null = null;
  value: ParsedValue = NO_VALUE;
  disabled = false;
  shadowed = false;
  valueStart: number;
  valueEnd: number;
  /** Key and value are apart by `=` or `:`, not by white space alone. */
  marked = false;
  /** -1 where there is no trailing comment. */
  commentStart = -1;
  commentEnd = -1;

  constructor(
    private readonly text: string,
    readonly keyStart: number,
    readonly keyEnd: number,
    private readonly line: number,
    private readonly lineStart: number,
  ) {
    this.valueStart = keyEnd;
    this.valueEnd = keyEnd;
  }

  /** The key without its section; one in quotes loses them. */
  get name(): string {
    const { text, keyStart, keyEnd } = this;
    const quoted = keyEnd - keyStart >= 2 && isQuote(text.charCodeAt(keyStart));
    const closed = quoted && text.charCodeAt(keyEnd - 1) === text.charCodeAt(keyStart);
    return closed ? text.slice(keyStart + 1, keyEnd - 1) : text.slice(keyStart, keyEnd);
  }

  get key(): string {
    return this.section === null ? this.name : `${this.section}.${this.name}`;
  }

  get path(): readonly string[] {
    return this.section === null ? [this.name] : [this.section, this.name];
  }

  get raw(): string {
    return this.text.slice(this.valueStart, this.valueEnd);
  }

  get keySpan(): Span {
    return this.span(this.keyStart, this.keyEnd);
  }

  get valueSpan(): Span {
    return this.span(this.valueStart, this.valueEnd);
  }

  get comment(): string | null {
    return this.commentStart < 0 ? null : commentText(this.text, this.commentStart, this.commentEnd);
  }

  get commentSpan(): Span | null {
    return this.commentStart < 0 ? null : this.span(this.commentStart, this.commentEnd);
  }

  /** Lines know no conditions. */
  get conditions(): readonly string[] {
    return ALWAYS;
  }

  private span(start: number, end: number): Span {
    return { start, end, line: this.line, column: start - this.lineStart + 1 };
  }
}

function commentText(text: string, start: number, end: number): string {
  const from = contentOfComment(text, start, end);
  return text.slice(from, end);
}

/** Offset of the first character after the marks of a comment and the blanks behind them. */
export function contentOfComment(text: string, start: number, end: number): number {
  const mark = text.charCodeAt(start);
  let i = start;
  while (i < end && text.charCodeAt(i) === mark) i++;
  return skipBlanks(text, i, end);
}
