import { hardwareWords } from "./need-list";
import { Facts } from "@/components/ui/facts";
import { SheetSection } from "@/components/ui/sheet";

/** A check as the table of checks describes it. */
export interface CheckDescription {
  readonly id: string;
  readonly title: string;
  readonly compares: string;
  readonly formula: string;
  readonly source: string;
  readonly needs: readonly string[];
  readonly margin: string;
  readonly caution: string | null;
}

/** One check: what it compares, its formula, its limits, where they come from, and what it needs to know. */
export function RuleSheet({ rule }: { readonly rule: CheckDescription }) {
  return (
    <SheetSection title={rule.title} id={rule.id} note={<span className="code">{rule.id}</span>}>
      <p>{rule.compares}</p>
      {rule.caution !== null && <p className="caution">{rule.caution}</p>}
      <Facts
        facts={[
          { label: "Formula", value: <span className="code">{rule.formula}</span> },
          { label: "Limits", value: rule.margin },
          { label: "Source", value: rule.source },
        ]}
      />
      <details className="mt-2">
        <summary>What it can use</summary>
        <ul className="list-disc pl-5">
          {hardwareWords(rule.needs).map((words) => (
            <li key={words}>{words}</li>
          ))}
        </ul>
        <p className="quiet">
          Where one of these is missing and counts, the check says cannot check and names it.
        </p>
      </details>
    </SheetSection>
  );
}
