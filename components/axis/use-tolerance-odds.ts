"use client";

import type { OddsAnswer } from "@/lib/review/odds-protocol";
import type { OddsInput, OddsReport } from "@/lib/review/tolerance-odds";
import { useWorkerRun, type RunState } from "./use-worker-run";

export type OddsState = RunState<OddsReport>;

function stateAfter(answer: OddsAnswer): OddsState {
  return answer.kind === "done"
    ? { phase: "done", report: answer.report }
    : { phase: "running", share: answer.share };
}

const KIND = {
  open: () => new Worker(new URL("./tolerance-worker.ts", import.meta.url), { type: "module" }),
  stateAfter,
  noWorker: "This browser could not open a background worker, so nothing was drawn. Load the page again.",
};

/** The odds of an axis, sampled in a worker. */
export function useToleranceOdds() {
  return useWorkerRun<OddsInput, OddsAnswer, OddsReport>(KIND);
}
