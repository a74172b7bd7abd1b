import "server-only";
import type { SiteView } from "@/lib/schemas/sites";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { lockSite } from "./find";
import { presentSite } from "./present";

/** Takes a site out of use, or back into use. A site with machines stays in use. */
export async function retireSite(
  context: Context,
  input: { readonly id: string; readonly retired: boolean },
): Promise<SiteView> {
  return withTransaction(context, async (tx) => {
    authorize(tx, "sites.write");
    const site = await lockSite(tx, input.id);
    const before = await presentSite(site, tx.transaction);
    if ((site.retiredAt !== null) === input.retired) return before;
    if (input.retired && before.machines > 0)
      throw new ServiceError(
        "conflict",
        `${before.machines === 1 ? "1 machine is" : `${before.machines} machines are`} still at ${site.name}. Move or retire them first; nothing was changed.`,
      );
    await site.update(
      { retiredAt: input.retired ? tx.now : null, version: site.version + 1 },
      { transaction: tx.transaction },
    );
    await appendRecord(tx, {
      action: input.retired ? "site.retired" : "site.taken_back_into_use",
      object: { type: "site", id: site.id, label: `${site.code} ${site.name}` },
      before: { retiredAt: before.retiredAt },
      after: { retiredAt: site.retiredAt },
    });
    return presentSite(site, tx.transaction);
  });
}
