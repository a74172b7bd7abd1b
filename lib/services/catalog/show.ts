import "server-only";
import type { Transaction } from "sequelize";
import { CATALOG_KIND_WORDS } from "@/lib/domain/catalog";
import type { ItemView } from "@/lib/schemas/catalog";
import { CatalogItem, CatalogVersion } from "@/models/catalog";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import type { ItemIdentity } from "./find";
import { presentItem, presentVersion } from "./present";
import { usedBy } from "./used-by";

/** One item with every version, newest first, and where it is used. */
export async function showItem(context: Context, identity: ItemIdentity): Promise<ItemView> {
  authorize(context, "catalog.read");
  return itemView(identity);
}

/** The same for an act that answers with what it has made of the item. */
export async function itemView({ kind, id }: ItemIdentity, transaction?: Transaction): Promise<ItemView> {
  const within = { transaction: transaction ?? null };
  const item = await CatalogItem.findOne({ where: { id, kind }, ...within });
  if (!item) throw notFound(CATALOG_KIND_WORDS[kind].one);
  const versions = await CatalogVersion.findAll({
    where: { itemId: id },
    order: [["version", "DESC"]],
    ...within,
  });
  return {
    ...presentItem(item, versions[0]),
    versions: versions.map(presentVersion),
    usedBy: await usedBy(id, transaction),
  };
}
