import "server-only";
import { updateSiteSchema, type SiteView, type UpdateSite } from "@/lib/schemas/sites";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { requireVersion } from "@/lib/services/kernel/versions";
import { appendRecord } from "@/lib/services/record/append";
import { enqueueRecheck } from "@/lib/services/recheck/enqueue";
import { lockSite } from "./find";
import { presentSite } from "./present";

/** Changes a site; after another ambient temperature its machines are checked again. */
export async function updateSite(
  context: Context,
  input: UpdateSite & { readonly id: string; readonly ifMatch: number | null },
): Promise<SiteView> {
  const { name, ambientC } = updateSiteSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "sites.write");
    const site = await lockSite(tx, input.id);
    requireVersion(input.ifMatch, await presentSite(site, tx.transaction));
    const before = { name: site.name, ambientC: site.ambientC };
    await site.update({ name, ambientC, version: site.version + 1 }, { transaction: tx.transaction });
    if (ambientC !== before.ambientC) await enqueueRecheck(tx, { siteId: site.id });
    await appendRecord(tx, {
      action: "site.changed",
      object: { type: "site", id: site.id, label: `${site.code} ${name}` },
      before,
      after: { name, ambientC },
    });
    return presentSite(site, tx.transaction);
  });
}
