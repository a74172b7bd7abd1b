import "server-only";
import type { KeyRule } from "@/lib/domain/key-table";
import type { MachineModel } from "@/models/catalog";
import type { Tx } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { modelHardware } from "@/lib/services/machines/assembly";
import { enqueueRecheck } from "@/lib/services/recheck/enqueue";
import type { CurrentKeyTable } from "./current";
import { storeKeyTableVersion } from "./store-version";

interface AxisCheck {
  readonly model: MachineModel;
  readonly rules: readonly KeyRule[];
  /** JSON Pointer to the rule of an index in the request. */
  readonly pointer: (index: number) => string;
}

/** Refuses a rule that names an axis which the model does not have. */
export async function requireKnownAxes(tx: Tx, { model, rules, pointer }: AxisCheck): Promise<void> {
  const { axes } = await modelHardware(model.id, tx.transaction);
  const names = new Set(axes.map(({ axis }) => axis.toLowerCase()));
  const stranger = rules.findIndex(({ axis }) => axis !== undefined && !names.has(axis.toLowerCase()));
  if (stranger < 0) return;
  throw new ServiceError(
    "invalid",
    `The model ${model.code} has no axis “${rules[stranger]?.axis ?? ""}”. Nothing was stored.`,
    { pointer: `${pointer(stranger)}/axis` },
  );
}

interface Saved {
  readonly model: MachineModel;
  readonly current: CurrentKeyTable;
  readonly rules: readonly KeyRule[];
  readonly note: string;
}

/** Stores the rules as the next version and has the model's machines checked again. */
export async function saveRules(tx: Tx, { model, current, rules, note }: Saved): Promise<void> {
  await storeKeyTableVersion(tx, { modelId: model.id, version: current.version + 1, rules, note });
  await enqueueRecheck(tx, { modelId: model.id });
}
