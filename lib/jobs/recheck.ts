import "server-only";
import { SYSTEM } from "@/lib/domain/roles";
import { now } from "@/lib/server/clock";
import { RECHECK_QUEUE } from "@/lib/services/recheck/enqueue";
import { runRecheck } from "@/lib/services/recheck/run";
import type { Job } from "./register";

/** Checks machines again after something that bears on them has changed. */
export const recheckJob: Job = {
  name: RECHECK_QUEUE,
  work: async (data) => {
    await runRecheck({ actor: SYSTEM, now: now() }, data);
  },
};
