import { registerJobs } from "@/lib/jobs/register";
import { demandServerEnv } from "@/lib/server/env";
import { startQueue, stopQueue } from "@/lib/server/queue";
import { sequelize } from "@/lib/server/sequelize";
import { installShutdown } from "@/lib/server/shutdown";

/** Opens what serving needs. Without it the process ends: a server that answers only errors helps nobody. */
export async function startServer(): Promise<void> {
  try {
    demandServerEnv();
    await demandDatabase();
    await registerJobs(await startQueue({ tend: true }));
    installShutdown(close);
  } catch (error) {
    process.stderr.write(`Keepstep cannot start: ${messageOf(error)}\n`);
    process.exit(1);
  }
}

async function demandDatabase(): Promise<void> {
  try {
    await sequelize.authenticate();
  } catch (error) {
    throw new Error(`the database does not answer (${messageOf(error)}).`, { cause: error });
  }
}

function messageOf(error: unknown): string {
  return error instanceof Error && error.message !== "" ? error.message : String(error);
}

async function close(): Promise<void> {
  await stopQueue();
  await sequelize.close();
}
