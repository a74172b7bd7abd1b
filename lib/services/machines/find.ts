import "server-only";
import { MachineModel, Site } from "@/models/catalog";
import { Machine } from "@/models/machines";
import type { Tx } from "@/lib/services/kernel/context";
import { notFound, ServiceError } from "@/lib/services/kernel/errors";

/** The machine's row, locked until the act is over. */
export async function lockMachine(tx: Tx, id: string): Promise<Machine> {
  const machine = await Machine.findByPk(id, {
    transaction: tx.transaction,
    lock: tx.transaction.LOCK.UPDATE,
  });
  if (!machine) throw notFound("machine");
  return machine;
}

export async function requireFreeSerial(tx: Tx, serial: string): Promise<void> {
  const taken = await Machine.findOne({ where: { serial }, transaction: tx.transaction });
  if (taken)
    throw new ServiceError(
      "conflict",
      `A machine with the serial number ${serial} is in the fleet already. Nothing was stored.`,
      { pointer: "/serial" },
    );
}

/** A site that takes machines. */
export async function requireSite(tx: Tx, siteId: string): Promise<Site> {
  const site = await Site.findByPk(siteId, { transaction: tx.transaction });
  if (!site) throw new ServiceError("invalid", "There is no such site.", { pointer: "/siteId" });
  if (site.retiredAt)
    throw new ServiceError("invalid", `The site ${site.name} is retired and takes no machines.`, {
      pointer: "/siteId",
    });
  return site;
}

/** A model of which machines are made. */
export async function requireModelInUse(tx: Tx, modelId: string): Promise<MachineModel> {
  const model = await MachineModel.findByPk(modelId, { transaction: tx.transaction });
  if (!model) throw new ServiceError("invalid", "There is no such machine model.", { pointer: "/modelId" });
  if (model.retiredAt)
    throw new ServiceError("invalid", `The machine model ${model.code} is retired.`, {
      pointer: "/modelId",
    });
  return model;
}

/** What the record calls a machine. */
export function machineObject({ id, serial }: Machine) {
  return { type: "machine", id, label: serial };
}
