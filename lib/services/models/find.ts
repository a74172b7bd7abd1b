import "server-only";
import { MachineModel } from "@/models/catalog";
import type { Tx } from "@/lib/services/kernel/context";
import { notFound, ServiceError } from "@/lib/services/kernel/errors";

/** The model's row, locked until the act is over. Its key table and its hardware are versioned under this lock. */
export async function lockModel(tx: Tx, id: string): Promise<MachineModel> {
  const model = await MachineModel.findByPk(id, {
    transaction: tx.transaction,
    lock: tx.transaction.LOCK.UPDATE,
  });
  if (!model) throw notFound("machine model");
  return model;
}

export async function requireFreeModelCode(tx: Tx, code: string): Promise<void> {
  const taken = await MachineModel.findOne({ where: { code }, transaction: tx.transaction });
  if (taken)
    throw new ServiceError(
      "conflict",
      `There is a machine model with the code ${code} already: ${taken.name}. Choose another code.`,
      { pointer: "/code" },
    );
}
