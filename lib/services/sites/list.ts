import "server-only";
import { Op } from "sequelize";
import type { SiteList, SiteQuery } from "@/lib/schemas/sites";
import { Site } from "@/models/catalog";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { presentSites } from "./present";

/** Sites by code. */
export async function listSites(context: Context, { retired }: SiteQuery): Promise<SiteList> {
  authorize(context, "catalog.read");
  const where = { yes: { retiredAt: { [Op.ne]: null } }, no: { retiredAt: null }, all: {} }[retired];
  const sites = await Site.findAll({ where, order: [["code", "ASC"]] });
  return { items: await presentSites(sites) };
}
