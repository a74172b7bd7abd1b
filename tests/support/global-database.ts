import { databaseOn, dropDatabase, ensureDatabase } from "../../scripts/lib/database.mjs";
import { testCluster } from "../../scripts/lib/cluster.mjs";
import { homeFolder } from "../../scripts/lib/home.mjs";
import { migrateUp } from "../../scripts/migrator";

/** A fresh, migrated database for one run of the integration tests, dropped at its end. */
export default async function setup(): Promise<() => Promise<void>> {
  const given = process.env.DATABASE_URL;
  const cluster = given ? undefined : testCluster({ home: homeFolder() });
  await cluster?.start();
  const server = given ?? cluster?.url ?? "";
  const name = `keepstep_test_${process.pid}_${Date.now()}`;
  const leave = async () => {
    await dropDatabase(server, name);
    await cluster?.stop();
  };
  try {
    process.env.DATABASE_URL = await ensureDatabase(databaseOn(server, "postgres"), name);
    await migrateUp(process.env.DATABASE_URL);
    return leave;
  } catch (error) {
    await leave();
    throw error;
  }
}
