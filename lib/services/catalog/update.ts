import "server-only";
import { updateItemSchema, type ItemView, type UpdateItem } from "@/lib/schemas/catalog";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { requireVersion } from "@/lib/services/kernel/versions";
import { appendRecord } from "@/lib/services/record/append";
import { enqueueRecheck } from "@/lib/services/recheck/enqueue";
import { lockItem, type ItemIdentity } from "./find";
import { readItemData } from "./item-data";
import { itemView } from "./show";
import { storeVersion } from "./store-version";

/** Saves a new version; machines that have the item are checked again. */
export async function updateItem(
  context: Context,
  input: UpdateItem & ItemIdentity & { readonly ifMatch: number | null },
): Promise<ItemView> {
  const { name, data: typed, evidence } = updateItemSchema.parse(input);
  const data = readItemData(input.kind, typed);
  return withTransaction(context, async (tx) => {
    authorize(tx, "catalog.write");
    const item = await lockItem(tx, input);
    const before = await itemView(input, tx.transaction);
    requireVersion(input.ifMatch, before);
    await item.update({ name, version: item.version + 1 }, { transaction: tx.transaction });
    await storeVersion(tx, item, { data, evidence });
    await enqueueRecheck(tx, { itemId: item.id });
    await appendRecord(tx, {
      action: "catalog.saved",
      object: { type: "catalog_item", id: item.id, label: `${item.code} ${name}` },
      before: { version: before.version, name: before.name, data: before.data, evidence: before.evidence },
      after: { version: item.version, name, data, evidence },
    });
    return itemView(input, tx.transaction);
  });
}
