"use client";

import { useCallback, useEffect, useMemo, useRef, useState } from "react";
import type { Trial } from "@/lib/domain/test-sheets";
import { sheetResult, type SheetResult } from "@/lib/review/sheet-result";
import type { SheetView, StoredTrial } from "@/lib/schemas/test-sheets";
import { apiCall, ProblemError, sentenceOf } from "@/components/api";
import {
  forgetEntries,
  keepEntry,
  newEntryId,
  useWaitingEntries,
  waitingEntries,
  type EntryAuthor,
  type WaitingEntry,
} from "./entry-store";

/** An entry as the page shows it: stored, or waiting on this device. */
export interface ShownTrial extends Trial {
  readonly actorName: string;
  readonly waits: boolean;
  readonly struck: { readonly reason: string; readonly actorName: string } | null;
  readonly late: boolean;
}

export interface SheetOnPage {
  readonly sheet: SheetView;
  /** By the time they were made. */
  readonly trials: readonly ShownTrial[];
  readonly result: SheetResult;
  /** Entries of this person that wait to be sent. */
  readonly waiting: number;
  /** Names of others whose entries wait on this device. */
  readonly others: readonly string[];
  /** Why the last try to send failed; null after one that went well. */
  readonly trouble: string | null;
  readonly sending: boolean;
  readonly enter: (entry: Omit<Trial, "id" | "doneAt">) => void;
  readonly strike: (trialId: string, reason: string) => void;
  readonly sendNow: () => Promise<void>;
  readonly replace: (sheet: SheetView) => void;
}

const TRY_AGAIN_MS = 15_000;

/** A test sheet that goes on without a connection: entries are kept on the device first and sent when that is possible. */
export function useSheet(initial: SheetView, person: EntryAuthor): SheetOnPage {
  const { id, plan } = initial;
  const [sheet, setSheet] = useState(initial);
  const entries = useWaitingEntries(id);
  const own = entries.filter(({ by }) => by.id === person.id);
  const { sendNow, sending, trouble } = useSending({ id, person, count: own.length, onSent: setSheet });
  const trials = useMemo(() => shownTrials(sheet.trials, entries), [sheet.trials, entries]);
  const result = useMemo(
    () =>
      sheetResult(
        plan,
        trials.filter(({ struck, late }) => struck === null && !late),
      ),
    [plan, trials],
  );
  return {
    sheet,
    trials,
    result,
    waiting: own.length,
    others: [...new Set(entries.filter(({ by }) => by.id !== person.id).map(({ by }) => by.name))],
    trouble,
    sending,
    enter: (entry) => {
      const trial = { ...entry, id: newEntryId(), doneAt: new Date().toISOString() };
      keepEntry(id, { kind: "trial", trial, by: person });
    },
    strike: (trialId, reason) => keepEntry(id, { kind: "strike", trialId, reason, by: person }),
    sendNow,
    replace: setSheet,
  };
}

interface Sending {
  readonly id: string;
  readonly person: EntryAuthor;
  readonly count: number;
  readonly onSent: (sheet: SheetView) => void;
}

function useSending({ id, person, count, onSent }: Sending) {
  const [trouble, setTrouble] = useState<string | null>(null);
  const [sending, setSending] = useState(false);
  const busy = useRef(false);
  const sendNow = useCallback(async () => {
    const batch = waitingEntries(id).filter(({ by }) => by.id === person.id);
    if (busy.current || batch.length === 0) return;
    busy.current = true;
    setSending(true);
    try {
      const answer = await apiCall<SheetView>("POST", `/test-sheets/${id}/entries`, { body: bodyOf(batch) });
      onSent(answer);
      forgetEntries(id, batch);
      setTrouble(null);
    } catch (error) {
      setTrouble(wordsOf(error));
    } finally {
      busy.current = false;
      setSending(false);
    }
  }, [id, person.id, onSent]);
  useEffect(() => {
    if (count === 0) return undefined;
    const soon = setTimeout(() => void sendNow(), 0);
    const again = setInterval(() => void sendNow(), TRY_AGAIN_MS);
    const back = (): void => void sendNow();
    window.addEventListener("online", back);
    return () => {
      clearTimeout(soon);
      clearInterval(again);
      window.removeEventListener("online", back);
    };
  }, [count, sendNow]);
  return { sendNow, sending, trouble };
}

function wordsOf(error: unknown): string {
  if (error instanceof ProblemError && error.status === 0) return "Keepstep is not reached.";
  if (error instanceof ProblemError && error.status === 401)
    return "You are signed out. Sign in again in another window; the entries stay here.";
  return sentenceOf(error);
}

function bodyOf(batch: readonly WaitingEntry[]) {
  return {
    trials: batch.flatMap((entry) => (entry.kind === "trial" ? [entry.trial] : [])),
    strikes: batch.flatMap((entry) =>
      entry.kind === "strike" ? [{ trialId: entry.trialId, reason: entry.reason }] : [],
    ),
  };
}

/** Stored and waiting entries together, each once, by the time they were made. */
export function shownTrials(
  stored: readonly StoredTrial[],
  entries: readonly WaitingEntry[],
): readonly ShownTrial[] {
  const known = new Set(stored.map(({ id }) => id));
  const strikes = new Map(
    entries.flatMap((entry) =>
      entry.kind === "strike"
        ? [[entry.trialId, { reason: entry.reason, actorName: entry.by.name }] as const]
        : [],
    ),
  );
  const waiting = entries.flatMap((entry): ShownTrial[] =>
    entry.kind === "trial" && !known.has(entry.trial.id)
      ? [{ ...entry.trial, actorName: entry.by.name, waits: true, struck: null, late: false }]
      : [],
  );
  return [...stored.map((trial) => ({ ...trial, waits: false })), ...waiting]
    .map((trial) => ({ ...trial, struck: trial.struck ?? strikes.get(trial.id) ?? null }))
    .sort((one, other) => Date.parse(one.doneAt) - Date.parse(other.doneAt));
}
