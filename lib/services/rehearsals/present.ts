import "server-only";
import { QueryTypes, type Transaction } from "sequelize";
import type { RehearsalRow, RehearsalView } from "@/lib/schemas/rehearsals";
import { sequelize } from "@/lib/server/sequelize";
import { Rehearsal } from "@/models/rehearsals";
import { notFound } from "@/lib/services/kernel/errors";

interface Counts {
  readonly rehearsalId: string;
  readonly machines: number;
  readonly rehearsed: number;
  readonly newlyOver: number;
  readonly notConcerned: number;
  readonly withoutAnswer: number;
}

const COUNTS = `
  select rehearsal_id as "rehearsalId", count(*)::int as machines, count(rehearsed_at)::int as rehearsed,
    (count(*) filter (where newly_over))::int as "newlyOver",
    (count(*) filter (where outcome->>'concerned' = 'false'))::int as "notConcerned",
    (count(*) filter (where outcome->>'concerned' = 'true' and outcome->>'trouble' is not null))::int
      as "withoutAnswer"
  from rehearsal_machines where rehearsal_id = any($1::uuid[]) group by rehearsal_id`;

async function countsOf(ids: readonly string[], transaction?: Transaction): Promise<Map<string, Counts>> {
  const rows = await sequelize.query<Counts>(COUNTS, {
    type: QueryTypes.SELECT,
    bind: [ids],
    transaction: transaction ?? null,
  });
  return new Map(rows.map((row) => [row.rehearsalId, row]));
}

function rowOf(rehearsal: Rehearsal, counts: Counts | undefined): RehearsalRow {
  const { id, title, state, startedByName, startedAt, endedAt } = rehearsal;
  return {
    id,
    title,
    state,
    startedByName,
    startedAt: startedAt.toISOString(),
    endedAt: endedAt?.toISOString() ?? null,
    machines: counts?.machines ?? 0,
    rehearsed: counts?.rehearsed ?? 0,
    newlyOver: counts?.newlyOver ?? 0,
  };
}

/** Rehearsals with how far each has come. */
export async function rehearsalRows(rehearsals: readonly Rehearsal[]): Promise<RehearsalRow[]> {
  const counts = await countsOf(rehearsals.map(({ id }) => id));
  return rehearsals.map((rehearsal) => rowOf(rehearsal, counts.get(rehearsal.id)));
}

export async function rehearsalView(id: string, transaction?: Transaction): Promise<RehearsalView> {
  const rehearsal = await Rehearsal.findByPk(id, { transaction: transaction ?? null });
  if (!rehearsal) throw notFound("rehearsal");
  const counts = (await countsOf([id], transaction)).get(id);
  const { question, rulesVersion, policyVersion } = rehearsal;
  return {
    ...rowOf(rehearsal, counts),
    question,
    rulesVersion,
    policyVersion,
    notConcerned: counts?.notConcerned ?? 0,
    withoutAnswer: counts?.withoutAnswer ?? 0,
  };
}
