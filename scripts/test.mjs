import { mkdirSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { chooseParts, readArguments } from "./lib/arguments.mjs";
import { ensureBuild, NEXT } from "./lib/build.mjs";
import { testCluster } from "./lib/cluster.mjs";
import { countPlaywright, countVitest, total } from "./lib/counts.mjs";
import { ensureChromium, openWorld, TEST_DIST_DIR, TEST_TSCONFIG } from "./lib/e2e-world.mjs";
import { ensureHome, homeFolder, readJson, ROOT } from "./lib/home.mjs";
import { interruption } from "./lib/interruption.mjs";
import { takeLock } from "./lib/lock.mjs";
import { demandNode, ensureModules } from "./lib/modules.mjs";
import { pickPort } from "./lib/ports.mjs";
import { ensurePostgres } from "./lib/postgres.mjs";
import { createProgress } from "./lib/progress.mjs";
import { run } from "./lib/run.mjs";
import { CommandFailed, explain, Interrupted } from "./lib/trouble.mjs";
import { undoAll } from "./lib/undo.mjs";

const PARTS = ["static", "unit", "build", "integration", "e2e"];
const SHOWN_LINES = 80;

const signal = interruption();
const progress = createProgress();
const results = [];

const binary = (file) => path.join(ROOT, "node_modules", file);

/** Runs one part of the proof; a failure is counted and shown, and the rest goes on. */
async function prove(name, logs, work) {
  let result = { passed: 0, failed: 1, output: "" };
  await progress.step(name, async (say) => {
    try {
      result = await work(say);
    } catch (error) {
      if (error instanceof Interrupted) throw error;
      result.output = error instanceof CommandFailed ? error.output : explain(error, `running ${name}`);
    }
    say(`${result.passed} passed, ${result.failed} failed`);
  });
  writeFileSync(path.join(logs, `${name}.log`), result.output);
  if (result.failed > 0) showTail(result.output);
  results.push(result);
}

function showTail(output) {
  const lines = output.trimEnd().split("\n").slice(-SHOWN_LINES);
  progress.line(lines.map((line) => `    ${line}`).join("\n"));
}

/** A check that passes or fails as one. */
async function check(args, env) {
  const { output } = await run(process.execPath, args, { cwd: ROOT, env, signal });
  return { output, passed: 1, failed: 0 };
}

/** A run of a test program: its tests are counted from its report, and its exit code must agree. */
async function countRun({ args, env, report, count, onLine }) {
  rmSync(report, { force: true });
  const { code, output } = await run(process.execPath, args, {
    cwd: ROOT,
    env,
    signal,
    anyCode: true,
    onLine,
  });
  const { passed, failed } = count(readJson(report));
  return { output, passed, failed: Math.max(failed, code === 0 ? 0 : 1) };
}

function vitest({ projects, env, logs, say }) {
  const report = path.join(logs, `${projects.join("-")}.json`);
  const chosen = projects.flatMap((project) => ["--project", project]);
  const reporters = ["--reporter=default", "--reporter=json", `--outputFile.json=${report}`];
  let files = 0;
  const onLine = (line) => /^[✓❯×]/.test(line) && / tests?\b/.test(line) && say(`${(files += 1)} files done`);
  const args = [binary("vitest/vitest.mjs"), "run", ...chosen, ...reporters];
  return countRun({ args, env, report, count: countVitest, onLine });
}

async function proveStatic({ env, logs }) {
  await prove("format", logs, () => check([binary("prettier/bin/prettier.cjs"), "--check", "."], env));
  await prove("lint", logs, () => check([binary("eslint/bin/eslint.js"), "."], env));
  await prove("types", logs, async () => {
    await check([NEXT, "typegen"], env);
    return check([binary("typescript/bin/tsc"), "--noEmit", "--project", TEST_TSCONFIG], env);
  });
}

async function proveUnit({ env, logs }) {
  await prove("unit", logs, (say) => vitest({ projects: ["unit", "components"], env, logs, say }));
}

async function proveIntegration({ env, logs, home }) {
  await progress.step("PostgreSQL", (say) => ensurePostgres({ say, signal }));
  const cluster = testCluster({ home, signal });
  try {
    await progress.step("Database", (say) => cluster.start(say));
    const own = { ...env, DATABASE_URL: cluster.url };
    await prove("integration", logs, (say) => vitest({ projects: ["integration"], env: own, logs, say }));
  } finally {
    await cluster.stop();
  }
}

async function proveBuild({ env, logs }) {
  await prove("build", logs, async (say) => {
    await ensureBuild({ distDir: TEST_DIST_DIR, say, signal, env });
    return { output: "", passed: 1, failed: 0 };
  });
}

async function proveEndToEnd({ env, logs, home }) {
  const undo = [];
  try {
    await progress.step("Chromium", (say) => ensureChromium({ say, signal }));
    const world = await openWorld({ home, port: await pickPort(), progress, undo, signal, env });
    const report = path.join(logs, "e2e.json");
    const own = { ...env, KEEPSTEP_E2E_URL: world.address, KEEPSTEP_E2E_REPORT: report };
    const args = [binary("@playwright/test/cli.js"), "test"];
    await prove("e2e", logs, (say) =>
      countRun({ args, env: own, report, count: countPlaywright, onLine: (line) => say(line.slice(0, 100)) }),
    );
  } finally {
    await undoAll(undo, progress.line);
  }
}

const PROOFS = {
  static: proveStatic,
  unit: proveUnit,
  build: proveBuild,
  integration: proveIntegration,
  e2e: proveEndToEnd,
};

/** A part that cannot even begin is one failure, told in a sentence; the other parts still run. */
async function provePart(part, setting) {
  try {
    await PROOFS[part](setting);
  } catch (error) {
    if (error instanceof Interrupted) throw error;
    progress.line(`    ${explain(error, `preparing the part ${part}`)}`);
    results.push({ passed: 0, failed: 1 });
  }
}

function environment({ long }) {
  return {
    ...process.env,
    NEXT_TELEMETRY_DISABLED: "1",
    KEEPSTEP_DIST_DIR: TEST_DIST_DIR,
    KEEPSTEP_TSCONFIG: TEST_TSCONFIG,
    ...(long ? { KEEPSTEP_LONG: "1" } : {}),
  };
}

async function main() {
  const args = readArguments(process.argv.slice(2), { only: "text", long: "flag" });
  const parts = chooseParts(args.only, PARTS);
  demandNode();
  const home = ensureHome(homeFolder());
  const describe = () => `The tests already run in this folder (process ${process.pid}).`;
  const lock = await takeLock({ folder: home, name: "test", describe });
  const logs = path.join(home, "test-logs");
  mkdirSync(logs, { recursive: true });
  await progress.step("Node modules", (say) => ensureModules({ say, signal }));
  for (const part of parts) await provePart(part, { env: environment(args), logs, home });
  await lock.release();
}

try {
  await main();
  const { passed, failed } = total(results);
  progress.line(`${passed} passed, ${failed} failed`);
  process.exitCode = failed === 0 ? 0 : 1;
} catch (error) {
  progress.line(explain(error, "running the tests"));
  process.exitCode = error instanceof Interrupted ? 130 : 1;
}
