import "server-only";
import type { KeyRule } from "@/lib/domain/key-table";
import { setBasisSchema, type KeyTableView, type SetBasis } from "@/lib/schemas/key-tables";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { lockModel } from "@/lib/services/models/find";
import { appendRecord } from "@/lib/services/record/append";
import { currentKeyTable } from "./current";
import { saveRules } from "./save-rules";
import { keyTableView } from "./show";

/** Whether a rule is meant by its own key or by the full key of a text that it maps. */
function maps(rule: KeyRule, key: string): boolean {
  if (rule.key.toLowerCase() === key.toLowerCase()) return true;
  const parts = rule.key.split("{axis}").map((part) => part.replace(/[.*+?^${}()|[\]\\]/g, "\\$&"));
  return new RegExp(`^${parts.join("[^.]+")}$`, "i").test(key);
}

/** Remembers, for every text of the model, whether the current of a key is peak or rms: asked once. */
export async function setBasis(
  context: Context,
  input: SetBasis & { readonly modelId: string },
): Promise<KeyTableView> {
  const { modelId } = input;
  const { key, parameter, basis } = setBasisSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "key_tables.write");
    const model = await lockModel(tx, modelId);
    const current = await currentKeyTable(modelId, tx.transaction);
    const meant = current.table.rules.filter((rule) => rule.parameter === parameter && maps(rule, key));
    if (meant.length === 0)
      throw new ServiceError(
        "invalid",
        `The key table of ${model.code} has no row that makes “${key}” a current. Nothing was stored; map the key first.`,
        { pointer: "/key" },
      );
    if (meant.every((rule) => rule.basis === basis)) return keyTableView(modelId, tx.transaction);
    const rules = current.table.rules.map((rule) => (meant.includes(rule) ? { ...rule, basis } : rule));
    await saveRules(tx, { model, current, rules, note: `${key} is ${basis}` });
    await appendRecord(tx, {
      action: "key_table.basis_set",
      object: { type: "machine_model", id: modelId, label: `${model.code} ${model.name}` },
      before: { version: current.version, rules: meant },
      after: { version: current.version + 1, key, parameter, basis },
    });
    return keyTableView(modelId, tx.transaction);
  });
}
