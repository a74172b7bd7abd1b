import type { Span } from "@/lib/domain/span";
import { CHAR } from "./chars";

/** Finds line and column of any offset of a text, in any order; the starts of its lines are sought once. */
export class LineIndex {
  private starts: Int32Array | null = null;

  constructor(private readonly text: string) {}

  span(start: number, end: number): Span {
    const starts = (this.starts ??= lineStarts(this.text));
    let low = 0;
    let high = starts.length - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if ((starts[middle] ?? 0) <= start) low = middle;
      else high = middle - 1;
    }
    return { start, end, line: low + 1, column: start - (starts[low] ?? 0) + 1 };
  }

  /** Line of an offset, from 1. */
  line(at: number): number {
    return this.span(at, at).line;
  }
}

function lineStarts(text: string): Int32Array {
  const starts = [0];
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i);
    if (code === CHAR.carriageReturn && text.charCodeAt(i + 1) === CHAR.lineFeed) continue;
    if (code === CHAR.lineFeed || code === CHAR.carriageReturn) starts.push(i + 1);
  }
  return Int32Array.from(starts);
}
