import "server-only";
import { Machine } from "@/models/machines";
import { TestSheet } from "@/models/test-sheets";
import type { Tx } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";

/** The sheet's row, locked until the act is over, with its machine. */
export async function lockSheet(tx: Tx, id: string): Promise<{ sheet: TestSheet; machine: Machine }> {
  const { transaction } = tx;
  const sheet = await TestSheet.findByPk(id, { transaction, lock: transaction.LOCK.UPDATE });
  if (!sheet) throw notFound("test sheet");
  const machine = await Machine.findByPk(sheet.machineId, { transaction });
  if (!machine) throw notFound("machine");
  return { sheet, machine };
}
