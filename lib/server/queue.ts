import "server-only";
import PgBoss from "pg-boss";
import type { Transaction } from "sequelize";
import { databaseUrl } from "./env";
import { logger } from "./logger";
import { sequelize } from "./sequelize";

/** What a job is tried again for; seconds between tries double when `retryBackoff` is set. */
export interface QueueSettings {
  readonly retryLimit: number;
  readonly retryDelay: number;
  readonly retryBackoff: boolean;
  /** Seconds after which a job that does not end counts as failed, and is tried again. */
  readonly expireInSeconds: number;
}

const DEFAULT_QUEUE: QueueSettings = {
  retryLimit: 10,
  retryDelay: 5,
  retryBackoff: true,
  expireInSeconds: 300,
};

interface Queue {
  readonly boss: PgBoss;
  /** Names of queues that exist for certain. */
  readonly made: Set<string>;
}

const shared = globalThis as unknown as { keepstepQueue?: Promise<Queue> };

/** One queue a process. With `tend`, this process also keeps the house: expires, retries and archives jobs. */
export async function startQueue({ tend }: { tend: boolean }): Promise<PgBoss> {
  return (await (shared.keepstepQueue ??= open(tend))).boss;
}

async function open(tend: boolean): Promise<Queue> {
  const boss = new PgBoss({
    connectionString: databaseUrl(),
    schema: "pgboss",
    max: 4,
    supervise: tend,
    schedule: tend,
  });
  boss.on("error", (error) => logger.error({ err: error }, "The job queue reports an error."));
  try {
    await boss.start();
  } catch (error) {
    shared.keepstepQueue = undefined;
    throw error;
  }
  return { boss, made: new Set() };
}

/** Makes the queue of a name when there is none yet. */
export async function ensureQueue(name: string, settings: Partial<QueueSettings> = {}): Promise<void> {
  const { boss, made } = await (shared.keepstepQueue ??= open(false));
  if (made.has(name)) return;
  await boss.createQueue(name, { name, ...DEFAULT_QUEUE, ...settings });
  made.add(name);
}

export interface EnqueueOptions {
  /** The job exists only if this transaction commits. */
  readonly transaction?: Transaction;
  readonly startAfter?: Date;
  /** At most one job of this key in `singletonSeconds`. */
  readonly singletonKey?: string;
  readonly singletonSeconds?: number;
}

/** Puts a job into the queue; null when a job with the same singleton key already waits. */
export async function enqueue(
  name: string,
  data: object,
  { transaction, ...options }: EnqueueOptions = {},
): Promise<string | null> {
  await ensureQueue(name);
  const boss = await startQueue({ tend: false });
  return boss.send(name, data, transaction ? { ...options, db: within(transaction) } : options);
}

/** Lets the queue write through a transaction of ours. Sequelize takes no undefined where the driver takes it as null. */
function within(transaction: Transaction): PgBoss.Db {
  return {
    async executeSql(text, values) {
      const bind: unknown[] = values.map((value: unknown) => value ?? null);
      const [rows] = await sequelize.query(text, { bind, transaction });
      return { rows };
    },
  };
}

/** Lets running jobs end (five seconds at most) and closes the queue's connections. */
export async function stopQueue(): Promise<void> {
  const queue = await shared.keepstepQueue;
  shared.keepstepQueue = undefined;
  await queue?.boss.stop({ graceful: true, timeout: 5_000 });
}
