"use client";

import { findingKey } from "@/lib/domain/findings";
import type { LiveAnswer } from "@/lib/review/worker-protocol";
import { plural } from "@/lib/domain/sentences";
import { lettersByFinding, valuesBefore } from "@/components/changes/finding-letters";
import { EffectsTable } from "@/components/findings/effects-table";
import { FindingsBox } from "@/components/findings/findings-box";
import { ParameterChangesTable } from "@/components/findings/parameter-changes-table";
import { Button } from "@/components/ui/button";
import { SheetSection } from "@/components/ui/sheet";
import type { CheckReport } from "@/lib/review/types";

export interface LiveFindingsProps {
  readonly answer: LiveAnswer | null;
  readonly baseReport: CheckReport | null;
  readonly onGoTo: (path: string, line: number) => void;
}

/** What the checks make of the text as it stands: beside the editor, a blink behind the typing. */
export function LiveFindings({ answer, baseReport, onGoTo }: LiveFindingsProps) {
  if (!answer) return <p className="quiet">Checking the text …</p>;
  const { report, changes, effects, comparison } = answer;
  const told = report.findings.filter(({ level }) => level !== "within");
  const acts = told.flatMap((finding) => {
    const [span] = finding.spans;
    if (!span) return [];
    const go = (
      <Button variant="quiet" onClick={() => onGoTo(span.path, span.line)}>
        line {span.line}
      </Button>
    );
    return [[findingKey(finding), go] as const];
  });
  return (
    <>
      <SheetSection
        title="Findings"
        note={`${plural(comparison.fresh.length, "new one", "new ones")}, ${comparison.cleared.length} cleared`}
      >
        <div aria-live="polite">
          <FindingsBox
            findings={report.findings}
            label="Findings of the text as it stands"
            letters={lettersByFinding(report.findings, { changes, effects })}
            before={baseReport ? valuesBefore(baseReport) : undefined}
            acts={Object.fromEntries(acts)}
            empty="No check has anything to judge yet."
          />
        </div>
      </SheetSection>
      {changes.length > 0 && (
        <SheetSection title="Changed parameters">
          <ParameterChangesTable changes={changes} />
        </SheetSection>
      )}
      {effects.length > 0 && (
        <SheetSection title="Effects">
          <EffectsTable effects={effects} />
        </SheetSection>
      )}
    </>
  );
}
