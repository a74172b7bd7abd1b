"use client";

import { useCallback, useEffect, useRef, useState } from "react";

/** A long reckoning in a worker, as a page shows it; `share` of 1 is done so far. */
export type RunState<Report> =
  | { readonly phase: "idle" }
  | { readonly phase: "running" | "stopped"; readonly share: number }
  | { readonly phase: "done"; readonly report: Report }
  | { readonly phase: "failed"; readonly reason: string };

export interface WorkerRun<Input, Report> {
  readonly state: RunState<Report>;
  readonly start: (input: Input) => void;
  readonly stop: () => void;
}

interface Kind<Answer, Report> {
  /** Opens the worker; written out where it is used, since the bundler looks for its address there. */
  readonly open: () => Worker;
  readonly stateAfter: (answer: Answer) => RunState<Report>;
  /** Said where the browser gives no worker. */
  readonly noWorker: string;
}

/** A run in a worker of its own, which is ended to stop it and when the page is left. `kind` must not change. */
export function useWorkerRun<Input, Answer, Report>(kind: Kind<Answer, Report>): WorkerRun<Input, Report> {
  const [state, setState] = useState<RunState<Report>>({ phase: "idle" });
  const worker = useRef<Worker | null>(null);
  const end = useCallback(() => {
    worker.current?.terminate();
    worker.current = null;
  }, []);
  useEffect(() => end, [end]);
  const start = useCallback(
    (input: Input) => {
      const failed = () => setState({ phase: "failed", reason: kind.noWorker });
      end();
      setState({ phase: "running", share: 0 });
      try {
        const opened = kind.open();
        worker.current = opened;
        opened.onmessage = ({ data }: MessageEvent<Answer>) => setState(kind.stateAfter(data));
        opened.onerror = failed;
        opened.postMessage(input);
      } catch {
        failed();
      }
    },
    [end, kind],
  );
  const stop = useCallback(() => {
    end();
    setState((now) => (now.phase === "running" ? { phase: "stopped", share: now.share } : now));
  }, [end]);
  return { state, start, stop };
}
