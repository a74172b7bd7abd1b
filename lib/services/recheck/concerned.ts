import "server-only";
import { QueryTypes } from "sequelize";
import { z } from "zod";
import { sequelize } from "@/lib/server/sequelize";

/** What an act bears on: the machines of a model or a site, those that have an item, named ones, or the fleet. */
export const concernSchema = z.union([
  z.object({ modelId: z.uuid() }),
  z.object({ siteId: z.uuid() }),
  z.object({ itemId: z.uuid() }),
  z.object({ machineIds: z.array(z.uuid()) }),
  z.object({ all: z.literal(true) }),
]);
export type RecheckConcern = z.infer<typeof concernSchema>;

const WITH_ITEM = `
  m.id in (select machine_id from machine_hardware where item_id = $1::uuid and ended_at is null)
  or m.model_id in (
    select v.model_id from machine_model_versions v
    join machine_models mm on mm.id = v.model_id and mm.version = v.version
    left join axes a on a.model_version_id = v.id
    where $1::uuid in (v.supply_id, v.controller_board_id, a.motor_id, a.driver_id, a.drive_train_id, a.mount_id))`;

function condition(concern: RecheckConcern): { readonly where: string; readonly bind: unknown[] } {
  if ("modelId" in concern) return { where: "m.model_id = $1::uuid", bind: [concern.modelId] };
  if ("siteId" in concern) return { where: "m.site_id = $1::uuid", bind: [concern.siteId] };
  if ("itemId" in concern) return { where: WITH_ITEM, bind: [concern.itemId] };
  if ("machineIds" in concern) return { where: "m.id = any($1::uuid[])", bind: [concern.machineIds] };
  return { where: "true", bind: [] };
}

/** The machines concerned, retired ones left out. */
export async function machinesConcerned(concern: RecheckConcern): Promise<string[]> {
  const { where, bind } = condition(concern);
  const rows = await sequelize.query<{ id: string }>(
    `select m.id from machines m where m.state <> 'retired' and (${where}) order by m.serial`,
    { type: QueryTypes.SELECT, bind },
  );
  return rows.map(({ id }) => id);
}
