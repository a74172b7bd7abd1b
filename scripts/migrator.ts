import { readdirSync } from "node:fs";
import path from "node:path";
import { fileURLToPath, pathToFileURL } from "node:url";
import pg from "pg";
import type { QueryInterface } from "sequelize";
import { QueryTypes, Sequelize } from "sequelize";
import type { MigrationParams } from "umzug";
import { Umzug } from "umzug";

const FOLDER = fileURLToPath(new URL("../migrations", import.meta.url));
const FILE_NAME = /^\d{14}-[a-z0-9-]+\.ts$/;

type Step = (params: MigrationParams<QueryInterface>) => Promise<void>;
type Migration = Record<"up" | "down", Step>;

/** Names of the migrations in the order in which they are applied. */
export function migrationNames(): string[] {
  return readdirSync(FOLDER)
    .filter((file) => FILE_NAME.test(file))
    .map((file) => file.replace(/\.ts$/, ""))
    .sort();
}

/**
 * The migrations of one database. Each step and the note that it was done commit together; a lock keeps a second
 * migrator waiting. All of it goes through one connection, so that plain "begin" and "commit" hold for every query.
 */
export async function openMigrator(url: string) {
  const sequelize = new Sequelize(url, {
    dialect: "postgres",
    dialectModule: pg,
    logging: false,
    pool: { max: 1, min: 1, idle: 3_600_000 },
  });
  const say = (sql: string, bind: unknown[] = []) => sequelize.query(sql, { bind });
  await say("select pg_advisory_lock(hashtextextended('keepstep migrations', 0))");
  await say(
    "create table if not exists schema_migrations (name text primary key, applied_at timestamptz not null default now())",
  );

  async function whole(name: string, step: () => Promise<void>, note: string): Promise<void> {
    await say("begin");
    try {
      await step();
      await say(note, [name]);
      await say("commit");
    } catch (error) {
      await say("rollback");
      throw new Error(`Migration ${name} failed and was undone: ${(error as Error).message}`, {
        cause: error,
      });
    }
  }

  const migrate = (name: string, direction: "up" | "down", note: string): Step =>
    async function step(params) {
      const file = pathToFileURL(path.join(FOLDER, `${name}.ts`)).href;
      const migration = (await import(/* @vite-ignore */ file)) as Migration;
      await whole(name, () => migration[direction](params), note);
    };

  const umzug = new Umzug({
    context: sequelize.getQueryInterface(),
    logger: undefined,
    migrations: migrationNames().map((name) => ({
      name,
      up: migrate(name, "up", "insert into schema_migrations (name) values ($1)"),
      down: migrate(name, "down", "delete from schema_migrations where name = $1"),
    })),
    storage: {
      async executed() {
        const rows = await sequelize.query<{ name: string }>(
          "select name from schema_migrations order by name",
          {
            type: QueryTypes.SELECT,
          },
        );
        return rows.map(({ name }) => name);
      },
      // Noted inside of the step's own transaction.
      logMigration: async () => undefined,
      unlogMigration: async () => undefined,
    },
  });
  return { umzug, close: () => sequelize.close() };
}

/** Brings a database up to date; gives the names of the migrations that were applied. */
export async function migrateUp(url: string): Promise<string[]> {
  const { umzug, close } = await openMigrator(url);
  try {
    return (await umzug.up()).map(({ name }) => name);
  } finally {
    await close();
  }
}
