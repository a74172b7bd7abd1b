import "server-only";
import type { SiteView } from "@/lib/schemas/sites";
import { Site } from "@/models/catalog";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { presentSite } from "./present";

export async function showSite(context: Context, { id }: { readonly id: string }): Promise<SiteView> {
  authorize(context, "catalog.read");
  const site = await Site.findByPk(id);
  if (!site) throw notFound("site");
  return presentSite(site);
}
