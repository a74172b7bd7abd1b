"use client";

import { useSyncExternalStore } from "react";
import type { Trial } from "@/lib/domain/test-sheets";

/** Who entered something on this device. */
export interface EntryAuthor {
  readonly id: string;
  readonly name: string;
}

/** An entry that the server has not taken yet. */
export type WaitingEntry =
  | { readonly kind: "trial"; readonly trial: Trial; readonly by: EntryAuthor }
  | { readonly kind: "strike"; readonly trialId: string; readonly reason: string; readonly by: EntryAuthor };

const keyOf = (sheetId: string): string => `keepstep.test-sheet.${sheetId}`;
const NONE: readonly WaitingEntry[] = [];

/** What this page has read last, so that React gets the same list for the same text. */
const known = new Map<string, { readonly text: string | null; readonly entries: readonly WaitingEntry[] }>();
/** Where the browser keeps nothing, the entries last as long as the page. */
const unkept = new Map<string, string>();
const listeners = new Set<() => void>();

function storedText(key: string): string | null {
  if (unkept.has(key)) return unkept.get(key) ?? null;
  try {
    return localStorage.getItem(key);
  } catch {
    return null;
  }
}

function entriesIn(text: string | null): readonly WaitingEntry[] {
  if (text === null) return NONE;
  try {
    const entries = JSON.parse(text) as WaitingEntry[];
    return Array.isArray(entries) && entries.length > 0 ? entries : NONE;
  } catch {
    return NONE;
  }
}

export function waitingEntries(sheetId: string): readonly WaitingEntry[] {
  const key = keyOf(sheetId);
  const text = storedText(key);
  const last = known.get(key);
  if (last && last.text === text) return last.entries;
  const entries = entriesIn(text);
  known.set(key, { text, entries });
  return entries;
}

function write(sheetId: string, entries: readonly WaitingEntry[]): void {
  const key = keyOf(sheetId);
  const text = JSON.stringify(entries);
  try {
    localStorage.setItem(key, text);
    unkept.delete(key);
  } catch {
    unkept.set(key, text);
  }
  for (const heard of listeners) heard();
}

/** Keeps an entry on this device before anything is sent. */
export function keepEntry(sheetId: string, entry: WaitingEntry): void {
  write(sheetId, [...waitingEntries(sheetId), entry]);
}

/** The server has these: they wait no longer. What was entered meanwhile stays. */
export function forgetEntries(sheetId: string, sent: readonly WaitingEntry[]): void {
  const taken = new Set(sent.map(identity));
  write(
    sheetId,
    waitingEntries(sheetId).filter((entry) => !taken.has(identity(entry))),
  );
}

function identity(entry: WaitingEntry): string {
  return entry.kind === "trial" ? entry.trial.id : `strike ${entry.trialId}`;
}

/** Whether a reload would lose what waits, because the browser keeps nothing. */
export function isUnkept(sheetId: string): boolean {
  return unkept.has(keyOf(sheetId));
}

function subscribe(heard: () => void): () => void {
  listeners.add(heard);
  window.addEventListener("storage", heard);
  return () => {
    listeners.delete(heard);
    window.removeEventListener("storage", heard);
  };
}

/** What waits on this device for one sheet, in the order of entering; other windows of the browser count. */
export function useWaitingEntries(sheetId: string): readonly WaitingEntry[] {
  return useSyncExternalStore(
    subscribe,
    () => waitingEntries(sheetId),
    () => NONE,
  );
}

/** A random UUID; works on pages without TLS too. */
export function newEntryId(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(16));
  const digits = [...bytes].map((byte, index) => {
    const marked = index === 6 ? (byte & 0x0f) | 0x40 : index === 8 ? (byte & 0x3f) | 0x80 : byte;
    return marked.toString(16).padStart(2, "0");
  });
  const text = digits.join("");
  return [text.slice(0, 8), text.slice(8, 12), text.slice(12, 16), text.slice(16, 20), text.slice(20)].join(
    "-",
  );
}
