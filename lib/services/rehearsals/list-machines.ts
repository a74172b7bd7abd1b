import "server-only";
import { QueryTypes } from "sequelize";
import type { RehearsedMachine } from "@/lib/domain/rehearsals";
import type {
  RehearsalMachinePage,
  RehearsalMachineQuery,
  RehearsalMachineView,
} from "@/lib/schemas/rehearsals";
import { sequelize } from "@/lib/server/sequelize";
import { Rehearsal } from "@/models/rehearsals";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";

type Row = Omit<RehearsalMachineView, "was" | "toBe" | "axes" | "graver" | "hottestRoom" | "trouble"> & {
  readonly outcome: RehearsedMachine;
  readonly total: number;
};

const MACHINES = `
  select m.id as "machineId", m.serial, mm.name as "modelName", s.id as "siteId", s.name as "siteName",
    s.ambient_c as "siteAmbientC", r.outcome, (count(*) over ())::int as total
  from rehearsal_machines r
  join machines m on m.id = r.machine_id
  join machine_models mm on mm.id = m.model_id
  join sites s on s.id = m.site_id
  where r.rehearsal_id = $1::uuid and r.rehearsed_at is not null
    and case when $2 then r.newly_over else r.outcome->>'concerned' = 'true' end
  order by s.name, s.id, r.newly_over desc, r.hottest_room_c nulls last, m.serial
  limit $3 offset $4`;

/** Machines that the rehearsal has come to, site by site; those first that would be newly over limit or tolerate least. */
export async function listRehearsalMachines(
  context: Context,
  { id, show, page, pageSize }: RehearsalMachineQuery & { readonly id: string },
): Promise<RehearsalMachinePage> {
  authorize(context, "rehearsals.read");
  if ((await Rehearsal.count({ where: { id } })) === 0) throw notFound("rehearsal");
  const rows = await sequelize.query<Row>(MACHINES, {
    type: QueryTypes.SELECT,
    bind: [id, show === "newly_over", pageSize, (page - 1) * pageSize],
  });
  return { items: rows.map(present), page, pageSize, total: rows[0]?.total ?? 0 };
}

function present({ outcome, total: _, ...machine }: Row): RehearsalMachineView {
  const { was, toBe, axes, graver, hottestRoom, trouble } = outcome;
  return { ...machine, was, toBe, axes, graver, hottestRoom, trouble };
}
