import "server-only";
import { enqueue } from "@/lib/server/queue";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { refreshMachineStatus } from "@/lib/services/machines/refresh-status";
import { concernSchema, machinesConcerned } from "./concerned";
import { RECHECK_QUEUE } from "./enqueue";

/** Machines that one job checks; more are handed on as jobs of their own, so that each ends well before its time. */
const AT_ONCE = 100;

/**
 * Checks the machines concerned again. One that fails does not keep the others from being checked; the failure is
 * thrown at the end, so that the job is tried again.
 */
export async function runRecheck(context: Context, data: unknown): Promise<number> {
  authorize(context, "machines.read");
  const machineIds = await machinesConcerned(concernSchema.parse(data));
  if (machineIds.length > AT_ONCE) {
    for (let start = 0; start < machineIds.length; start += AT_ONCE)
      await enqueue(RECHECK_QUEUE, { machineIds: machineIds.slice(start, start + AT_ONCE) });
    return 0;
  }
  const failures: unknown[] = [];
  for (const machineId of machineIds)
    await refreshMachineStatus(context, machineId).catch((error: unknown) => failures.push(error));
  if (failures.length > 0)
    throw new AggregateError(failures, `${failures.length} of ${machineIds.length} machines failed.`);
  return machineIds.length;
}
