import "server-only";
import { RecordEvent } from "@/models/record";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { recordDigest } from "./append";

export interface ChainVerdict {
  readonly events: number;
  /** Number of the first event that does not fit, or null. */
  readonly brokenAt: string | null;
}

const PAGE = 1000;

/** Computes the whole chain again from the stored events. */
export async function verifyChain(context: Context): Promise<ChainVerdict> {
  authorize(context, "record.read");
  let previous = "0".repeat(64);
  let events = 0;
  for (;;) {
    const page = await RecordEvent.findAll({ order: [["seq", "ASC"]], offset: events, limit: PAGE });
    for (const event of page) {
      if (event.previousHash !== previous || digestOf(event) !== event.hash)
        return { events, brokenAt: event.seq };
      previous = event.hash;
      events += 1;
    }
    if (page.length < PAGE) return { events, brokenAt: null };
  }
}

function digestOf(event: RecordEvent): string {
  return recordDigest({
    at: event.at.toISOString(),
    actorKind: event.actorKind,
    actorId: event.actorId,
    actorName: event.actorName,
    action: event.action,
    objectType: event.objectType,
    objectId: event.objectId,
    objectLabel: event.objectLabel,
    machineId: event.machineId,
    changeId: event.changeId,
    before: event.before,
    after: event.after,
    reason: event.reason,
    previousHash: event.previousHash,
  });
}
