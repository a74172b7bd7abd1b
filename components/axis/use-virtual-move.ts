"use client";

import type { MoveInput } from "@/lib/physics/simulate/run";
import type { MoveAnswer, MoveReport } from "@/lib/review/virtual-move";
import { useWorkerRun, type RunState } from "./use-worker-run";

export type MoveState = RunState<MoveReport>;

function stateAfter(answer: MoveAnswer): MoveState {
  if (answer.kind === "progress") return { phase: "running", share: answer.share };
  if (answer.kind === "done") return { phase: "done", report: answer.report };
  return { phase: "failed", reason: answer.reason };
}

const KIND = {
  open: () => new Worker(new URL("./virtual-move-worker.ts", import.meta.url), { type: "module" }),
  stateAfter,
  noWorker: "This browser could not open a background worker, so nothing was simulated. Load the page again.",
};

/** A virtual move, simulated in a worker. */
export function useVirtualMove() {
  return useWorkerRun<MoveInput, MoveAnswer, MoveReport>(KIND);
}
