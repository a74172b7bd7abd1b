import "server-only";
import { Op } from "sequelize";
import type { CatalogKind } from "@/lib/domain/catalog";
import type { ItemPage, ItemQuery } from "@/lib/schemas/catalog";
import { CatalogItem, CatalogVersion } from "@/models/catalog";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { pageBounds, soughtWhere } from "./filters";
import { presentItem } from "./present";

/** Items of one kind with their newest data, by code. */
export async function listItems(
  context: Context,
  { kind, ...query }: ItemQuery & { readonly kind: CatalogKind },
): Promise<ItemPage> {
  authorize(context, "catalog.read");
  const { rows, count } = await CatalogItem.findAndCountAll({
    where: { [Op.and]: [{ kind }, soughtWhere(query)] },
    order: [["code", "ASC"]],
    ...pageBounds(query),
  });
  const versions = await CatalogVersion.findAll({
    where: { [Op.or]: rows.map(({ id, version }) => ({ itemId: id, version })) },
  });
  const newest = new Map(versions.map((version) => [version.itemId, version]));
  return {
    items: rows.map((item) => presentItem(item, newest.get(item.id))),
    page: query.page,
    pageSize: query.pageSize,
    total: count,
  };
}
