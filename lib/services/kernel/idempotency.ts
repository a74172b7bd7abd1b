import "server-only";
import { sequelize } from "@/lib/server/sequelize";
import { IdempotencyKey } from "@/models/people";
import type { Tx } from "./context";
import { ServiceError } from "./errors";
import { hashOf } from "./hash";

interface Once {
  /** The caller's Idempotency-Key; null: no key, do the work. */
  readonly key: string | null;
  readonly request: unknown;
}

/**
 * Does the work once for one actor and key: a second call with the same request gets the first answer, one with
 * another request is refused. The key and the act commit together, so a lost answer can be asked for again.
 */
export async function once<T>(
  tx: Tx,
  input: Once,
  work: () => Promise<T>,
): Promise<{ answer: T; repeated: boolean }> {
  if (input.key === null || tx.actor.id === null) return { answer: await work(), repeated: false };
  const identity = { actorId: tx.actor.id, key: input.key };
  const requestHash = hashOf(input.request);
  await sequelize.query("select pg_advisory_xact_lock(hashtextextended($1, 0))", {
    bind: [`${identity.actorId}:${identity.key}`],
    transaction: tx.transaction,
  });
  const stored = await IdempotencyKey.findOne({ where: identity, transaction: tx.transaction });
  if (stored && stored.requestHash !== requestHash)
    throw new ServiceError(
      "conflict",
      "This Idempotency-Key was used for another request. Nothing was stored; use a new key.",
    );
  if (stored) return { answer: stored.answer as T, repeated: true };
  const answer = await work();
  await IdempotencyKey.create(
    { ...identity, requestHash, status: 201, answer },
    { transaction: tx.transaction },
  );
  return { answer, repeated: false };
}
