import { CHAR, isBlank, isLineEnd } from "../chars";
import type { Pieces } from "../pieces";
import type { PIECE } from "../types";

/** Something that TOML does not allow, found while reading. */
export interface Fault {
  readonly code:
    "unreadable-line" | "not-standard" | "unclosed-section" | "unclosed-quote" | "unclosed-list" | "too-deep";
  readonly start: number;
  readonly end: number;
  /** A clause after the line and column. */
  readonly what: string;
}

/** A place in a text that moves forward only, with what was cut and found on the way. */
export class Cursor {
  readonly faults: Fault[] = [];

  /** `pieces` is null for the content of a comment, which is one piece already. */
  constructor(
    readonly text: string,
    public at: number,
    readonly end: number,
    private readonly pieces: Pieces | null,
  ) {}

  /** A cursor over the same text that cuts no pieces, to look ahead. */
  aside(at = this.at): Cursor {
    return new Cursor(this.text, at, this.end, null);
  }

  get code(): number {
    return this.at < this.end ? this.text.charCodeAt(this.at) : -1;
  }

  get done(): boolean {
    return this.at >= this.end;
  }

  startsWith(mark: string): boolean {
    return this.at + mark.length <= this.end && this.text.startsWith(mark, this.at);
  }

  /** Cuts a piece from here to `to` and goes there. */
  cut(kind: (typeof PIECE)[keyof typeof PIECE], to: number): void {
    this.pieces?.put(kind, this.at, to);
    this.at = to;
  }

  blanksEnd(): number {
    let i = this.at;
    while (i < this.end && isBlank(this.text.charCodeAt(i))) i++;
    return i;
  }

  lineEnd(): number {
    let i = this.at;
    while (i < this.end && !isLineEnd(this.text.charCodeAt(i))) i++;
    return i;
  }

  /** Offset behind the line end that stands here. */
  afterLineEnd(): number {
    const pair = this.code === CHAR.carriageReturn && this.text.charCodeAt(this.at + 1) === CHAR.lineFeed;
    return Math.min(this.end, this.at + (pair ? 2 : 1));
  }

  fault(code: Fault["code"], start: number, end: number, what: string): void {
    this.faults.push({ code, start, end, what });
  }
}
