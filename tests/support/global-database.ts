import type { TestProject } from "vitest/node";
import { testCluster } from "../../scripts/lib/cluster.mjs";
import { databaseOn, dropDatabase, ensureDatabase } from "../../scripts/lib/database.mjs";
import { homeFolder } from "../../scripts/lib/home.mjs";
import { migrateUp } from "../../scripts/migrator";

declare module "vitest" {
  interface ProvidedContext {
    /** Maintenance database of the server that the tests use. */
    readonly serverUrl: string;
    /** A migrated database that nobody is connected to; each file of tests gets a copy. */
    readonly template: string;
  }
}

/** A migrated database for one run of the integration tests, dropped at its end. */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const given = process.env.DATABASE_URL;
  const cluster = given ? undefined : testCluster({ home: homeFolder() });
  await cluster?.start();
  const serverUrl = databaseOn(given ?? cluster?.url ?? "", "postgres");
  const template = `keepstep_test_${process.pid}_${Date.now()}`;
  const leave = async () => {
    await dropDatabase(serverUrl, template);
    await cluster?.stop();
  };
  try {
    await migrateUp(await ensureDatabase(serverUrl, template));
    project.provide("serverUrl", serverUrl);
    project.provide("template", template);
    return leave;
  } catch (error) {
    await leave();
    throw error;
  }
}
