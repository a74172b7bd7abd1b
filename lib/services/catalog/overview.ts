import "server-only";
import { QueryTypes } from "sequelize";
import type { CatalogKind } from "@/lib/domain/catalog";
import { CATALOG_KINDS } from "@/lib/domain/catalog";
import { sequelize } from "@/lib/server/sequelize";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";

export interface CatalogOverview {
  /** Items in use by kind. */
  readonly items: Readonly<Record<CatalogKind, number>>;
  readonly models: number;
  /** Models in use that have a key table. */
  readonly keyTables: number;
  /** Machines that are not retired. */
  readonly machines: number;
}

const COUNTS = `
  select kind as what, count(*)::int as count from catalog_items where retired_at is null group by kind
  union all select 'models', count(*)::int from machine_models where retired_at is null
  union all select 'keyTables', count(distinct k.model_id)::int from key_tables k
    join machine_models m on m.id = k.model_id where m.retired_at is null
  union all select 'machines', count(*)::int from machines where state <> 'retired'`;

/** How much of everything there is. */
export async function catalogOverview(context: Context): Promise<CatalogOverview> {
  authorize(context, "catalog.read");
  const rows = await sequelize.query<{ what: string; count: number }>(COUNTS, { type: QueryTypes.SELECT });
  const counts = new Map(rows.map(({ what, count }) => [what, count]));
  const of = (what: string) => counts.get(what) ?? 0;
  return {
    items: Object.fromEntries(CATALOG_KINDS.map((kind) => [kind, of(kind)])) as Record<CatalogKind, number>,
    models: of("models"),
    keyTables: of("keyTables"),
    machines: of("machines"),
  };
}
