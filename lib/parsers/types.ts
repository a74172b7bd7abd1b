import type { Diagnostic } from "@/lib/domain/diagnostic";
import type { Span } from "@/lib/domain/span";

/** Formats that have a parser. */
export const FORMATS = ["lines", "defines", "json", "toml", "yaml", "properties", "env", "csv"] as const;
export type Format = (typeof FORMATS)[number];

/** A value read as far as its own spelling allows; what it means is the key table's business. */
export type ParsedValue =
  | { readonly kind: "number"; readonly value: number; readonly unit: string | null }
  | { readonly kind: "boolean"; readonly value: boolean }
  | { readonly kind: "text"; readonly value: string }
  | { readonly kind: "list"; readonly items: readonly ListItem[] }
  | { readonly kind: "none" };

/** One element of a list value; its own span makes it editable alone. */
export interface ListItem {
  readonly raw: string;
  readonly span: Span;
  readonly value: Exclude<ParsedValue, { kind: "list" }>;
}

/**
 * One key with its value as it stands in the text. Nothing is dropped: duplicates, disabled and conditional entries are
 * entries. An entry may work out its spans when asked, so read its properties; a spread copy would lack them.
 */
export interface Entry {
  /** Index in `Document.entries`. */
  readonly id: number;
  /** Section names, then the key; joined with dots in `key`. */
  readonly path: readonly string[];
  readonly key: string;
  readonly keySpan: Span;
  /** The value with its unit, without quotes' surroundings being lost: `raw` is the text of this span. */
  readonly valueSpan: Span;
  readonly raw: string;
  readonly value: ParsedValue;
  readonly comment: string | null;
  readonly commentSpan: Span | null;
  /** A commented-out key, or one in a branch that never holds (`#if 0`). */
  readonly disabled: boolean;
  /** Conditions (outermost first) under which the entry holds, e.g. ["#if FAST"]; empty: always. */
  readonly conditions: readonly string[];
  /** A later enabled entry of the same key takes its place, or the text takes it back (`#undef`). */
  readonly shadowed: boolean;
}

/** What a piece of a text is; see `Document.pieces`. */
export const PIECE = {
  space: 0,
  lineEnd: 1,
  comment: 2,
  section: 3,
  key: 4,
  separator: 5,
  value: 6,
  /** `#define`, `#if` ... */
  directive: 7,
  /** Kept, but of no meaning to this format. */
  unread: 8,
} as const;

/** A parsed text. `text` is kept whole; everything else points into it. */
export interface Document {
  readonly path: string;
  readonly format: Format;
  readonly text: string;
  /** What the lexer cut, as triples of PIECE kind, start, end (UTF-16 offsets). The pieces tile the text. */
  readonly pieces: Readonly<Int32Array>;
  readonly entries: readonly Entry[];
  readonly diagnostics: readonly Diagnostic[];
}

/** A new spelling of one entry's value (or of one element of its list). `raw` replaces exactly the span. */
export interface Edit {
  readonly entry: number;
  readonly element: number | null;
  readonly raw: string;
}
