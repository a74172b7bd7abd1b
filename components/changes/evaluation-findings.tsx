import Link from "next/link";
import type { ChangeView } from "./change-view";
import { plural } from "@/lib/domain/sentences";
import { findingWords } from "@/lib/review/finding-words";
import { ClearedFindings } from "@/components/findings/cleared-findings";
import { FindingsBox } from "@/components/findings/findings-box";
import { LevelMark } from "@/components/ui/level-mark";
import { SheetSection } from "@/components/ui/sheet";
import { lettersByFinding, valuesBefore } from "./finding-letters";

/** What the change does to the findings: new or graver, cleared, and as before; on the design and on machines that differ. */
export function EvaluationFindings({ evaluation }: { readonly evaluation: ChangeView["evaluation"] }) {
  const { comparison, baseReport, machines } = evaluation;
  const { fresh, cleared, unchanged } = comparison;
  const shared = {
    letters: lettersByFinding([...fresh, ...unchanged], evaluation),
    before: valuesBefore(baseReport),
  };
  return (
    <>
      <SheetSection
        title={fresh.length === 0 ? "No new findings" : plural(fresh.length, "new finding")}
        id="findings"
        note={`${plural(cleared.length, "finding")} cleared, ${unchanged.length} as before`}
      >
        <FindingsBox
          {...shared}
          findings={fresh}
          label="New findings"
          empty="Nothing is graver than before."
        />
        <ClearedFindings cleared={cleared} />
        {unchanged.length > 0 && (
          <details className="mt-3">
            <summary>{plural(unchanged.length, "finding")} as before</summary>
            <FindingsBox {...shared} findings={unchanged} label="Findings as before" />
          </details>
        )}
      </SheetSection>
      <DifferingMachines machines={machines} />
    </>
  );
}

function DifferingMachines({ machines }: { readonly machines: ChangeView["evaluation"]["machines"] }) {
  if (machines.length === 0) return null;
  const graver = machines.filter((machine) => machine.graver.length > 0);
  return (
    <SheetSection
      title="Machines that differ from the design"
      note={
        graver.length === 0
          ? `${plural(machines.length, "machine")} with hardware of its own: none comes out graver`
          : `${graver.length} of ${machines.length} come out graver`
      }
    >
      <ul className="machine-notes">
        {graver.map(({ machineId, serial, siteName, level, graver: findings }) => (
          <li key={machineId}>
            <LevelMark level={level} /> <Link href={`/machines/${machineId}`}>{serial}</Link>, {siteName}:{" "}
            {findings.map(findingWords).join(" ")}
          </li>
        ))}
      </ul>
    </SheetSection>
  );
}
