"use client";

import { useCallback, useEffect, useRef, useState } from "react";
import { answerSolve, type SolveAnswer, type SolveRequest } from "@/lib/review/solve-protocol";

interface Solver {
  readonly answer: SolveAnswer | null;
  readonly busy: boolean;
  /** Starts a search; one that still runs is given up. */
  readonly ask: (request: SolveRequest) => void;
  /** Gives up what runs and forgets the answer. */
  readonly stop: () => void;
}

function openWorker(): Worker | null {
  try {
    return new Worker(new URL("./solve-worker.ts", import.meta.url), { type: "module" });
  } catch {
    return null;
  }
}

/** Searches that take up to some seconds, in a worker of their own; in the page where the browser gives none. */
export function useSolver(): Solver {
  const [answer, setAnswer] = useState<SolveAnswer | null>(null);
  const [busy, setBusy] = useState(false);
  const worker = useRef<Worker | null>(null);
  const stop = useCallback(() => {
    worker.current?.terminate();
    worker.current = null;
    setAnswer(null);
    setBusy(false);
  }, []);
  const ask = useCallback(
    (request: SolveRequest) => {
      stop();
      setBusy(true);
      const opened = openWorker();
      const done = (found: SolveAnswer): void => {
        opened?.terminate();
        worker.current = null;
        setAnswer(found);
        setBusy(false);
      };
      if (opened === null) return done(answerSolve(request));
      worker.current = opened;
      opened.onmessage = ({ data }: MessageEvent<SolveAnswer>) => done(data);
      opened.onerror = () => done(answerSolve(request));
      opened.postMessage(request);
    },
    [stop],
  );
  useEffect(() => () => worker.current?.terminate(), []);
  return { answer, busy, ask, stop };
}
