import "server-only";
import { enqueue } from "@/lib/server/queue";
import type { Tx } from "@/lib/services/kernel/context";

export const REHEARSAL_QUEUE = "rehearsal";

/** The next machines of a rehearsal are gone through soon after this act; the job exists exactly if the act commits. */
export async function enqueueRehearsal(tx: Tx, rehearsalId: string): Promise<void> {
  await enqueue(REHEARSAL_QUEUE, { rehearsalId }, { transaction: tx.transaction });
}
