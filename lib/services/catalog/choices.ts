import "server-only";
import { QueryTypes } from "sequelize";
import { sequelize } from "@/lib/server/sequelize";
import type { ItemChoice } from "@/lib/schemas/catalog";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";

const CHOICES = `
  select i.id, i.kind, i.code, i.name, i.retired_at is not null as retired,
    case when i.kind = 'drive_train' then v.data->>'kind' end as "driveTrainKind"
  from catalog_items i join catalog_versions v on v.item_id = i.id and v.version = i.version
  order by i.kind, i.code`;

/** Every item of the catalog in short, for forms that choose one; retired ones are marked. */
export async function itemChoices(context: Context): Promise<ItemChoice[]> {
  authorize(context, "catalog.read");
  return sequelize.query<ItemChoice>(CHOICES, { type: QueryTypes.SELECT });
}
