import "server-only";
import { createSiteSchema, type CreateSite, type SiteView } from "@/lib/schemas/sites";
import { Site } from "@/models/catalog";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { presentSite } from "./present";

export async function createSite(context: Context, input: CreateSite): Promise<SiteView> {
  const { code, name, ambientC } = createSiteSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "sites.write");
    const taken = await Site.findOne({ where: { code }, transaction: tx.transaction });
    if (taken)
      throw new ServiceError(
        "conflict",
        `The site ${taken.name} has the code ${code} already. Choose another code.`,
        { pointer: "/code" },
      );
    const site = await Site.create({ code, name, ambientC }, { transaction: tx.transaction });
    await appendRecord(tx, {
      action: "site.added",
      object: { type: "site", id: site.id, label: `${code} ${name}` },
      after: { code, name, ambientC },
    });
    return presentSite(site, tx.transaction);
  });
}
