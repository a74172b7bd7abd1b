import type { ReactNode } from "react";

export interface Fact {
  readonly label: string;
  readonly value: ReactNode;
  /** Where the fact comes from, or what it means. */
  readonly note?: ReactNode;
}

/** Facts by name, in as many columns as fit. */
export function Facts({ facts }: { readonly facts: readonly Fact[] }) {
  return (
    <dl className="facts">
      {facts.map((fact) => (
        <div key={fact.label}>
          <dt>{fact.label}</dt>
          <dd>
            {fact.value}
            {fact.note !== undefined && <span className="facts-note">{fact.note}</span>}
          </dd>
        </div>
      ))}
    </dl>
  );
}
