"use client";

import type { SheetView } from "@/lib/schemas/test-sheets";
import { parameterLabel } from "@/lib/domain/parameters";
import { plural } from "@/lib/domain/sentences";
import { TEST_WORDS } from "@/lib/domain/test-sheets";
import { showText } from "@/lib/domain/units";
import { rungTrials } from "@/lib/review/sheet-result";
import { apiCall } from "@/components/api";
import { ActButton } from "@/components/forms/act-button";
import { Button } from "@/components/ui/button";
import { DateTime } from "@/components/ui/date-time";
import { Notice } from "@/components/ui/notice";
import { SheetSection } from "@/components/ui/sheet";
import { isUnkept, type EntryAuthor } from "./entry-store";
import { LadderPlot } from "./ladder-plot";
import { PaperRows } from "./paper-rows";
import { TrialForm } from "./trial-form";
import { TrialsTable } from "./trials-table";
import { useSheet, type SheetOnPage } from "./use-sheet";

export interface SheetRunnerProps {
  readonly initial: SheetView;
  readonly person: EntryAuthor;
  /** Viewers read only. */
  readonly mayEnter: boolean;
}

/** The working part of a test sheet: the next level, the outcome, what was entered, and what it says. */
export function SheetRunner({ initial, person, mayEnter }: SheetRunnerProps) {
  const page = useSheet(initial, person);
  const { sheet, trials, result } = page;
  const { plan, closing } = sheet;
  const open = closing === null && mayEnter;
  const standing = trials.filter(({ struck, late }) => struck === null && !late);
  return (
    <>
      <WaitingNotice page={page} />
      {open && (
        <SheetSection title={result.ladder ? "Next trial" : "Next entry"} note={standing.length + 1}>
          <NextLevel page={page} />
          <TrialForm
            sheetId={sheet.id}
            plan={plan}
            rung={result.ladder?.next.rung ?? null}
            onEnter={page.enter}
          />
        </SheetSection>
      )}
      <SheetSection title={closing ? "Result" : "Result so far"}>
        <ul className="result-lines" aria-live="polite">
          {(closing ? sheet.result.sentences : result.sentences).map((sentence) => (
            <li key={sentence}>{sentence}</li>
          ))}
        </ul>
        {plan.ladder && (
          <LadderPlot
            plan={plan.ladder}
            trials={rungTrials(standing)}
            estimate={result.ladder?.estimate ?? null}
          />
        )}
        {closing && (
          <p className="quiet">
            {closing.outcome === "finished" ? "Closed as finished" : "Broken off"} by {closing.actorName},{" "}
            <DateTime value={closing.at} />
            {closing.note && `: ${closing.note}`}
          </p>
        )}
      </SheetSection>
      <SheetSection title="Entries" note={plural(standing.length, "entry that counts", "entries that count")}>
        {trials.length > 0 ? (
          <TrialsTable plan={plan} trials={trials} onStrike={open ? page.strike : undefined} />
        ) : (
          <p className="quiet">None yet.</p>
        )}
        {closing === null && <PaperRows plan={plan} />}
      </SheetSection>
      {open && <CloseActs page={page} />}
    </>
  );
}

/** What is to be set for the next trial, large enough to be read across a workshop. */
function NextLevel({ page: { sheet, result } }: { readonly page: SheetOnPage }) {
  const { plan } = sheet;
  const words = TEST_WORDS[plan.test];
  return (
    <>
      {plan.ladder && result.ladder && (
        <p className="next-level">
          {`${parameterLabel(plan.ladder.parameter)} `}
          <strong>
            {showText(result.ladder.next.level, plan.ladder.unit, 4)}
            {plan.ladder.basis === null ? "" : ` ${plan.ladder.basis}`}
          </strong>
        </p>
      )}
      {result.run && plan.run && (
        <p className="next-level">
          <strong>{result.run.trials + 1}</strong> of {result.run.needed ?? plan.run.trials}
        </p>
      )}
      <p>{words.trial}</p>
    </>
  );
}

function WaitingNotice({ page }: { readonly page: SheetOnPage }) {
  const { waiting, others, trouble, sending, sendNow, sheet } = page;
  if (waiting === 0 && others.length === 0) return null;
  return (
    <Notice
      live="status"
      title={waiting > 0 ? `${plural(waiting, "entry waits", "entries wait")} to be sent` : undefined}
      acts={
        waiting > 0 && (
          <Button busy={sending} onClick={() => void sendNow()}>
            Send now
          </Button>
        )
      }
    >
      {waiting > 0 && (
        <p>
          {trouble === null ? "They are being sent." : `${trouble} They are tried again by themselves.`}{" "}
          {isUnkept(sheet.id)
            ? "This browser keeps nothing, so a reload would lose them: leave this page open until they are sent."
            : "They are kept on this device; a reload loses nothing."}
        </p>
      )}
      {others.map((name) => (
        <p key={name}>
          Entries of {name} wait on this device; they are sent when {name} signs in here.
        </p>
      ))}
    </Notice>
  );
}

function CloseActs({ page: { sheet, waiting, replace } }: { readonly page: SheetOnPage }) {
  const send = (outcome: "finished" | "broken_off") => async (note: string) => {
    const body = { outcome, note };
    replace(await apiCall<SheetView>("POST", `/test-sheets/${sheet.id}/close`, { body }));
  };
  if (waiting > 0)
    return <p className="quiet">The sheet can be closed once the entries that wait here are sent.</p>;
  return (
    <div className="acts entries-acts print-hidden">
      <ActButton label="Close as finished" title="Close this test sheet" reasoned send={send("finished")}>
        <p>Its result stands as it is now. Put the settings back to what the machine is required to run.</p>
      </ActButton>
      <ActButton label="Break it off" title="Break this test off" reasoned send={send("broken_off")}>
        <p>What was entered stays. Say why it was broken off.</p>
      </ActButton>
    </div>
  );
}
