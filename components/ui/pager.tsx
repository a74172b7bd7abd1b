import Link from "next/link";
import type { ReactNode } from "react";

export interface PagerProps {
  /** What is shown of what: "41 to 80 of 248 changes". */
  readonly summary: ReactNode;
  readonly previousHref: string | null;
  readonly nextHref: string | null;
  /** Names what is leafed through: "Changes". */
  readonly label: string;
}

/** Leafing through a long list; nothing where one page holds it all. */
export function Pager({ summary, previousHref, nextHref, label }: PagerProps) {
  if (previousHref === null && nextHref === null) return <p className="pager">{summary}</p>;
  return (
    <nav className="pager" aria-label={`${label}, pages`}>
      {previousHref === null ? (
        <span className="quiet">Previous</span>
      ) : (
        <Link href={previousHref}>Previous</Link>
      )}
      <span>{summary}</span>
      {nextHref === null ? <span className="quiet">Next</span> : <Link href={nextHref}>Next</Link>}
    </nav>
  );
}
