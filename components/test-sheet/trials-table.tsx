"use client";

import { useState } from "react";
import { HEAT_PLACE_WORDS, type TestPlan } from "@/lib/domain/test-sheets";
import { formatNumber, showText } from "@/lib/domain/units";
import { levelOf } from "@/lib/physics/evidence/ladder";
import { lostStepsOf } from "@/lib/review/sheet-result";
import { Button } from "@/components/ui/button";
import { DateTime } from "@/components/ui/date-time";
import { Dialog } from "@/components/ui/dialog";
import { TextField } from "@/components/ui/field";
import { Head, NumberCell, Table } from "@/components/ui/table";
import type { ShownTrial } from "./use-sheet";

export interface TrialsTableProps {
  readonly plan: TestPlan;
  readonly trials: readonly ShownTrial[];
  /** Left out where nothing may be struck out. */
  readonly onStrike?: ((trialId: string, reason: string) => void) | undefined;
}

const OUTCOMES = { pass: "passed", fail: "failed" } as const;

/** The entries in the order they were made; what was struck out stays in sight. */
export function TrialsTable({ plan, trials, onStrike }: TrialsTableProps) {
  const [striking, setStriking] = useState<ShownTrial | null>(null);
  const heat = plan.heat !== null;
  return (
    <>
      <Table caption="Entries" captionHidden>
        <thead>
          <tr>
            <Head number>No.</Head>
            {plan.ladder && <Head number>Level</Head>}
            {heat ? <Head number>After</Head> : <Head>Outcome</Head>}
            {!heat && <Head>Off by</Head>}
            <Head>Temperatures</Head>
            <Head>Entered</Head>
            {onStrike && <Head>Wrong</Head>}
          </tr>
        </thead>
        <tbody>
          {trials.map((trial, index) => (
            <Row
              key={trial.id}
              number={index + 1}
              trial={trial}
              plan={plan}
              onStrike={onStrike && (() => setStriking(trial))}
            />
          ))}
        </tbody>
      </Table>
      {onStrike && <StrikeDialog trial={striking} onClose={() => setStriking(null)} onStrike={onStrike} />}
    </>
  );
}

interface RowProps {
  readonly number: number;
  readonly trial: ShownTrial;
  readonly plan: TestPlan;
  readonly onStrike: (() => void) | undefined;
}

function Row({ number, trial, plan, onStrike }: RowProps) {
  const { ladder, heat } = plan;
  const struck = trial.struck !== null;
  return (
    <tr className={struck ? "struck-entry" : undefined}>
      <NumberCell>{number}</NumberCell>
      {ladder && (
        <NumberCell>
          {trial.rung !== null && showText(levelOf(ladder, trial.rung), ladder.unit, 4)}
        </NumberCell>
      )}
      {heat ? (
        <NumberCell>{trial.minutes === null ? "–" : `${formatNumber(trial.minutes)} min`}</NumberCell>
      ) : (
        <td>{trial.result && OUTCOMES[trial.result]}</td>
      )}
      {!heat && <td>{deviationText(trial, plan)}</td>}
      <td>{temperatureText(trial)}</td>
      <td>
        <DateTime value={trial.doneAt} /> {trial.actorName}
        {trial.waits && <span className="block">waits to be sent</span>}
        {trial.late && <span className="block">came in after the closing, not in the result</span>}
        {trial.note !== "" && <span className="block quiet">{trial.note}</span>}
        {trial.struck && (
          <span className="block">
            struck out by {trial.struck.actorName}: {trial.struck.reason}
          </span>
        )}
      </td>
      {onStrike && (
        <td>
          {!struck && (
            <Button
              variant="quiet"
              className="strike-out"
              onClick={onStrike}
              aria-label={`Strike out entry ${number}`}
            >
              strike out
            </Button>
          )}
        </td>
      )}
    </tr>
  );
}

function deviationText(trial: ShownTrial, plan: TestPlan): string {
  if (!trial.deviation) return "–";
  const { value, unit } = trial.deviation;
  const lost = lostStepsOf(plan, trial);
  const split = lost ? ` (${formatNumber(lost.lost)} lost, remainder ${formatNumber(lost.remainder)})` : "";
  return `${formatNumber(value)} ${unit}${split}`;
}

function temperatureText({ temperatures, ambientC }: ShownTrial): string {
  const measured = temperatures.map(
    ({ place, celsius, by }) =>
      `${HEAT_PLACE_WORDS[place]} ${formatNumber(celsius)} °C${by === "resistance" ? " by resistance" : ""}`,
  );
  const ambient = ambientC === null ? [] : [`ambient ${formatNumber(ambientC)} °C`];
  return [...measured, ...ambient].join(", ") || "–";
}

interface StrikeDialogProps {
  readonly trial: ShownTrial | null;
  readonly onClose: () => void;
  readonly onStrike: (trialId: string, reason: string) => void;
}

function StrikeDialog({ trial, onClose, onStrike }: StrikeDialogProps) {
  const [reason, setReason] = useState("");
  const [short, setShort] = useState(false);
  const close = (): void => {
    setReason("");
    setShort(false);
    onClose();
  };
  const strike = (): void => {
    if (reason.trim().length < 3) return setShort(true);
    if (trial) onStrike(trial.id, reason.trim());
    close();
  };
  return (
    <Dialog
      open={trial !== null}
      onClose={close}
      title="Strike out this entry"
      acts={
        <>
          <Button variant="primary" onClick={strike}>
            Strike it out
          </Button>
          <Button onClick={close}>Leave it</Button>
        </>
      }
    >
      <p>The entry stays in sight and counts no longer.</p>
      <TextField
        label="Reason"
        help="Kept in the record."
        value={reason}
        maxLength={1000}
        error={short ? "Say why, in a few words." : undefined}
        onChange={(event) => setReason(event.target.value)}
      />
    </Dialog>
  );
}
