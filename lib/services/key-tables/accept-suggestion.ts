import "server-only";
import type { KeyRule } from "@/lib/domain/key-table";
import { acceptRuleSchema, rulePlace, type AcceptRule, type KeyTableView } from "@/lib/schemas/key-tables";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { lockModel } from "@/lib/services/models/find";
import { appendRecord } from "@/lib/services/record/append";
import { currentKeyTable } from "./current";
import { requireKnownAxes, saveRules } from "./save-rules";
import { keyTableView } from "./show";

function describe({ key, parameter }: KeyRule): string {
  return `${key} is ${parameter}`;
}

/** Adds one rule. The same rule once more changes nothing; another meaning of a key that is mapped is refused. */
export async function acceptSuggestion(
  context: Context,
  input: AcceptRule & { readonly modelId: string },
): Promise<KeyTableView> {
  const { modelId } = input;
  const { rule } = acceptRuleSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "key_tables.write");
    const model = await lockModel(tx, modelId);
    const current = await currentKeyTable(modelId, tx.transaction);
    const { rules } = current.table;
    const twin = rules.find((known) => rulePlace(known) === rulePlace(rule));
    if (twin?.parameter === rule.parameter) return keyTableView(modelId, tx.transaction);
    if (twin)
      throw new ServiceError(
        "conflict",
        `The key table says already that ${describe(twin)}. Nothing was stored; change that row in the key table.`,
        { pointer: "/rule/key" },
      );
    await requireKnownAxes(tx, { model, rules: [rule], pointer: () => "/rule" });
    const note = `Accepted: ${describe(rule)}`;
    await saveRules(tx, { model, current, rules: [...rules, rule], note });
    await appendRecord(tx, {
      action: "key_table.rule_accepted",
      object: { type: "machine_model", id: modelId, label: `${model.code} ${model.name}` },
      before: { version: current.version },
      after: { version: current.version + 1, rule },
    });
    return keyTableView(modelId, tx.transaction);
  });
}
