import "server-only";
import { z } from "zod";
import type { RehearsedMachine } from "@/lib/domain/rehearsals";
import { notRehearsed } from "@/lib/review/rehearse";
import { logger } from "@/lib/server/logger";
import { Rehearsal, RehearsalMachine } from "@/models/rehearsals";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { enqueueRehearsal } from "./enqueue";
import { rehearsalOutcome } from "./outcome";
import { rehearsalView } from "./present";

/** Machines that one job goes through; it then hands on to the next, so that each ends well before its time. */
const AT_ONCE = 25;

const FAILED =
  "Something failed while this machine was rehearsed; the server's log says what. The other machines are not touched by it.";

const jobSchema = z.object({ rehearsalId: z.uuid() });

/**
 * Goes through the next machines of a rehearsal and hands on to the job after it, or ends it. Bears being run twice or
 * broken off: what a machine has come to is kept at once, and only machines without an outcome are gone through.
 */
export async function runRehearsal(context: Context, data: unknown): Promise<number> {
  authorize(context, "rehearsals.read");
  const { rehearsalId } = jobSchema.parse(data);
  const rehearsal = await Rehearsal.findByPk(rehearsalId);
  if (!rehearsal || rehearsal.state === "done") return 0;
  await Rehearsal.update({ state: "running" }, { where: { id: rehearsalId, state: "waiting" } });
  const waiting = await RehearsalMachine.findAll({
    where: { rehearsalId, rehearsedAt: null },
    order: [["machineId", "ASC"]],
    limit: AT_ONCE,
  });
  for (const { machineId } of waiting) {
    const outcome = await rehearsalOutcome(rehearsal, machineId, context.now).catch((error: unknown) => {
      logger.error({ err: error, rehearsalId, machineId }, "A machine could not be rehearsed.");
      return notRehearsed(FAILED, true);
    });
    await keep(context, { rehearsalId, machineId, outcome });
  }
  await handOn(context, rehearsalId);
  return waiting.length;
}

interface Kept {
  readonly rehearsalId: string;
  readonly machineId: string;
  readonly outcome: RehearsedMachine;
}

async function keep({ now }: Context, { rehearsalId, machineId, outcome }: Kept): Promise<void> {
  await RehearsalMachine.update(
    {
      outcome,
      newlyOver: outcome.graver.some(({ toBe }) => toBe === "over"),
      hottestRoomC: outcome.hottestRoom?.ambientC ?? null,
      rehearsedAt: now,
    },
    { where: { rehearsalId, machineId, rehearsedAt: null } },
  );
}

/** The next batch, or the end: only one of two jobs that end at the same moment puts it on the record. */
async function handOn(context: Context, id: string): Promise<void> {
  await withTransaction(context, async (tx) => {
    authorize(tx, "rehearsals.read");
    const { transaction } = tx;
    const rehearsal = await Rehearsal.findByPk(id, { transaction, lock: transaction.LOCK.UPDATE });
    if (!rehearsal || rehearsal.state === "done") return;
    const left = await RehearsalMachine.count({ where: { rehearsalId: id, rehearsedAt: null }, transaction });
    if (left > 0) return enqueueRehearsal(tx, id);
    await rehearsal.update({ state: "done", endedAt: tx.now }, { transaction });
    const { machines, newlyOver } = await rehearsalView(id, transaction);
    await appendRecord(tx, {
      action: "rehearsal.ended",
      object: { type: "rehearsal", id, label: rehearsal.title },
      after: { machines, newlyOver },
    });
  });
}
