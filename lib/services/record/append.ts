import "server-only";
import { QueryTypes } from "sequelize";
import { sequelize } from "@/lib/server/sequelize";
import { RecordEvent } from "@/models/record";
import type { Tx } from "@/lib/services/kernel/context";
import { hashOf } from "@/lib/services/kernel/hash";

export interface RecordEntry {
  /** The act in words of the trade, "change.approved", "reading.kept" ... */
  readonly action: string;
  readonly object: { readonly type: string; readonly id: string; readonly label: string };
  readonly machineId?: string | null;
  readonly changeId?: string | null;
  readonly before?: unknown;
  readonly after?: unknown;
  readonly reason?: string | null;
}

/** Serializes appends, so that each event is chained to the one before it. Any constant will do. */
const CHAIN_LOCK = 0x6b656570;
const FIRST_HASH = "0".repeat(64);

/** What the hash of an event covers; JSON-plain, so that it can be computed again from the stored row. */
export function recordDigest(event: Omit<ReturnType<typeof eventFields>, "hash">): string {
  return hashOf(event);
}

function eventFields(tx: Tx, entry: RecordEntry, previousHash: string) {
  return {
    at: tx.now.toISOString(),
    actorKind: tx.actor.kind,
    actorId: tx.actor.id,
    actorName: tx.actor.name,
    action: entry.action,
    objectType: entry.object.type,
    objectId: entry.object.id,
    objectLabel: entry.object.label,
    machineId: entry.machineId ?? null,
    changeId: entry.changeId ?? null,
    before: plain(entry.before),
    after: plain(entry.after),
    reason: entry.reason ?? null,
    previousHash,
  };
}

function plain(value: unknown): unknown {
  return value === undefined ? null : JSON.parse(JSON.stringify(value));
}

async function lastHash(tx: Tx): Promise<string> {
  await sequelize.query("select pg_advisory_xact_lock($1)", {
    bind: [CHAIN_LOCK],
    transaction: tx.transaction,
  });
  const [row] = await sequelize.query<{ hash: string }>(
    "select hash from record_events order by seq desc limit 1",
    {
      type: QueryTypes.SELECT,
      transaction: tx.transaction,
    },
  );
  return row?.hash ?? FIRST_HASH;
}

/** Writes one event in the act's own transaction, chained by hash to the event before it. */
export async function appendRecord(tx: Tx, entry: RecordEntry): Promise<void> {
  const event = eventFields(tx, entry, await lastHash(tx));
  const row = { ...event, at: tx.now, hash: recordDigest(event) };
  await RecordEvent.create(row, { transaction: tx.transaction });
}
