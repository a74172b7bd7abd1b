import "server-only";
import type { Diagnostic } from "@/lib/domain/diagnostic";
import type { DiagnosticView, DocumentView } from "@/lib/schemas/check";
import type { DocumentReport } from "@/lib/review/types";

function presentDiagnostic({ code, severity, message, span }: Diagnostic): DiagnosticView {
  return { code, severity, message, line: span?.line ?? null, column: span?.column ?? null };
}

export function presentDocuments(documents: readonly DocumentReport[]): DocumentView[] {
  return documents.map(({ path, format, entries, diagnostics }) => ({
    path,
    format,
    entries,
    diagnostics: diagnostics.map(presentDiagnostic),
  }));
}
