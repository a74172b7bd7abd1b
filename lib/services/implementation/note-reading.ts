import "server-only";
import type { Tx } from "@/lib/services/kernel/context";
import { advance, openStep } from "./advance";

interface NotedReading {
  readonly machineId: string;
  readonly serial: string;
  readonly readingId: string;
}

export interface StepProgress {
  readonly changeId: string;
  readonly appliedAt: string | null;
  readonly verifiedAt: string | null;
  readonly missing: string | null;
}

/** A reading has come in for a machine: its open implementation step moves on by it. Null without such a step. */
export async function noteAppliedReading(
  tx: Tx,
  { machineId, serial, readingId }: NotedReading,
): Promise<StepProgress | null> {
  const place = await openStep(tx, machineId);
  if (!place) return null;
  const { missing } = await advance(tx, { place, serial, readingId });
  return {
    changeId: place.changeId,
    appliedAt: place.appliedAt?.toISOString() ?? null,
    verifiedAt: place.verifiedAt?.toISOString() ?? null,
    missing,
  };
}
