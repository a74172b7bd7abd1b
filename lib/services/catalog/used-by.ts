import "server-only";
import { QueryTypes } from "sequelize";
import type { Transaction } from "sequelize";
import type { DifferingPart } from "@/lib/domain/catalog";
import type { ItemView } from "@/lib/schemas/catalog";
import { sequelize } from "@/lib/server/sequelize";

interface ModelUse {
  readonly id: string;
  readonly code: string;
  readonly name: string;
  readonly axis: string | null;
}

interface MachineUse {
  readonly id: string;
  readonly serial: string;
  readonly axis: string | null;
  readonly part: DifferingPart;
}

const IN_MODELS = `
  select m.id, m.code, m.name, a.axis
  from machine_models m
  join machine_model_versions v on v.model_id = m.id and v.version = m.version
  left join axes a on a.model_version_id = v.id
    and $1::uuid in (a.motor_id, a.driver_id, a.drive_train_id, a.mount_id)
  where $1::uuid in (v.supply_id, v.controller_board_id) or a.axis is not null
  order by m.code, a.position`;

const ON_MACHINES = `
  select m.id, m.serial, h.axis, h.part
  from machine_hardware h join machines m on m.id = h.machine_id
  where h.item_id = $1::uuid and h.ended_at is null and m.state <> 'retired'
  order by m.serial limit 500`;

/** Models whose newest version names the item, and machines that have it recorded as their own. */
export async function usedBy(id: string, transaction?: Transaction): Promise<ItemView["usedBy"]> {
  const select = { type: QueryTypes.SELECT as const, bind: [id], transaction: transaction ?? null };
  const uses = await sequelize.query<ModelUse>(IN_MODELS, select);
  const machines = await sequelize.query<MachineUse>(ON_MACHINES, select);
  const models = new Map<string, ItemView["usedBy"]["models"][number]>();
  for (const { axis, ...model } of uses) {
    const found = models.get(model.id) ?? { ...model, axes: [] };
    models.set(model.id, axis === null ? found : { ...found, axes: [...found.axes, axis] });
  }
  return { models: [...models.values()], machines };
}
