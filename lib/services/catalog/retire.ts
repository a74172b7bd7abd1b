import "server-only";
import type { ItemView } from "@/lib/schemas/catalog";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { lockItem, type ItemIdentity } from "./find";
import { itemView } from "./show";

/** Takes an item out of use, or back into use. Models and machines that have it keep it; it is no longer offered. */
export async function retireItem(
  context: Context,
  input: ItemIdentity & { readonly retired: boolean },
): Promise<ItemView> {
  return withTransaction(context, async (tx) => {
    authorize(tx, "catalog.write");
    const item = await lockItem(tx, input);
    const was = item.retiredAt;
    if ((was !== null) === input.retired) return itemView(input, tx.transaction);
    await item.update({ retiredAt: input.retired ? tx.now : null }, { transaction: tx.transaction });
    await appendRecord(tx, {
      action: input.retired ? "catalog.retired" : "catalog.taken_back_into_use",
      object: { type: "catalog_item", id: item.id, label: `${item.code} ${item.name}` },
      before: { retiredAt: was },
      after: { retiredAt: item.retiredAt },
    });
    return itemView(input, tx.transaction);
  });
}
