/** Part of a line of a drawing revision: kept, struck (was) or put in (to be). */
export interface RevisionSegment {
  readonly kind: "same" | "was" | "to_be";
  readonly text: string;
}

/**
 * One row of a drawing revision. A changed line is one row holding both its old and its new words; a line that
 * only one side has is `added` or `removed`.
 */
export interface RevisionLine {
  readonly kind: "same" | "changed" | "added" | "removed";
  /** Line numbers from 1; null where that side lacks the line. */
  readonly wasLine: number | null;
  readonly toBeLine: number | null;
  readonly segments: readonly RevisionSegment[];
  /** Only white space (or only a comment) differs. */
  readonly onlySpace: boolean;
  /** For an added or removed line of a block that stands elsewhere in the other text: its line number there. */
  readonly moved?: number | undefined;
}

/** A run of rows: shown, or closed by a break line that opens on demand. */
export interface RevisionStretch {
  readonly closed: boolean;
  readonly lines: readonly RevisionLine[];
}
