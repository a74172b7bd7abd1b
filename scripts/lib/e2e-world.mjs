import { rmSync } from "node:fs";
import path from "node:path";
import { ensureBuild } from "./build.mjs";
import { testCluster } from "./cluster.mjs";
import { ensureTables, loadDemo } from "./data.mjs";
import { dropDatabase, ensureDatabase } from "./database.mjs";
import { findProgram, installDebian } from "./debian.mjs";
import { startMailCatcher } from "./mail-catcher.mjs";
import { ensurePostgres } from "./postgres.mjs";
import { startServer } from "./server.mjs";
import { Interrupted } from "./trouble.mjs";

export const TEST_DIST_DIR = ".next-test";
export const TEST_TSCONFIG = "tsconfig.test.json";

/** Makes sure that Debian's Chromium is here; installs it where that is allowed. */
export async function ensureChromium({ say, signal }) {
  if (!process.env.CHROMIUM_PATH && !findProgram("chromium"))
    await installDebian({ what: "Chromium", packages: ["chromium", "fonts-dejavu-core"], say, signal });
  say(process.env.CHROMIUM_PATH ?? findProgram("chromium") ?? "installed");
}

/**
 * A desk of its own for one run of the end-to-end tests: fresh database with the demo fleet, own mail catcher, own
 * build. `undo` collects how to end it; the caller runs that backwards, however the run ends.
 */
export async function openWorld({ home, port, progress, undo, signal, env }) {
  const step = (title, work) => {
    if (signal.aborted) throw new Interrupted();
    return progress.step(title, work);
  };
  await step("PostgreSQL", (say) => ensurePostgres({ say, signal }));
  const cluster = testCluster({ home, signal });
  undo.push(() => cluster.stop());
  await step("Database", (say) => cluster.start(say));
  const name = `keepstep_e2e_${process.pid}`;
  undo.push(() => dropDatabase(cluster.url, name));
  const url = await ensureDatabase(cluster.url, name);
  await step("Tables", (say) => ensureTables({ url, say, signal, env }));
  await step("Demo fleet", (say) => loadDemo({ url, say, signal, env }));
  await step("Build", (say) => ensureBuild({ distDir: TEST_DIST_DIR, say, signal, env }));
  const folder = path.join(home, "test-mail");
  rmSync(folder, { recursive: true, force: true });
  const catcher = await startMailCatcher({ folder });
  undo.push(() => catcher.stop());
  const address = `http://127.0.0.1:${port}`;
  const settings = {
    ...env,
    DATABASE_URL: url,
    NEXTAUTH_URL: address,
    NEXTAUTH_SECRET: "end-to-end-tests-only",
    SMTP_URL: catcher.url,
    KEEPSTEP_DEMO: "1",
    KEEPSTEP_MAIL_DIR: folder,
    KEEPSTEP_DIST_DIR: TEST_DIST_DIR,
  };
  const logFile = path.join(home, "test-server.log");
  const server = await step("Server", () => startServer({ port, env: settings, logFile, signal }));
  undo.push(() => server.stop());
  return { address, ended: server.ended };
}
