import "server-only";
import { saveKeyTableSchema, type KeyTableView, type SaveKeyTable } from "@/lib/schemas/key-tables";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { requireVersion } from "@/lib/services/kernel/versions";
import { lockModel } from "@/lib/services/models/find";
import { appendRecord } from "@/lib/services/record/append";
import { currentKeyTable } from "./current";
import { requireKnownAxes, saveRules } from "./save-rules";
import { keyTableView } from "./show";

/** Saves a whole key table as its next version. The first one is saved upon version 0. */
export async function saveKeyTable(
  context: Context,
  input: SaveKeyTable & { readonly ifMatch: number | null },
): Promise<KeyTableView> {
  const { modelId, rules, note } = saveKeyTableSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "key_tables.write");
    const model = await lockModel(tx, modelId);
    const current = await currentKeyTable(modelId, tx.transaction);
    requireVersion(input.ifMatch, current);
    await requireKnownAxes(tx, { model, rules, pointer: (index) => `/rules/${index}` });
    await saveRules(tx, { model, current, rules, note });
    await appendRecord(tx, {
      action: "key_table.saved",
      object: { type: "machine_model", id: modelId, label: `${model.code} ${model.name}` },
      before: { version: current.version, rules: current.table.rules },
      after: { version: current.version + 1, rules },
      reason: note || null,
    });
    return keyTableView(modelId, tx.transaction);
  });
}
