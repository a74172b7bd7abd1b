import { QueryTypes } from "sequelize";
import { sequelize } from "@/lib/server/sequelize";
import type { RecheckConcern } from "@/lib/services/recheck/concerned";
import { RecordEvent } from "@/models/record";

/** The newest record event of an object. */
export async function lastEvent(objectId: string): Promise<RecordEvent | null> {
  return RecordEvent.findOne({ where: { objectId }, order: [["seq", "DESC"]] });
}

/** How many re-check jobs of exactly this concern wait. */
export async function queuedRechecks(concern: RecheckConcern): Promise<number> {
  const [row] = await sequelize.query<{ jobs: number }>(
    "select count(*)::int as jobs from pgboss.job where name = 'recheck' and data = $1::jsonb",
    { type: QueryTypes.SELECT, bind: [JSON.stringify(concern)] },
  );
  return row?.jobs ?? 0;
}
