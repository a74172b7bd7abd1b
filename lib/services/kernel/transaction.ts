import "server-only";
import { Transaction } from "sequelize";
import { sequelize } from "@/lib/server/sequelize";
import type { Context, Tx } from "./context";

const RETRIES = 5;
const SERIALIZATION_FAILURES = new Set(["40001", "40P01"]);

function isSerializationFailure(error: unknown): boolean {
  const original = (error as { original?: { code?: string } }).original;
  return SERIALIZATION_FAILURES.has(original?.code ?? "");
}

/**
 * Runs one use case in one READ COMMITTED transaction; the use case locks the rows it decides on. A deadlock is
 * tried again from the start. What `afterCommit` collects runs only once the transaction is committed; its failures
 * do not undo the act.
 */
export async function withTransaction<T>(context: Context, work: (tx: Tx) => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    const later: (() => Promise<void> | void)[] = [];
    try {
      const result = await sequelize.transaction(
        { isolationLevel: Transaction.ISOLATION_LEVELS.READ_COMMITTED },
        (transaction) => work({ ...context, transaction, afterCommit: (act) => later.push(act) }),
      );
      for (const act of later) await act();
      return result;
    } catch (error) {
      if (!isSerializationFailure(error) || attempt >= RETRIES) throw error;
    }
  }
}
