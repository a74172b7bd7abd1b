import "server-only";
import { QueryTypes } from "sequelize";
import type { Transaction } from "sequelize";
import type { ModelRow } from "@/lib/schemas/machine-models";
import { sequelize } from "@/lib/server/sequelize";
import type { MachineModel } from "@/models/catalog";

interface Extras {
  readonly id: string;
  readonly axes: string[];
  readonly machines: number;
  readonly keyTableVersion: number;
}

const EXTRAS = `
  select m.id,
    coalesce((select array_agg(a.axis order by a.position) from axes a
      join machine_model_versions v on v.id = a.model_version_id
      where v.model_id = m.id and v.version = m.version), '{}') as axes,
    (select count(*)::int from machines x where x.model_id = m.id and x.state <> 'retired') as machines,
    coalesce((select max(k.version) from key_tables k where k.model_id = m.id), 0)::int as "keyTableVersion"
  from machine_models m where m.id = any($1::uuid[])`;

/** Models with their axes, the count of their machines and the version of their key table, in one query. */
export async function modelRows(
  models: readonly MachineModel[],
  transaction?: Transaction,
): Promise<ModelRow[]> {
  const extras = await sequelize.query<Extras>(EXTRAS, {
    type: QueryTypes.SELECT,
    bind: [models.map(({ id }) => id)],
    ...(transaction ? { transaction } : {}),
  });
  const byId = new Map(extras.map((extra) => [extra.id, extra]));
  return models.map((model) => {
    const extra = byId.get(model.id);
    return {
      id: model.id,
      code: model.code,
      name: model.name,
      version: model.version,
      retiredAt: model.retiredAt?.toISOString() ?? null,
      axes: extra?.axes ?? [],
      machines: extra?.machines ?? 0,
      keyTableVersion: extra?.keyTableVersion ?? 0,
    };
  });
}
