"use client";

import { useEffect, useState } from "react";
import type { CheckReport } from "@/lib/review/types";
import { CounterMoves } from "@/components/solve/counter-moves";
import { kindsOf } from "@/components/solve/kinds";
import { useSolver } from "@/components/solve/use-solver";
import { Button } from "@/components/ui/button";
import { SheetSection } from "@/components/ui/sheet";
import type { EditedFile } from "./file-editor";
import type { ProposalStartData } from "./proposal-types";

export interface CounterBoxProps {
  readonly start: Pick<ProposalStartData, "keyTable" | "assembly" | "policy">;
  readonly files: readonly EditedFile[];
  readonly report: CheckReport | null;
  /** Puts other texts in the place of these. */
  readonly onTake: (files: readonly EditedFile[]) => void;
}

/** Finds the smallest change that clears what is over limit, on request, and takes it into the text with one act. */
export function CounterBox({
  start: { keyTable, assembly, policy },
  files,
  report,
  onTake,
}: CounterBoxProps) {
  const { answer, busy, ask, stop } = useSolver();
  const [askedFor, setAskedFor] = useState<readonly EditedFile[] | null>(null);
  const [before, setBefore] = useState<readonly EditedFile[] | null>(null);
  const isStale = askedFor !== null && askedFor !== files;
  useEffect(() => {
    if (isStale) stop();
  }, [isStale, stop]);
  const over = report?.findings.filter(({ level }) => level === "over").length ?? 0;
  const edit = !isStale && answer?.kind === "counter" ? answer.edit : null;
  const searching = busy && !isStale;
  if (over === 0 && before === null) return null;
  return (
    <SheetSection title="Counter-proposal" note="the smallest change that clears what is over limit">
      <div aria-live="polite">
        {searching && <p className="quiet">Searching …</p>}
        {edit && <CounterMoves edit={edit} kinds={kindsOf(assembly)} />}
      </div>
      <div className="acts">
        {edit && edit.moves.length > 0 && (
          <Button
            variant="primary"
            onClick={() => {
              setBefore(files);
              onTake(edit.files);
            }}
          >
            Take it into the text
          </Button>
        )}
        {over > 0 && edit === null && (
          <Button
            busy={searching}
            onClick={() => {
              setAskedFor(files);
              ask({ kind: "counter", input: { files, keyTable, assembly, policy } });
            }}
          >
            Find the smallest change
          </Button>
        )}
        {before && (
          <Button
            variant="quiet"
            onClick={() => {
              onTake(before);
              setBefore(null);
            }}
          >
            put back the text as it was before
          </Button>
        )}
      </div>
    </SheetSection>
  );
}
