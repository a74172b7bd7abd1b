import "server-only";
import type { CatalogKind } from "@/lib/domain/catalog";
import { createItemSchema, type CreateItem, type ItemView } from "@/lib/schemas/catalog";
import { CatalogItem } from "@/models/catalog";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { requireFreeCode } from "./find";
import { readItemData } from "./item-data";
import { itemView } from "./show";
import { storeVersion } from "./store-version";

export async function createItem(
  context: Context,
  input: CreateItem & { readonly kind: CatalogKind },
): Promise<ItemView> {
  const { kind } = input;
  const { code, name, data: typed, evidence } = createItemSchema.parse(input);
  const data = readItemData(kind, typed);
  return withTransaction(context, async (tx) => {
    authorize(tx, "catalog.write");
    await requireFreeCode(tx, { kind, code });
    const item = await CatalogItem.create({ kind, code, name }, { transaction: tx.transaction });
    await storeVersion(tx, item, { data, evidence });
    await appendRecord(tx, {
      action: "catalog.created",
      object: { type: "catalog_item", id: item.id, label: `${code} ${name}` },
      after: { kind, code, name, data, evidence },
    });
    return itemView(item, tx.transaction);
  });
}
