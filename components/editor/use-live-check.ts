"use client";

import { useEffect, useRef, useState } from "react";
import { checkConfiguration } from "@/lib/review/check";
import type { CheckInput, ConfigurationFile } from "@/lib/review/types";
import { answerLive, type LiveAnswer, type LiveRequest } from "@/lib/review/worker-protocol";

/** Long enough to sit out a burst of typing, short enough to read as at once. */
const PAUSE_MS = 120;

export interface LiveInput extends Omit<CheckInput, "files"> {
  readonly base: readonly ConfigurationFile[];
  readonly files: readonly ConfigurationFile[];
}

/** A worker, or null where the browser gives none: the check then runs in the page. */
function openWorker(): Worker | null {
  try {
    return new Worker(new URL("./check-worker.ts", import.meta.url), { type: "module" });
  } catch {
    return null;
  }
}

/** Findings, changes and effects of the text as it stands, a blink after each pause in typing; older answers are dropped. */
export function useLiveCheck({ base, files, keyTable, assembly, policy }: LiveInput): LiveAnswer | null {
  const [answer, setAnswer] = useState<LiveAnswer | null>(null);
  const worker = useRef<Worker | null>(null);
  const asked = useRef(0);
  useEffect(() => {
    const opened = openWorker();
    worker.current = opened;
    if (opened) {
      opened.onmessage = ({ data }: MessageEvent<LiveAnswer>) => {
        if (data.id === asked.current) setAnswer(data);
      };
      opened.onerror = () => {
        worker.current = null;
      };
    }
    return () => opened?.terminate();
  }, []);
  useEffect(() => {
    const timer = setTimeout(() => {
      asked.current += 1;
      const shared = { keyTable, assembly, policy };
      const baseline = base.length === 0 ? null : checkConfiguration({ ...shared, files: base });
      const request: LiveRequest = { id: asked.current, input: { ...shared, files }, baseline };
      if (worker.current) worker.current.postMessage(request);
      else setAnswer(answerLive(request));
    }, PAUSE_MS);
    return () => clearTimeout(timer);
  }, [base, files, keyTable, assembly, policy]);
  return answer;
}
