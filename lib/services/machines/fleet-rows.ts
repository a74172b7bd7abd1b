import "server-only";
import { QueryTypes } from "sequelize";
import { STANDINGS, type Standing } from "@/lib/domain/floor";
import type { Level } from "@/lib/domain/levels";
import type { MachineState } from "@/lib/domain/machines";
import type { FleetFilter } from "@/lib/schemas/machines-read";
import { sequelize } from "@/lib/server/sequelize";
import { containing } from "@/lib/services/catalog/filters";

/** A machine of the fleet with its model, its site and what is kept of its standing. */
export interface FleetRow {
  readonly id: string;
  readonly serial: string;
  readonly state: MachineState;
  readonly version: number;
  readonly modelId: string;
  readonly modelCode: string;
  readonly modelName: string;
  readonly siteId: string;
  readonly siteCode: string;
  readonly siteName: string;
  /** Null where the standing was never worked out. */
  readonly read: boolean | null;
  readonly level: Level | null;
  readonly sentence: string | null;
  readonly stale: boolean | null;
  readonly cells: Record<string, unknown> | null;
  readonly lastReadAt: Date | null;
}

export interface FleetQuery extends FleetFilter {
  /** Missing: all but retired machines. */
  readonly state?: MachineState | undefined;
  readonly page: number;
  readonly pageSize: number;
  readonly order: "serial" | "consequence";
}

/** Place of a standing in STANDINGS; the same rule as `standingOf`. */
const RANK = `case
  when m.state <> 'in_service' then 5
  when st.machine_id is null then 2
  when st.level = 'over' then 0
  when st.level = 'near' then 1
  when st.level = 'cannot' then 2
  when st.level = 'within' then 3
  when st.read then 4
  else 2 end`;

const FROM = `from machines m
  join machine_models mm on mm.id = m.model_id
  join sites s on s.id = m.site_id
  left join machine_status st on st.machine_id = m.id`;

const COLUMNS = `m.id, m.serial, m.state, m.version,
  mm.id as "modelId", mm.code as "modelCode", mm.name as "modelName",
  s.id as "siteId", s.code as "siteCode", s.name as "siteName",
  st.read, st.level, st.sentence, st.stale, st.cells, st.last_read_at as "lastReadAt"`;

const ORDER = { serial: "m.serial", consequence: `${RANK}, m.serial` } as const;

interface Conditions {
  readonly where: string;
  readonly bind: unknown[];
}

/** Conditions on machines `m` and their status `st`, with the values they bind. */
export function fleetConditions(filter: FleetFilter & { state?: MachineState | undefined }): Conditions {
  const bind: unknown[] = [];
  const of = (sql: (place: string) => string, value: unknown) => sql(`$${bind.push(value)}`);
  const { siteId, modelId, level, state, q } = filter;
  const conditions = [
    state === undefined ? "m.state <> 'retired'" : of((place) => `m.state = ${place}`, state),
    ...(siteId ? [of((place) => `m.site_id = ${place}::uuid`, siteId)] : []),
    ...(modelId ? [of((place) => `m.model_id = ${place}::uuid`, modelId)] : []),
    ...(q ? [of((place) => `m.serial ilike ${place}`, containing(q))] : []),
    ...(level ? [of((place) => `(${RANK}) = ${place}::int`, STANDINGS.indexOf(level))] : []),
  ];
  return { where: conditions.join(" and "), bind };
}

/** Machines by serial number or by consequence, a page at a time. */
export async function fleetRows(query: FleetQuery): Promise<{ rows: FleetRow[]; total: number }> {
  const { where, bind } = fleetConditions(query);
  const [counted] = await sequelize.query<{ total: number }>(
    `select count(*)::int as total ${FROM} where ${where}`,
    { type: QueryTypes.SELECT, bind },
  );
  const limit = `limit $${bind.length + 1}::int offset $${bind.length + 2}::int`;
  const rows = await sequelize.query<FleetRow>(
    `select ${COLUMNS} ${FROM} where ${where} order by ${ORDER[query.order]} ${limit}`,
    { type: QueryTypes.SELECT, bind: [...bind, query.pageSize, (query.page - 1) * query.pageSize] },
  );
  return { rows, total: counted?.total ?? 0 };
}

/** How many machines stand where, the retired left out. */
export async function fleetCounts(filter: FleetFilter): Promise<Map<Standing, number>> {
  const { where, bind } = fleetConditions(filter);
  const rows = await sequelize.query<{ rank: number; machines: number }>(
    `select ${RANK} as rank, count(*)::int as machines ${FROM} where ${where} group by 1`,
    { type: QueryTypes.SELECT, bind },
  );
  return new Map(
    rows.flatMap(({ rank, machines }) => {
      const standing = STANDINGS[rank];
      return standing ? [[standing, machines] as const] : [];
    }),
  );
}
