import type { Format } from "./types";

export interface FormatRank {
  readonly format: Format;
  /** 0 to 1. */
  readonly score: number;
  readonly reasons: readonly string[];
}

/** What the format of a text is told from. */
export interface Sample {
  /** Its beginning. */
  readonly text: string;
  /** Whether that is all of it. */
  readonly whole: boolean;
  /** Of its file name, in lower case, without the dot. */
  readonly extension: string;
}

/** The text's own content counts four fifths, the file name the rest, and more where the content leaves it open. */
export function score(share: number, named: boolean): number {
  const own = 0.8 * share + (named ? 0.2 : 0);
  return Math.round(100 * Math.min(1, named ? Math.max(own, 0.35) : own)) / 100;
}

/** A file name that belongs to one format alone decides as soon as the content fits at all. */
export function scoreOfOwnName(share: number, named: boolean): number {
  return named && share >= 0.25 ? Math.max(0.85, score(share, named)) : score(share, named);
}
