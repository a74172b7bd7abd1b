import type { Span } from "@/lib/domain/span";
import { CHAR } from "./chars";

const START: Span = { start: 0, end: 0, line: 1, column: 1 };

/** Turns offsets into lines and columns in one pass; offsets must be asked for in ascending order. */
export class Place {
  private line: number;
  private lineStart: number;
  private at: number;

  constructor(
    private readonly text: string,
    from: Span = START,
  ) {
    this.at = from.start;
    this.line = from.line;
    this.lineStart = from.start - from.column + 1;
  }

  private to(offset: number): void {
    const { text } = this;
    for (; this.at < offset; this.at++) {
      const code = text.charCodeAt(this.at);
      if (code !== CHAR.lineFeed && code !== CHAR.carriageReturn) continue;
      if (code === CHAR.carriageReturn && text.charCodeAt(this.at + 1) === CHAR.lineFeed) continue;
      this.line++;
      this.lineStart = this.at + 1;
    }
  }

  span(start: number, end: number): Span {
    this.to(start);
    return { start, end, line: this.line, column: start - this.lineStart + 1 };
  }
}
