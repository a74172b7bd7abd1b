import "server-only";
import type { WhereOptions } from "sequelize";
import { Op } from "sequelize";
import type { ReadingPage, ReadingQuery } from "@/lib/schemas/readings";
import { Machine } from "@/models/machines";
import { Reading } from "@/models/revisions";
import { containing, pageBounds } from "@/lib/services/catalog/filters";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { readingRows } from "./rows";

/** Readings, the newest first. */
export async function listReadings(context: Context, query: ReadingQuery): Promise<ReadingPage> {
  authorize(context, "readings.read");
  const { rows, count } = await Reading.findAndCountAll({
    where: await whereOf(query),
    order: [
      ["readAt", "DESC"],
      ["receivedAt", "DESC"],
      ["id", "ASC"],
    ],
    ...pageBounds(query),
  });
  return { items: await readingRows(rows), page: query.page, pageSize: query.pageSize, total: count };
}

async function whereOf({ machineId, modelId, siteId, q, kind, layer }: ReadingQuery): Promise<WhereOptions> {
  const own = { ...(kind ? { kind } : {}), ...(layer ? { layer } : {}), ...(machineId ? { machineId } : {}) };
  if (!modelId && !siteId && !q) return own;
  const machines = await Machine.findAll({
    where: {
      ...(modelId ? { modelId } : {}),
      ...(siteId ? { siteId } : {}),
      ...(q ? { serial: { [Op.iLike]: containing(q) } } : {}),
    },
    attributes: ["id"],
  });
  return { [Op.and]: [own, { machineId: machines.map(({ id }) => id) }] };
}
