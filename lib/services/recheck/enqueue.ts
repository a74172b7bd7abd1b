import "server-only";
import { enqueue } from "@/lib/server/queue";
import type { Tx } from "@/lib/services/kernel/context";
import type { RecheckConcern } from "./concerned";

export const RECHECK_QUEUE = "recheck";

/** The machines concerned are checked again soon after this act; the job exists exactly if the act commits. */
export async function enqueueRecheck(tx: Tx, concern: RecheckConcern): Promise<void> {
  await enqueue(RECHECK_QUEUE, concern, { transaction: tx.transaction });
}
