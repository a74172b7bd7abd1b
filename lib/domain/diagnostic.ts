import type { Span } from "./span";

export type Severity = "error" | "warning" | "note";

/** Every code a parser, the key table or the decoder can give. Closed, so that pages and tests can rely on it. */
export type DiagnosticCode =
  | "binary"
  | "empty"
  | "too-large"
  | "unknown-format"
  | "not-encodable"
  | "no-known-key"
  | "hidden-character"
  | "bidirectional-character"
  | "control-character"
  | "unclosed-quote"
  | "unclosed-comment"
  | "unclosed-list"
  | "unclosed-conditional"
  | "unmatched-conditional"
  | "unclosed-section"
  | "unreadable-line"
  | "too-deep"
  | "alias"
  | "not-standard"
  | "duplicate-key"
  | "not-a-number"
  | "unknown-unit"
  | "wrong-unit"
  | "scale-missing"
  | "list-length"
  | "axis-unknown"
  | "conditional-value";

/** What was found where, what was kept and what to do: one sentence each in `message`. */
export interface Diagnostic {
  readonly code: DiagnosticCode;
  readonly severity: Severity;
  readonly message: string;
  readonly span: Span | null;
}
