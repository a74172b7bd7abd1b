import "server-only";
import { Op } from "sequelize";
import type { ChainVerdictView } from "@/lib/schemas/record";
import { RecordEvent } from "@/models/record";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { recordDigest } from "./append";

const PAGE = 1000;

/** Computes the whole chain again from the stored events, a page at a time. */
export async function verifyChain(context: Context): Promise<ChainVerdictView> {
  authorize(context, "record.read");
  let previous = "0".repeat(64);
  let lastSeq = "0";
  let events = 0;
  for (;;) {
    const page = await RecordEvent.findAll({
      where: { seq: { [Op.gt]: lastSeq } },
      order: [["seq", "ASC"]],
      limit: PAGE,
    });
    for (const event of page) {
      if (event.previousHash !== previous || digestOf(event) !== event.hash)
        return { events, brokenAt: event.seq, sentence: brokenSentence(event.seq, events) };
      previous = event.hash;
      lastSeq = event.seq;
      events += 1;
    }
    if (page.length < PAGE) return { events, brokenAt: null, sentence: wholeSentence(events) };
  }
}

const acts = (count: number) => (count === 1 ? "1 act" : `${count.toLocaleString("en")} acts`);

function wholeSentence(events: number): string {
  return `The record is whole: ${acts(events)}, each bound by hash to the one before it.`;
}

function brokenSentence(seq: string, before: number): string {
  return `The record does not hold at number ${seq}: that act, or one that stood just before it, was altered or taken out in the database. The ${acts(before)} before it are whole. Keep a copy of the database as it is now and find out who could write to it.`;
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
