import "server-only";
import type { ModelPage, ModelQuery } from "@/lib/schemas/machine-models";
import { MachineModel } from "@/models/catalog";
import { pageBounds, soughtWhere } from "@/lib/services/catalog/filters";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { modelRows } from "./rows";

/** Machine models by code. */
export async function listModels(context: Context, query: ModelQuery): Promise<ModelPage> {
  authorize(context, "catalog.read");
  const { rows, count } = await MachineModel.findAndCountAll({
    where: soughtWhere(query),
    order: [["code", "ASC"]],
    ...pageBounds(query),
  });
  return { items: await modelRows(rows), page: query.page, pageSize: query.pageSize, total: count };
}
