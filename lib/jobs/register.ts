import "server-only";
import type PgBoss from "pg-boss";
import type { QueueSettings } from "@/lib/server/queue";
import { ensureQueue } from "@/lib/server/queue";
import { mailJob } from "./mail";
import { recheckJob } from "./recheck";
import { rehearsalJob } from "./rehearsal";

/** A background job: the name of its queue, how it is tried again, and what it does with the data of one job. */
export interface Job {
  readonly name: string;
  readonly queue?: Partial<QueueSettings>;
  /** Cron expression of a job that also runs by itself. */
  readonly schedule?: string;
  readonly work: (data: object) => Promise<void>;
}

/** Every background job of the desk. */
const JOBS: readonly Job[] = [mailJob, recheckJob, rehearsalJob];

/** Starts to work on every queue. */
export async function registerJobs(boss: PgBoss): Promise<void> {
  for (const job of JOBS) {
    await ensureQueue(job.name, job.queue);
    if (job.schedule) await boss.schedule(job.name, job.schedule);
    await boss.work<object>(job.name, { pollingIntervalSeconds: 1 }, async (batch) => {
      for (const { data } of batch) await job.work(data);
    });
  }
}
