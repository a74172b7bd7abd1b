import "server-only";
import { QueryTypes } from "sequelize";
import { RULES_VERSION } from "@/lib/rules/version";
import { startRehearsalSchema, type RehearsalView, type StartRehearsal } from "@/lib/schemas/rehearsals";
import { sequelize } from "@/lib/server/sequelize";
import { Rehearsal } from "@/models/rehearsals";
import type { Context, Tx } from "@/lib/services/kernel/context";
import { authorize, personBehind } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { currentPolicy } from "@/lib/services/policies/ensure";
import { appendRecord } from "@/lib/services/record/append";
import { enqueueRehearsal } from "./enqueue";
import { rehearsalView } from "./present";
import { rehearsalTitle } from "./title";

/** Starts a rehearsal of the fleet, or of one site or model. The job that goes through it exists if this act commits. */
export async function startRehearsal(context: Context, input: StartRehearsal): Promise<RehearsalView> {
  const { question, siteId, modelId } = startRehearsalSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "rehearsals.start");
    const { transaction } = tx;
    const title = await rehearsalTitle(question, transaction);
    const { version, policy } = await currentPolicy(transaction);
    const rehearsal = await Rehearsal.create(
      {
        question,
        siteId,
        modelId,
        title,
        rulesVersion: RULES_VERSION,
        policyVersion: version,
        policy,
        startedBy: personBehind(tx.actor),
        startedByName: tx.actor.name,
        startedAt: tx.now,
      },
      { transaction },
    );
    const machines = await takeMachines(tx, rehearsal);
    await enqueueRehearsal(tx, rehearsal.id);
    await appendRecord(tx, {
      action: "rehearsal.started",
      object: { type: "rehearsal", id: rehearsal.id, label: title },
      after: { question, siteId, modelId, machines },
    });
    return rehearsalView(rehearsal.id, transaction);
  });
}

const MACHINES = `
  insert into rehearsal_machines (rehearsal_id, machine_id)
  select $1::uuid, m.id from machines m
  where m.state <> 'retired' and ($2::uuid is null or m.site_id = $2::uuid)
    and ($3::uuid is null or m.model_id = $3::uuid)
  returning machine_id`;

/** The machines of the fleet of this moment; one that is added later is not in it. */
async function takeMachines({ transaction }: Tx, { id, siteId, modelId }: Rehearsal): Promise<number> {
  const rows = await sequelize.query(MACHINES, {
    type: QueryTypes.SELECT,
    bind: [id, siteId, modelId],
    transaction,
  });
  if (rows.length === 0)
    throw new ServiceError(
      "conflict",
      "No machine answers to this choice of site and model. Nothing was started.",
    );
  return rows.length;
}
