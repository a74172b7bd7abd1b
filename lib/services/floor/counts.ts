import "server-only";
import { QueryTypes } from "sequelize";
import { sequelize } from "@/lib/server/sequelize";
import type { Floor, FloorCounts } from "@/lib/schemas/floor";
import type { FleetFilter } from "@/lib/schemas/machines-read";
import { fleetConditions, fleetCounts } from "@/lib/services/machines/fleet-rows";

interface Off {
  readonly off: number;
  readonly onDeviation: number;
  readonly nextEnd: string | null;
}

/** Machines in service with a value that differs, and those on a permitted deviation in force. */
const OFF = (where: string, moment: string) => `
  select
    count(*) filter (where exists (
      select 1 from drift_items d where d.machine_id = m.id and d.kind = 'differs'))::int as off,
    count(*) filter (where exists (select 1 from deviations v where v.machine_id = m.id and ${inForce(moment)}))::int
      as "onDeviation",
    (select min(v.until_on)::text from deviations v join machines m on m.id = v.machine_id
      left join machine_status st on st.machine_id = m.id
      where m.state = 'in_service' and ${inForce(moment)} and ${where}) as "nextEnd"
  from machines m left join machine_status st on st.machine_id = m.id
  where m.state = 'in_service' and ${where}`;

function inForce(moment: string): string {
  return `v.from_at <= ${moment} and v.until_on >= (${moment}::timestamptz at time zone 'utc')::date
    and (v.ended_at is null or v.ended_at > ${moment})`;
}

/** The numbers of the floor's heading, over every machine of the filter and not only those of the page. */
export async function floorCounts(filter: FleetFilter, asOf: Date): Promise<FloorCounts> {
  const { where, bind } = fleetConditions(filter);
  const standings = await fleetCounts(filter);
  const [counted] = await sequelize.query<Off>(OFF(where, `$${bind.length + 1}::timestamptz`), {
    type: QueryTypes.SELECT,
    bind: [...bind, asOf],
  });
  const outOfService = standings.get("out_of_service") ?? 0;
  const all = [...standings.values()].reduce((sum, machines) => sum + machines, 0);
  const offBaseline = counted?.off ?? 0;
  return {
    inService: all - outOfService,
    offBaseline,
    notRead: all - outOfService - offBaseline - (standings.get("on_baseline") ?? 0),
    outOfService,
    over: standings.get("over") ?? 0,
    onDeviation: counted?.onDeviation ?? 0,
    nextDeviationEnd: counted?.nextEnd ?? null,
  };
}

const CHOICES = (table: "sites" | "machine_models", column: "site_id" | "model_id") => `
  select c.id, c.name, count(*)::int as machines from machines m join ${table} c on c.id = m.${column}
  where m.state <> 'retired' group by c.id, c.name order by c.name`;

/** Sites and models that have machines. */
export async function floorChoices(): Promise<Pick<Floor, "sites" | "models">> {
  const select = { type: QueryTypes.SELECT } as const;
  const sites = await sequelize.query<Floor["sites"][number]>(CHOICES("sites", "site_id"), select);
  const models = await sequelize.query<Floor["models"][number]>(
    CHOICES("machine_models", "model_id"),
    select,
  );
  return { sites, models };
}
