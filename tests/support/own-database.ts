import { afterAll, inject } from "vitest";
import { copyDatabase, dropDatabase } from "../../scripts/lib/database.mjs";

/*
 * A database of its own for each file of integration tests: none sees what another one wrote.
 */
const server = inject("serverUrl");
const template = inject("template");
const name = `${template}_${process.pid}_${Date.now()}`;

process.env.DATABASE_URL = await copyDatabase(server, { name, template });

/** What the services opened in passing and a test need not know of. */
async function closeQueue(): Promise<void> {
  if ("keepstepQueue" in globalThis) await (await import("@/lib/server/queue")).stopQueue();
}

afterAll(async () => {
  await closeQueue();
  await dropDatabase(server, name);
});
