"use client";

import { useCallback, useEffect, useRef, useState } from "react";
import type { OddsAnswer } from "@/lib/review/odds-protocol";
import type { OddsInput, OddsReport } from "@/lib/review/tolerance-odds";

export type OddsState =
  | { readonly phase: "idle" | "failed" }
  | { readonly phase: "running" | "stopped"; readonly share: number }
  | { readonly phase: "done"; readonly report: OddsReport };

export interface OddsRun {
  readonly state: OddsState;
  readonly start: (input: OddsInput) => void;
  readonly stop: () => void;
}

/** Samples in a worker of its own, which is ended to stop it and when the page is left. */
export function useToleranceOdds(): OddsRun {
  const [state, setState] = useState<OddsState>({ phase: "idle" });
  const worker = useRef<Worker | null>(null);
  const end = useCallback(() => {
    worker.current?.terminate();
    worker.current = null;
  }, []);
  useEffect(() => end, [end]);
  const start = useCallback(
    (input: OddsInput) => {
      end();
      setState({ phase: "running", share: 0 });
      try {
        const opened = new Worker(new URL("./tolerance-worker.ts", import.meta.url), { type: "module" });
        worker.current = opened;
        opened.onmessage = ({ data }: MessageEvent<OddsAnswer>) =>
          setState(
            data.kind === "done"
              ? { phase: "done", report: data.report }
              : { phase: "running", share: data.share },
          );
        opened.onerror = () => setState({ phase: "failed" });
        opened.postMessage(input);
      } catch {
        setState({ phase: "failed" });
      }
    },
    [end],
  );
  const stop = useCallback(() => {
    end();
    setState((now) => (now.phase === "running" ? { phase: "stopped", share: now.share } : now));
  }, [end]);
  return { state, start, stop };
}
