import "server-only";
import { copySchema, type Copy, type ItemView } from "@/lib/schemas/catalog";
import { CatalogItem } from "@/models/catalog";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { requireFreeCode, type ItemIdentity } from "./find";
import { itemView } from "./show";
import { storeVersion } from "./store-version";

/** A new item with the newest data of another; its evidence says which. */
export async function copyItem(context: Context, input: Copy & ItemIdentity): Promise<ItemView> {
  const { kind } = input;
  const { code, name } = copySchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "catalog.write");
    const original = await itemView(input, tx.transaction);
    await requireFreeCode(tx, { kind, code });
    const item = await CatalogItem.create({ kind, code, name }, { transaction: tx.transaction });
    const source = `Copied from ${original.code}, version ${original.version}. ${original.evidence}`;
    await storeVersion(tx, item, { data: original.data, evidence: source.slice(0, 1000) });
    await appendRecord(tx, {
      action: "catalog.copied",
      object: { type: "catalog_item", id: item.id, label: `${code} ${name}` },
      before: { id: original.id, code: original.code, version: original.version },
      after: { kind, code, name },
    });
    return itemView(item, tx.transaction);
  });
}
