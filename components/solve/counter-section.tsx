"use client";

import { useEffect } from "react";
import type { CheckInput } from "@/lib/review/types";
import { ButtonLink } from "@/components/ui/button";
import { SheetSection } from "@/components/ui/sheet";
import { CounterMoves } from "./counter-moves";
import { kindsOf } from "./kinds";
import { useSolver } from "./use-solver";

export interface CounterSectionProps {
  readonly basis: CheckInput;
  /** Where the proposal is edited; null where the reader may not. */
  readonly editHref: string | null;
}

/** What would clear the findings over limit of a proposal, to read beside the decision. */
export function CounterSection({ basis, editHref }: CounterSectionProps) {
  const { answer, ask } = useSolver();
  useEffect(() => ask({ kind: "counter", input: basis }), [ask, basis]);
  return (
    <SheetSection title="Counter-proposal" note="the smallest change that clears what is over limit">
      <div aria-live="polite">
        {answer?.kind === "counter" ? (
          <CounterMoves edit={answer.edit} kinds={kindsOf(basis.assembly)} />
        ) : (
          <p className="quiet">Searching …</p>
        )}
      </div>
      {editHref !== null && (
        <div className="acts">
          <ButtonLink href={editHref}>Edit the proposal</ButtonLink>
        </div>
      )}
    </SheetSection>
  );
}
