import "server-only";
import { copyModelSchema, type CopyModel, type ModelView } from "@/lib/schemas/machine-models";
import { MachineModel } from "@/models/catalog";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { currentKeyTable } from "@/lib/services/key-tables/current";
import { storeKeyTableVersion } from "@/lib/services/key-tables/store-version";
import { appendRecord } from "@/lib/services/record/append";
import { requireFreeModelCode } from "./find";
import { modelView } from "./show";
import { storeModelVersion } from "./store-version";

/** A new model with the newest hardware of another and, if wanted, its key table. Baselines and machines are not copied. */
export async function copyModel(
  context: Context,
  input: CopyModel & { readonly id: string },
): Promise<ModelView> {
  const { code, name, withKeyTable } = copyModelSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "models.write");
    const original = await modelView(input.id, tx.transaction);
    await requireFreeModelCode(tx, code);
    const model = await MachineModel.create({ code, name }, { transaction: tx.transaction });
    await storeModelVersion(tx, model, original.hardware);
    const { version, table } = await currentKeyTable(input.id, tx.transaction);
    if (withKeyTable && version > 0)
      await storeKeyTableVersion(tx, {
        modelId: model.id,
        version: 1,
        rules: table.rules,
        note: `Copied from ${original.code}, version ${version}`,
      });
    await appendRecord(tx, {
      action: "model.copied",
      object: { type: "machine_model", id: model.id, label: `${code} ${name}` },
      before: { id: original.id, code: original.code, version: original.version },
      after: { code, name, withKeyTable },
    });
    return modelView(model.id, tx.transaction);
  });
}
