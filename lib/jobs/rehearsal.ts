import "server-only";
import { SYSTEM } from "@/lib/domain/roles";
import { now } from "@/lib/server/clock";
import { REHEARSAL_QUEUE } from "@/lib/services/rehearsals/enqueue";
import { runRehearsal } from "@/lib/services/rehearsals/run";
import type { Job } from "./register";

/** Goes through the machines of a rehearsal, a batch a job; each batch hands on to the next. */
export const rehearsalJob: Job = {
  name: REHEARSAL_QUEUE,
  work: async (data) => {
    await runRehearsal({ actor: SYSTEM, now: now() }, data);
  },
};
