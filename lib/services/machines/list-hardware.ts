import "server-only";
import type { Transaction } from "sequelize";
import type { HardwareFactView, MachineHardwareView } from "@/lib/schemas/machines-write";
import type { CatalogItem } from "@/models/catalog";
import { Machine, MachineHardware } from "@/models/machines";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { itemsById } from "@/lib/services/models/hardware-items";

/** The hardware recorded on a machine, with its evidence: what stands first, then what stood, newest first. */
export async function listHardware(context: Context, machineId: string): Promise<MachineHardwareView> {
  authorize(context, "machines.read");
  const machine = await Machine.findByPk(machineId);
  if (!machine) throw notFound("machine");
  return hardwareView(machine);
}

/** The same for an act that answers with what it has made of the hardware. */
export async function hardwareView(
  machine: Pick<Machine, "id" | "version">,
  transaction?: Transaction,
): Promise<MachineHardwareView> {
  const rows = await MachineHardware.findAll({
    where: { machineId: machine.id },
    order: [
      ["endedAt", "DESC NULLS FIRST"],
      ["recordedAt", "DESC"],
    ],
    transaction: transaction ?? null,
  });
  const items = await itemsById(
    rows.flatMap(({ itemId }) => itemId ?? []),
    transaction,
  );
  const byId = new Map(items.map((item) => [item.id, item]));
  return {
    machineId: machine.id,
    machineVersion: machine.version,
    facts: rows.map((row) => presentFact(row, byId)),
  };
}

function presentFact(row: MachineHardware, items: ReadonlyMap<string, CatalogItem>): HardwareFactView {
  const item = row.itemId === null ? undefined : items.get(row.itemId);
  return {
    id: row.id,
    axis: row.axis,
    part: row.part,
    item: item ? { id: item.id, code: item.code, name: item.name } : null,
    data: row.data,
    evidence: row.evidence,
    recordedByName: row.recordedByName,
    recordedAt: row.recordedAt.toISOString(),
    endedAt: row.endedAt?.toISOString() ?? null,
  };
}
