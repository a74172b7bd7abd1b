import "server-only";
import type { WhereOptions } from "sequelize";
import { literal, Op } from "sequelize";
import type { SheetPage, SheetQuery } from "@/lib/schemas/test-sheets";
import { Machine } from "@/models/machines";
import { TestSheet } from "@/models/test-sheets";
import { containing, pageBounds } from "@/lib/services/catalog/filters";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { sheetRows } from "./present";

const CLOSED = literal("(select sheet_id from test_closings)");

/** Test sheets, the newest first. */
export async function listSheets(context: Context, query: SheetQuery): Promise<SheetPage> {
  authorize(context, "test_sheets.read");
  const { rows, count } = await TestSheet.findAndCountAll({
    where: await whereOf(query),
    order: [["number", "DESC"]],
    ...pageBounds(query),
  });
  return { items: await sheetRows(rows), page: query.page, pageSize: query.pageSize, total: count };
}

async function whereOf({ machineId, changeId, axis, state, q }: SheetQuery): Promise<WhereOptions> {
  const conditions: WhereOptions[] = [
    {
      ...(machineId ? { machineId } : {}),
      ...(changeId ? { changeId } : {}),
      ...(axis ? { axis: { [Op.iLike]: containing(axis).slice(1, -1) } } : {}),
    },
  ];
  if (state !== "all") conditions.push({ id: { [state === "open" ? Op.notIn : Op.in]: CLOSED } });
  if (q) {
    const machines = await Machine.findAll({
      where: { serial: { [Op.iLike]: containing(q) } },
      attributes: ["id"],
    });
    conditions.push({ machineId: machines.map(({ id }) => id) });
  }
  return { [Op.and]: conditions };
}
