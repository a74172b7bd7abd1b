import "server-only";
import type { Transaction } from "sequelize";
import type { KeyTableView } from "@/lib/schemas/key-tables";
import { KeyTableVersion, MachineModel } from "@/models/catalog";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";

/** The key table of a model with every version, newest first. */
export async function showKeyTable(context: Context, modelId: string): Promise<KeyTableView> {
  authorize(context, "catalog.read");
  if (!(await MachineModel.findByPk(modelId, { attributes: ["id"] }))) throw notFound("machine model");
  return keyTableView(modelId);
}

/** The same for an act that answers with what it has made of the table. */
export async function keyTableView(modelId: string, transaction?: Transaction): Promise<KeyTableView> {
  const rows = await KeyTableVersion.findAll({
    where: { modelId },
    order: [["version", "DESC"]],
    transaction: transaction ?? null,
  });
  const versions = rows.map(({ version, rules, note, createdByName, createdAt }) => ({
    version,
    rules,
    note,
    createdByName,
    createdAt: createdAt.toISOString(),
  }));
  return { modelId, version: versions[0]?.version ?? 0, rules: versions[0]?.rules ?? [], versions };
}
