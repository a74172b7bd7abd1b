import "server-only";
import type { ModelView } from "@/lib/schemas/machine-models";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { lockModel } from "./find";
import { modelView } from "./show";

/** Takes a model out of use, or back into use. Its machines stay; no machine can be added while it is retired. */
export async function retireModel(
  context: Context,
  input: { readonly id: string; readonly retired: boolean },
): Promise<ModelView> {
  return withTransaction(context, async (tx) => {
    authorize(tx, "models.write");
    const model = await lockModel(tx, input.id);
    const was = model.retiredAt;
    if ((was !== null) === input.retired) return modelView(input.id, tx.transaction);
    await model.update({ retiredAt: input.retired ? tx.now : null }, { transaction: tx.transaction });
    await appendRecord(tx, {
      action: input.retired ? "model.retired" : "model.taken_back_into_use",
      object: { type: "machine_model", id: model.id, label: `${model.code} ${model.name}` },
      before: { retiredAt: was },
      after: { retiredAt: model.retiredAt },
    });
    return modelView(input.id, tx.transaction);
  });
}
