import "server-only";
import type { Transaction } from "sequelize";
import { QueryTypes } from "sequelize";
import type { SiteView } from "@/lib/schemas/sites";
import { sequelize } from "@/lib/server/sequelize";
import type { Site } from "@/models/catalog";

async function machineCounts(
  siteIds: readonly string[],
  transaction: Transaction | null,
): Promise<Map<string, number>> {
  const rows = await sequelize.query<{ siteId: string; machines: number }>(
    `select site_id as "siteId", count(*)::int as machines from machines
     where site_id = any($1::uuid[]) and state <> 'retired' group by site_id`,
    { type: QueryTypes.SELECT, bind: [siteIds], transaction },
  );
  return new Map(rows.map(({ siteId, machines }) => [siteId, machines]));
}

export async function presentSites(sites: readonly Site[], transaction?: Transaction): Promise<SiteView[]> {
  const ids = sites.map((site) => site.id);
  const counts = await machineCounts(ids, transaction ?? null);
  return sites.map((site) => ({
    id: site.id,
    code: site.code,
    name: site.name,
    ambientC: site.ambientC,
    version: site.version,
    retiredAt: site.retiredAt?.toISOString() ?? null,
    machines: counts.get(site.id) ?? 0,
  }));
}

export async function presentSite(site: Site, transaction?: Transaction): Promise<SiteView> {
  const [view] = await presentSites([site], transaction);
  if (!view) throw new Error("A site that was just loaded is presented.");
  return view;
}
