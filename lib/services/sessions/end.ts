import "server-only";
import type { Tx } from "@/lib/services/kernel/context";
import { SYSTEM } from "@/lib/domain/roles";
import { Session } from "@/models/people";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";

/** Ends every open session of a person, but for one to keep, inside the act that makes it necessary. */
export async function endSessionsOf(
  tx: Tx,
  input: { userId: string; reason: string; keep?: string },
): Promise<number> {
  const open = await Session.findAll({
    where: { userId: input.userId, endedAt: null },
    transaction: tx.transaction,
    lock: tx.transaction.LOCK.UPDATE,
  });
  const ending = open.filter((session) => session.id !== input.keep);
  for (const session of ending)
    await session.update({ endedAt: tx.now, endReason: input.reason }, { transaction: tx.transaction });
  return ending.length;
}

/** Sign-out: ends the one session that the cookie names. */
export async function endSession(input: { sessionId: string; name: string; now: Date }): Promise<void> {
  await withTransaction({ actor: SYSTEM, now: input.now }, async (tx) => {
    authorize(tx, "account.write");
    const session = await Session.findByPk(input.sessionId, { transaction: tx.transaction });
    if (!session || session.endedAt) return;
    await session.update({ endedAt: tx.now, endReason: "signed out" }, { transaction: tx.transaction });
    await appendRecord(tx, {
      action: "session.ended",
      object: { type: "person", id: session.userId, label: input.name },
      reason: "signed out",
    });
  });
}
