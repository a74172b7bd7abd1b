import { randomBytes } from "node:crypto";
import { rmSync } from "node:fs";
import path from "node:path";
import { setTimeout as delay } from "node:timers/promises";
import { demoPeople } from "./demo-people.mjs";
import { readArguments } from "./lib/arguments.mjs";
import { ensureBuild } from "./lib/build.mjs";
import { Cluster } from "./lib/cluster.mjs";
import { ensureTables, hasPeople, identifyDatabase, loadDemo } from "./lib/data.mjs";
import { dropDatabase, ensureDatabase, query } from "./lib/database.mjs";
import { undoAll } from "./lib/undo.mjs";
import { ensureHome, homeFolder, readJson, writeJson } from "./lib/home.mjs";
import { interruption } from "./lib/interruption.mjs";
import { takeLock } from "./lib/lock.mjs";
import { startMailCatcher } from "./lib/mail-catcher.mjs";
import { demandNode, ensureModules } from "./lib/modules.mjs";
import { demandPort, isFree, parsePort } from "./lib/ports.mjs";
import { ensurePostgres } from "./lib/postgres.mjs";
import { identify, living } from "./lib/processes.mjs";
import { createProgress } from "./lib/progress.mjs";
import { signalGroup } from "./lib/run.mjs";
import { startServer } from "./lib/server.mjs";
import { explain, Interrupted, Trouble } from "./lib/trouble.mjs";

const DATABASE = "keepstep";
/** Where `--until` may end a start: for the tests of a start that goes wrong. */
const STOPS = ["postgres", "modules", "database", "tables", "demo", "build", "mail"];

const signal = interruption();
const progress = createProgress();
/** How to undo what was started, in order; done backwards at the end, however it ends. */
const undo = [];
let doing = "starting";
let served = false;

/** One step: shown while it runs; `what` completes the sentence "there was no space left while …". */
async function step(title, what, work) {
  if (signal.aborted) throw new Interrupted();
  doing = what;
  return progress.step(title, work);
}

/** A server left by a start that was killed would hold the port and write to the data. */
async function endLeftover(runFile, port) {
  const left = readJson(runFile)?.server;
  const pid = left && living(left);
  if (pid) {
    signalGroup(pid, "SIGTERM");
    for (let tries = 0; tries < 80 && living(left); tries += 1) await delay(100);
    signalGroup(pid, "SIGKILL");
    // The port is given back a moment after the last process of the group is gone.
    for (let tries = 0; tries < 100 && !(await isFree(port).catch(() => true)); tries += 1) await delay(100);
  }
  rmSync(runFile, { force: true });
}

async function prepare(home, port) {
  demandNode();
  ensureHome(home);
  const lock = await takeLock({
    folder: home,
    name: "start",
    describe: () =>
      `Keepstep already runs from this folder: process ${process.pid}, http://127.0.0.1:${port}. Use that one, or stop it with Ctrl-C.`,
  });
  undo.push(() => lock.release());
  await endLeftover(path.join(home, "run.json"), port);
  await demandPort(port);
}

/** The settings of earlier starts, completed; the secret signs cookies and so must outlive a start. */
function keptState(home) {
  const file = path.join(home, "state.json");
  const state = { authSecret: randomBytes(32).toString("base64url"), demoLoaded: [], ...readJson(file) };
  const keep = (changes) => writeJson(file, Object.assign(state, changes));
  keep({});
  return { state, keep };
}

/** The desk's database in a cluster of this folder's own. */
async function openOwnDatabase({ home, state, keep, say }) {
  const cluster = new Cluster({ home, signal });
  undo.push(() => cluster.stop());
  await cluster.start(say);
  const url = await ensureDatabase(cluster.url, DATABASE);
  const words = `ready on port ${new URL(url).port}`;
  if (!state.demoLoading || state.demoLoading !== (await identifyDatabase(url))) {
    say(words);
    return url;
  }
  // Nobody has worked here yet: a start serves only after the loading, which was interrupted.
  await dropDatabase(cluster.url, DATABASE);
  await ensureDatabase(cluster.url, DATABASE);
  keep({ demoLoading: undefined });
  say(`${words}, begun anew since the loading of the demo fleet was interrupted`);
  return url;
}

async function openGivenDatabase(given, say) {
  const address = new URL(given).host + new URL(given).pathname;
  await query(given, "select 1").catch((error) => {
    throw new Trouble(
      `The database ${address} of DATABASE_URL does not let us in (${error.message}). Nothing was changed. Start it, or correct DATABASE_URL.`,
    );
  });
  say(address);
  return given;
}

function openDatabase(setting) {
  const given = process.env.DATABASE_URL;
  return given ? openGivenDatabase(given, setting.say) : openOwnDatabase(setting);
}

/** Loads the demo fleet once for each database, and never where others already work. Gives whether it is there. */
async function fillOnce({ url, state, keep, say, env }) {
  const id = await identifyDatabase(url);
  if (state.demoLoaded.includes(id)) {
    say("loaded before");
    return true;
  }
  if (state.demoLoading !== id && (await hasPeople(url))) {
    say("left out, since people already use this database");
    return false;
  }
  keep({ demoLoading: id });
  await loadDemo({ url, say, signal, env });
  keep({ demoLoading: undefined, demoLoaded: [...state.demoLoaded, id] });
  return true;
}

async function openMail({ home, state, keep, say }) {
  const given = process.env.SMTP_URL;
  if (given) {
    say(`sent through ${new URL(given).host}`);
    return { SMTP_URL: given };
  }
  const folder = path.join(home, "mail");
  const catcher = await startMailCatcher({ folder, port: state.mailPort });
  undo.push(() => catcher.stop());
  keep({ mailPort: catcher.port });
  say(`caught on port ${catcher.port}, nothing leaves this machine`);
  return { SMTP_URL: catcher.url, KEEPSTEP_MAIL_DIR: folder };
}

async function serve({ home, port, env, say }) {
  say("waiting for its first answer");
  const server = await startServer({ port, env, signal, logFile: path.join(home, "server.log") });
  undo.push(() => server.stop());
  const runFile = path.join(home, "run.json");
  writeJson(runFile, { server: identify(server.pid) });
  undo.push(async () => rmSync(runFile, { force: true }));
  say(`process ${server.pid}`);
  return server;
}

function greet({ home, address, demo }) {
  const { line } = progress;
  line(`\nKeepstep is ready: ${address}\n`);
  if (demo) {
    line("  Demo sign-ins");
    for (const { role, email, password } of demoPeople())
      line(`  ${role.padEnd(12)}${email.padEnd(24)}${password}`);
    line();
  }
  line(`  The data are kept in ${home}. Ctrl-C stops everything that was started.`);
}

/** Everything in order; ends early after the step that `until` names. */
async function start({ home, port, until }) {
  const env = { ...process.env, NEXT_TELEMETRY_DISABLED: "1" };
  const wantsDemo = process.env.KEEPSTEP_DEMO !== "0";
  const distDir = process.env.KEEPSTEP_DIST_DIR || ".next";
  doing = "making the folder for the data";
  await prepare(home, port);
  const { state, keep } = keptState(home);

  if (!process.env.DATABASE_URL)
    await step("PostgreSQL", "looking for PostgreSQL", (say) => ensurePostgres({ say, signal }));
  if (until === "postgres") return;
  await step("Node modules", "installing the node modules", (say) => ensureModules({ say, signal }));
  if (until === "modules") return;
  const url = await step("Database", "starting the database", (say) =>
    openDatabase({ home, state, keep, say }),
  );
  if (until === "database") return;
  await step("Tables", "bringing the tables up to date", (say) => ensureTables({ url, say, signal, env }));
  if (until === "tables") return;
  const fill = (say) => fillOnce({ url, state, keep, say, env });
  const demo = wantsDemo && (await step("Demo fleet", "loading the demo fleet", fill));
  if (until === "demo") return;
  await step("Desk", "building the desk", (say) => ensureBuild({ distDir, say, signal, env }));
  if (until === "build") return;
  const mail = await step("Mail", "starting the mail catcher", (say) => openMail({ home, state, keep, say }));
  if (until === "mail") return;

  const address = process.env.NEXTAUTH_URL || `http://127.0.0.1:${port}`;
  const settings = {
    ...env,
    ...mail,
    DATABASE_URL: url,
    NEXTAUTH_URL: address,
    NEXTAUTH_SECRET: process.env.NEXTAUTH_SECRET || state.authSecret,
    KEEPSTEP_DEMO: demo ? "1" : "0",
    KEEPSTEP_DIST_DIR: distDir,
  };
  const server = await step("Server", "starting the server", (say) =>
    serve({ home, port, env: settings, say }),
  );
  greet({ home, address, demo });
  served = true;
  await untilStopped(server);
}

/** Waits for the wish to stop; a server that ends by itself is trouble. */
async function untilStopped(server) {
  const asked = new Promise((resolve) => signal.addEventListener("abort", () => resolve(), { once: true }));
  const sentence = await Promise.race([server.ended, asked]);
  if (sentence && !signal.aborted)
    throw new Trouble(`${sentence} The data are kept; start again with npm start.`);
  progress.line("\nStopping …");
}

async function main() {
  const home = homeFolder();
  try {
    const { until } = readArguments(process.argv.slice(2), { until: "text" });
    if (until && !STOPS.includes(until)) throw new Trouble(`--until takes one of: ${STOPS.join(", ")}.`);
    await start({ home, port: parsePort(process.env.PORT, 3000), until });
    await undoAll(undo, progress.line);
    progress.line(
      signal.aborted ? `Stopped. The data are kept in ${home}.` : "Ended as asked, before the server.",
    );
  } catch (error) {
    await undoAll(undo, progress.line);
    process.stderr.write(
      `\n${served ? "Keepstep stopped" : "Keepstep did not start"}. ${explain(error, doing)}\n`,
    );
    process.exitCode = error instanceof Interrupted ? 130 : 1;
  }
}

await main();
