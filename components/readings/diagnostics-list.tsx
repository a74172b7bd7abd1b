import type { DocumentView } from "@/lib/schemas/check";
import { lineHref, type LineAnchors } from "@/components/revision/line-anchor";

const SEVERITY_WORDS: Record<DocumentView["diagnostics"][number]["severity"], string> = {
  error: "Error",
  warning: "Caution",
  note: "Note",
};

const RANK = { error: 0, warning: 1, note: 2 } as const;
/** A file of another kind can have one on each line; the rest opens on demand. */
const SHOWN = 12;

type Diagnostic = DocumentView["diagnostics"][number];

function Line({ path, diagnostic, anchors }: { path: string; diagnostic: Diagnostic; anchors: LineAnchors }) {
  const { severity, message, line } = diagnostic;
  const href = line === null ? null : lineHref(anchors, path, line);
  return (
    <li className="py-1">
      <strong>{SEVERITY_WORDS[severity]}</strong>
      {anchors.paths.length > 1 && <span className="code quiet"> {path}</span>}
      {": "}
      {message}
      {href !== null && (
        <>
          {" "}
          <a href={href}>line {line}</a>
        </>
      )}
    </li>
  );
}

export interface DiagnosticsListProps {
  readonly documents: readonly DocumentView[];
  readonly anchors: LineAnchors;
}

/** What was found in the texts beside their values: what it is, where, what was kept and what to do. */
export function DiagnosticsList({ documents, anchors }: DiagnosticsListProps) {
  const found = documents
    .flatMap(({ path, diagnostics }) => diagnostics.map((diagnostic) => ({ path, diagnostic })))
    .sort((a, b) => RANK[a.diagnostic.severity] - RANK[b.diagnostic.severity]);
  if (found.length === 0) return null;
  const row = ({ path, diagnostic }: (typeof found)[number], index: number) => (
    <Line key={`${path} ${index}`} path={path} diagnostic={diagnostic} anchors={anchors} />
  );
  return (
    <>
      <ul>{found.slice(0, SHOWN).map(row)}</ul>
      {found.length > SHOWN && (
        <details>
          <summary>{found.length - SHOWN} more</summary>
          <ul>{found.slice(SHOWN).map(row)}</ul>
        </details>
      )}
    </>
  );
}
