import "server-only";
import { updateModelSchema, type ModelView, type UpdateModel } from "@/lib/schemas/machine-models";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { requireVersion } from "@/lib/services/kernel/versions";
import { appendRecord } from "@/lib/services/record/append";
import { enqueueRecheck } from "@/lib/services/recheck/enqueue";
import { lockModel } from "./find";
import { itemIdsOf, requireFittingItems } from "./hardware-items";
import { modelView } from "./show";
import { storeModelVersion } from "./store-version";

/** Saves a new version of the model's hardware; its machines are checked again. */
export async function updateModel(
  context: Context,
  input: UpdateModel & { readonly id: string; readonly ifMatch: number | null },
): Promise<ModelView> {
  const { name, hardware } = updateModelSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "models.write");
    const model = await lockModel(tx, input.id);
    const before = await modelView(input.id, tx.transaction);
    requireVersion(input.ifMatch, before);
    await requireFittingItems(tx, hardware, new Set(itemIdsOf(before.hardware)));
    await model.update({ name, version: model.version + 1 }, { transaction: tx.transaction });
    await storeModelVersion(tx, model, hardware);
    await enqueueRecheck(tx, { modelId: model.id });
    await appendRecord(tx, {
      action: "model.saved",
      object: { type: "machine_model", id: model.id, label: `${model.code} ${name}` },
      before: { version: before.version, name: before.name, hardware: before.hardware },
      after: { version: model.version, name, hardware },
    });
    return modelView(input.id, tx.transaction);
  });
}
