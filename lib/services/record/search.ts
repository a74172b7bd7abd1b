import "server-only";
import type { WhereOptions } from "sequelize";
import { literal, Op, where as compare } from "sequelize";
import type { RecordPage, RecordQuery } from "@/lib/schemas/record";
import { sequelize } from "@/lib/server/sequelize";
import { RecordEvent } from "@/models/record";
import { containing, pageBounds } from "@/lib/services/catalog/filters";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { presentEvent } from "./present";

/** The expression of the index record_events_words, to the letter. */
const WORDS =
  "to_tsvector('simple', object_label || ' ' || translate(action, '._', '  ') || ' ' || actor_name || ' ' || coalesce(reason, ''))";
const DAY_MS = 86_400_000;

/** Every word, or the beginning of one, wherever it stands in the event. */
function wordsCondition(q: string): WhereOptions {
  const words = q.split(/\s+/).filter((word) => /[\p{L}\p{N}]/u.test(word));
  if (words.length === 0) return literal("false");
  const sought = words.map((word) => `'${word.replace(/['\\]/g, " ")}':*`).join(" & ");
  return literal(`${WORDS} @@ to_tsquery('simple', ${sequelize.escape(sought)})`);
}

const isDay = (text: string) => text.length === "2026-12-01".length;

/** From the start of the first day (or the instant) to the end of the last, UTC. */
function timeCondition({ from, to }: Pick<RecordQuery, "from" | "to">): WhereOptions[] {
  const after = from === undefined ? [] : [{ at: { [Op.gte]: new Date(from) } }];
  if (to === undefined) return after;
  const end = new Date(to);
  const before = isDay(to) ? { [Op.lt]: new Date(end.getTime() + DAY_MS) } : { [Op.lte]: end };
  return [...after, { at: before }];
}

function actCondition(action: string): WhereOptions {
  if (!action.endsWith(".")) return { action };
  return compare(literal("action"), Op.like, `${action.replaceAll("_", "\\_")}%`);
}

function condition(query: RecordQuery): WhereOptions {
  const { q, actor, action, actorId, objectType, objectId, machineId, changeId } = query;
  const exact = Object.entries({ actorId, objectType, objectId, machineId, changeId });
  return {
    [Op.and]: [
      Object.fromEntries(exact.filter(([, value]) => value !== undefined)),
      ...timeCondition(query),
      ...(q ? [wordsCondition(q)] : []),
      ...(actor ? [{ actorName: { [Op.iLike]: containing(actor) } }] : []),
      ...(action ? [actCondition(action)] : []),
    ],
  };
}

/** The record of every act, newest first. */
export async function searchRecord(context: Context, query: RecordQuery): Promise<RecordPage> {
  authorize(context, "record.read");
  const { rows, count } = await RecordEvent.findAndCountAll({
    where: condition(query),
    order: [["seq", "DESC"]],
    ...pageBounds(query),
  });
  return { items: rows.map(presentEvent), page: query.page, pageSize: query.pageSize, total: count };
}
