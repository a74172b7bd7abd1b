import type { Diagnostic, DiagnosticCode, Severity } from "@/lib/domain/diagnostic";
import type { Span } from "@/lib/domain/span";

/** A text full of one fault is told so once more and not a hundred thousand times. */
const MOST_OF_ONE_CODE = 100;

export interface DiagnosticList {
  readonly add: (code: DiagnosticCode, severity: Severity, span: Span | null, message: string) => void;
  /** What was added, with one further entry for each code that had too many. */
  readonly all: () => Diagnostic[];
}

export function diagnosticList(): DiagnosticList {
  const kept: Diagnostic[] = [];
  const counts = new Map<DiagnosticCode, number>();
  return {
    add(code, severity, span, message) {
      const count = (counts.get(code) ?? 0) + 1;
      counts.set(code, count);
      if (count <= MOST_OF_ONE_CODE) kept.push({ code, severity, message, span });
    },
    all() {
      const more = [...counts].filter(([, count]) => count > MOST_OF_ONE_CODE);
      return [...kept, ...more.map(([code, count]) => andMore(code, count - MOST_OF_ONE_CODE, kept))];
    },
  };
}

function andMore(code: DiagnosticCode, count: number, kept: readonly Diagnostic[]): Diagnostic {
  const severity = kept.find((diagnostic) => diagnostic.code === code)?.severity ?? "note";
  const message = `The text has ${count} more places of the same kind (${code}), not listed one by one.`;
  return { code, severity, message, span: null };
}
