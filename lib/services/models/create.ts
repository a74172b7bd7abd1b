import "server-only";
import { createModelSchema, type CreateModel, type ModelView } from "@/lib/schemas/machine-models";
import { MachineModel } from "@/models/catalog";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { requireFreeModelCode } from "./find";
import { requireFittingItems } from "./hardware-items";
import { modelView } from "./show";
import { storeModelVersion } from "./store-version";

export async function createModel(context: Context, input: CreateModel): Promise<ModelView> {
  const { code, name, hardware } = createModelSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "models.write");
    await requireFreeModelCode(tx, code);
    await requireFittingItems(tx, hardware, new Set());
    const model = await MachineModel.create({ code, name }, { transaction: tx.transaction });
    await storeModelVersion(tx, model, hardware);
    await appendRecord(tx, {
      action: "model.created",
      object: { type: "machine_model", id: model.id, label: `${code} ${name}` },
      after: { code, name, hardware },
    });
    return modelView(model.id, tx.transaction);
  });
}
