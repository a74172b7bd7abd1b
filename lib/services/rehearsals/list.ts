import "server-only";
import type { z } from "zod";
import type { rehearsalQuery, RehearsalPage } from "@/lib/schemas/rehearsals";
import { Rehearsal } from "@/models/rehearsals";
import { pageBounds } from "@/lib/services/catalog/filters";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { rehearsalRows } from "./present";

/** Rehearsals, the newest first. */
export async function listRehearsals(
  context: Context,
  query: z.output<typeof rehearsalQuery>,
): Promise<RehearsalPage> {
  authorize(context, "rehearsals.read");
  const { rows, count } = await Rehearsal.findAndCountAll({
    order: [
      ["startedAt", "DESC"],
      ["id", "ASC"],
    ],
    ...pageBounds(query),
  });
  return { items: await rehearsalRows(rows), page: query.page, pageSize: query.pageSize, total: count };
}
