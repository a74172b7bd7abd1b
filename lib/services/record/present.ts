import "server-only";
import type { RecordEventView } from "@/lib/schemas/record";
import type { RecordEvent } from "@/models/record";

export function presentEvent(event: RecordEvent): RecordEventView {
  return {
    seq: event.seq,
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
    hash: event.hash,
  };
}
