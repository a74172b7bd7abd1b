import { readdirSync } from "node:fs";
import path from "node:path";
import { query } from "./database.mjs";
import { ROOT } from "./home.mjs";
import { run } from "./run.mjs";
import { typescriptArguments } from "./typescript.mjs";

const UNDEFINED_TABLE = "42P01";

/** Runs a TypeScript file of ours on this database. */
export function runOn(url, file, { args = [], signal, env = process.env, ...options } = {}) {
  return run(process.execPath, typescriptArguments(file, args), {
    cwd: ROOT,
    env: { ...env, DATABASE_URL: url },
    signal,
    name: file,
    ...options,
  });
}

/** How many migrations the database lacks; looked up here because starting the migrator takes seconds. */
async function countPending(url) {
  const files = readdirSync(path.join(ROOT, "migrations")).filter((name) => name.endsWith(".ts"));
  const rows = await query(url, "select name from schema_migrations").catch((error) => {
    if (error.code === UNDEFINED_TABLE) return [];
    throw error;
  });
  const applied = new Set(rows.map(({ name }) => `${name}.ts`));
  return files.filter((name) => !applied.has(name)).length;
}

/** Brings the tables of the database up to date. */
export async function ensureTables({ url, say, signal, env }) {
  const pending = await countPending(url);
  if (pending === 0) return say("up to date");
  say(`applying ${pending} migrations`);
  await runOn(url, "scripts/migrate.ts", { args: ["up"], signal, env });
  say(`${pending} migrations applied`);
}

/** A name for a database that stays the same, whatever its address, and is not given to another one. */
export async function identifyDatabase(url) {
  const [row] = await query(
    url,
    "select (select system_identifier from pg_control_system()) || '/' || oid as id from pg_database where datname = current_database()",
  );
  return row.id;
}

/** Whether anybody could sign in already. */
export async function hasPeople(url) {
  const [row] = await query(url, "select exists (select from users) as found");
  return row.found;
}

/** Loads the demo fleet. The loading itself can be repeated: what is there already stays as it is. */
export async function loadDemo({ url, say, signal, env }) {
  say("loading the demo fleet");
  await runOn(url, "scripts/seed.ts", { signal, env, onLine: say });
  say("demo fleet loaded");
}
