import "server-only";
import type { HardwareFact } from "@/lib/domain/catalog";
import { CATALOG_KIND_WORDS, catalogKindSchema } from "@/lib/domain/catalog";
import {
  recordHardwareSchema,
  type MachineHardwareView,
  type RecordHardware,
} from "@/lib/schemas/machines-write";
import { CatalogItem } from "@/models/catalog";
import type { Machine } from "@/models/machines";
import { MachineHardware } from "@/models/machines";
import type { Context, Tx } from "@/lib/services/kernel/context";
import { authorize, personBehind } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { enqueueRecheck } from "@/lib/services/recheck/enqueue";
import { modelHardware } from "./assembly";
import { requireFittingData } from "./fact-data";
import { lockMachine, machineObject } from "./find";
import { hardwareView } from "./list-hardware";

/** Records hardware that differs from the model. One fact stands for an axis and a part: the one before it ends. */
export async function recordHardware(
  context: Context,
  input: RecordHardware & { readonly id: string },
): Promise<MachineHardwareView> {
  const typed = recordHardwareSchema.parse(input);
  requireSomething(typed);
  requireFittingData(typed);
  return withTransaction(context, async (tx) => {
    authorize(tx, "machines.hardware");
    const machine = await lockMachine(tx, input.id);
    const fact = { ...typed, axis: await axisOfModel(tx, machine, typed) };
    await requireItemOfPart(tx, fact);
    const ended = await endStanding(tx, machine, fact);
    await MachineHardware.create(
      {
        machineId: machine.id,
        ...fact,
        recordedBy: personBehind(tx.actor),
        recordedByName: tx.actor.name,
        recordedAt: tx.now,
      },
      { transaction: tx.transaction },
    );
    await machine.update({ version: machine.version + 1 }, { transaction: tx.transaction });
    await enqueueRecheck(tx, { machineIds: [machine.id] });
    await appendRecord(tx, {
      action: "machine.hardware_recorded",
      object: machineObject(machine),
      machineId: machine.id,
      before: ended,
      after: fact,
      reason: fact.evidence,
    });
    return hardwareView(machine, tx.transaction);
  });
}

function requireSomething({ itemId, data }: HardwareFact): void {
  if (itemId === null && Object.keys(data).length === 0)
    throw new ServiceError("invalid", "Choose the item that is fitted, or give at least one value.", {
      pointer: "/itemId",
    });
}

/** The axis as the model spells it; null for a part of the machine, or for every axis. */
async function axisOfModel(tx: Tx, machine: Machine, { axis, part }: HardwareFact): Promise<string | null> {
  if (axis === null) return null;
  const pointer = "/axis";
  if (part === "supply" || part === "controller_board")
    throw new ServiceError(
      "invalid",
      `A ${CATALOG_KIND_WORDS[part].one} belongs to the machine, not to an axis.`,
      {
        pointer,
      },
    );
  const { axes } = await modelHardware(machine.modelId, tx.transaction);
  const own = axes.find((known) => known.axis.toLowerCase() === axis.toLowerCase());
  if (!own) throw new ServiceError("invalid", `The machine has no axis “${axis}”.`, { pointer });
  return own.axis;
}

async function requireItemOfPart(tx: Tx, { part, itemId }: HardwareFact): Promise<void> {
  if (itemId === null) return;
  const pointer = "/itemId";
  const kind = catalogKindSchema.safeParse(part).data;
  if (!kind)
    throw new ServiceError("invalid", "This part is not in the catalog; give its values instead.", {
      pointer,
    });
  const item = await CatalogItem.findByPk(itemId, { transaction: tx.transaction });
  const { one } = CATALOG_KIND_WORDS[kind];
  if (!item) throw new ServiceError("invalid", `This ${one} is not in the catalog.`, { pointer });
  if (item.kind !== kind)
    throw new ServiceError(
      "invalid",
      `${item.code} is a ${CATALOG_KIND_WORDS[item.kind].one}; a ${one} belongs here. Nothing was stored.`,
      { pointer },
    );
}

async function endStanding(tx: Tx, machine: Machine, { axis, part }: HardwareFact) {
  const standing = await MachineHardware.findOne({
    where: { machineId: machine.id, axis, part, endedAt: null },
    transaction: tx.transaction,
  });
  if (!standing) return null;
  await standing.update({ endedAt: tx.now }, { transaction: tx.transaction });
  const { itemId, data, evidence } = standing;
  return { axis, part, itemId, data, evidence };
}
