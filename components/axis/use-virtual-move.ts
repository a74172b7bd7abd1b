"use client";

import { useCallback, useEffect, useRef, useState } from "react";
import type { MoveInput } from "@/lib/physics/simulate/run";
import type { MoveAnswer, MoveReport } from "@/lib/review/virtual-move";

export type MoveState =
  | { readonly phase: "idle" }
  | { readonly phase: "running" | "stopped"; readonly share: number }
  | { readonly phase: "done"; readonly report: MoveReport }
  | { readonly phase: "failed"; readonly reason: string };

export interface VirtualMoveRun {
  readonly state: MoveState;
  readonly start: (input: MoveInput) => void;
  readonly stop: () => void;
}

const NO_WORKER =
  "This browser could not open a background worker, so nothing was simulated. Load the page again.";

function stateAfter(answer: MoveAnswer): MoveState {
  if (answer.kind === "progress") return { phase: "running", share: answer.share };
  if (answer.kind === "done") return { phase: "done", report: answer.report };
  return { phase: "failed", reason: answer.reason };
}

/** A virtual move in a worker of its own, which is ended to stop it and when the page is left. */
export function useVirtualMove(): VirtualMoveRun {
  const [state, setState] = useState<MoveState>({ phase: "idle" });
  const worker = useRef<Worker | null>(null);
  const end = useCallback(() => {
    worker.current?.terminate();
    worker.current = null;
  }, []);
  useEffect(() => end, [end]);
  const start = useCallback(
    (input: MoveInput) => {
      end();
      setState({ phase: "running", share: 0 });
      try {
        const opened = new Worker(new URL("./virtual-move-worker.ts", import.meta.url), { type: "module" });
        worker.current = opened;
        opened.onmessage = ({ data }: MessageEvent<MoveAnswer>) => setState(stateAfter(data));
        opened.onerror = () => setState({ phase: "failed", reason: NO_WORKER });
        opened.postMessage(input);
      } catch {
        setState({ phase: "failed", reason: NO_WORKER });
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
