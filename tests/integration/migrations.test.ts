import { afterAll, beforeAll, expect, test } from "vitest";
import { databaseOn, dropDatabase, ensureDatabase, query } from "../../scripts/lib/database.mjs";
import { migrateUp, migrationNames, openMigrator } from "../../scripts/migrator";

const server = databaseOn(process.env.DATABASE_URL!, "postgres");
const name = `keepstep_migrations_${process.pid}`;
const url = databaseOn(server, name);

const tables = async () =>
  (await query(url, "select tablename from pg_tables where schemaname = 'public' order by 1")).map(
    ({ tablename }) => tablename,
  );

beforeAll(() => ensureDatabase(server, name));
afterAll(() => dropDatabase(server, name));

test("every migration is applied once, undone, and applied again", async () => {
  expect(await migrateUp(url)).toEqual(migrationNames());
  const whole = await tables();
  expect(await migrateUp(url)).toEqual([]);

  const { umzug, close } = await openMigrator(url);
  await umzug.down({ to: 0 }).finally(close);
  expect(await tables()).toEqual(["schema_migrations"]);

  await migrateUp(url);
  expect(await tables()).toEqual(whole);
});

test("two migrators at the same moment apply each migration once", async () => {
  const { umzug, close } = await openMigrator(url);
  await umzug.down({ to: 0 }).finally(close);
  const applied = await Promise.all([migrateUp(url), migrateUp(url)]);
  expect(applied.flat().sort()).toEqual(migrationNames());
});
