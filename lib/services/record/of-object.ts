import "server-only";
import type { WhereOptions } from "sequelize";
import { Op } from "sequelize";
import type { RecordEventView } from "@/lib/schemas/record";
import { RecordEvent } from "@/models/record";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { presentEvent } from "./present";

export interface RecordedObject {
  readonly type: string;
  readonly id: string;
}

/** A machine and a change also have the acts on other objects that bear on them: readings, comments, verifications. */
function condition({ type, id }: RecordedObject): WhereOptions {
  const own = { objectType: type, objectId: id };
  if (type === "machine") return { [Op.or]: [own, { machineId: id }] };
  if (type === "change") return { [Op.or]: [own, { changeId: id }] };
  return own;
}

/** The record of one object, newest first. */
export async function recordOfObject(
  context: Context,
  object: RecordedObject,
  limit = 100,
): Promise<RecordEventView[]> {
  authorize(context, "record.read");
  const rows = await RecordEvent.findAll({ where: condition(object), order: [["seq", "DESC"]], limit });
  return rows.map(presentEvent);
}
