import "server-only";
import { Site } from "@/models/catalog";
import type { Tx } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";

/** The site's row, locked until the act is over. */
export async function lockSite(tx: Tx, id: string): Promise<Site> {
  const site = await Site.findByPk(id, { transaction: tx.transaction, lock: tx.transaction.LOCK.UPDATE });
  if (!site) throw notFound("site");
  return site;
}
