import "server-only";
import type { Transaction } from "sequelize";
import type { ModelVersion, ModelView } from "@/lib/schemas/machine-models";
import { Axis, MachineModel, MachineModelVersion } from "@/models/catalog";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { hardwareOf } from "@/lib/services/machines/assembly";
import { itemIdsOf, itemsById } from "./hardware-items";
import { modelRows } from "./rows";

/** One machine model with every version of its hardware, newest first. */
export async function showModel(context: Context, id: string): Promise<ModelView> {
  authorize(context, "catalog.read");
  return modelView(id);
}

/** The same for an act that answers with what it has made of the model. */
export async function modelView(id: string, transaction?: Transaction): Promise<ModelView> {
  const model = await MachineModel.findByPk(id, { transaction: transaction ?? null });
  if (!model) throw notFound("machine model");
  const versions = await modelVersions(id, transaction);
  const [row] = await modelRows([model], transaction);
  const newest = versions[0];
  if (!row || !newest) throw notFound("machine model");
  const named = versions.flatMap(({ hardware }) => itemIdsOf(hardware));
  const items = await itemsById(named, transaction);
  return {
    ...row,
    hardware: newest.hardware,
    items: items.map(({ id: itemId, kind, code, name, retiredAt }) => ({
      id: itemId,
      kind,
      code,
      name,
      retired: retiredAt !== null,
    })),
    versions,
  };
}

async function modelVersions(modelId: string, transaction?: Transaction): Promise<ModelVersion[]> {
  const rows = await MachineModelVersion.findAll({
    where: { modelId },
    include: [{ model: Axis, as: "axes" }],
    order: [
      ["version", "DESC"],
      [{ model: Axis, as: "axes" }, "position", "ASC"],
    ],
    transaction: transaction ?? null,
  });
  return rows.map((row) => ({
    version: row.version,
    hardware: hardwareOf(row),
    createdByName: row.createdByName,
    createdAt: row.createdAt.toISOString(),
  }));
}
