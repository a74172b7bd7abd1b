import { mkdirSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { chooseParts, readArguments } from "./lib/arguments.mjs";
import { testCluster } from "./lib/cluster.mjs";
import { countVitest, total } from "./lib/counts.mjs";
import { ensureHome, homeFolder, readJson, ROOT } from "./lib/home.mjs";
import { takeLock } from "./lib/lock.mjs";
import { demandNode, ensureModules } from "./lib/modules.mjs";
import { ensurePostgres } from "./lib/postgres.mjs";
import { createProgress } from "./lib/progress.mjs";
import { run } from "./lib/run.mjs";
import { CommandFailed, explain, Interrupted } from "./lib/trouble.mjs";

const PARTS = ["static", "unit", "integration"];
const DIST_DIR = ".next-test";
const TSCONFIG = "tsconfig.test.json";
const SHOWN_LINES = 80;

const interrupt = new AbortController();
const { signal } = interrupt;
const progress = createProgress();
const results = [];

for (const name of ["SIGINT", "SIGTERM", "SIGHUP"]) process.on(name, () => interrupt.abort());

const binary = (file) => path.join(ROOT, "node_modules", file);

/** Runs one part's command; a failure is counted and shown, and the rest goes on. */
async function prove({ name, work, logs }) {
  let result = { passed: 0, failed: 1 };
  let output = "";
  const perform = async (say) => {
    try {
      ({ output, ...result } = await work(say));
    } catch (error) {
      if (error instanceof Interrupted) throw error;
      output = error instanceof CommandFailed ? error.output : explain(error, `running ${name}`);
      if (error.counts) result = error.counts;
    }
    say(`${result.passed} passed, ${result.failed} failed`);
    if (result.failed > 0) throw new Error(name);
  };
  await progress.step(name, perform).catch((error) => {
    if (error instanceof Interrupted) throw error;
    progress.line(
      output
        .trimEnd()
        .split("\n")
        .slice(-SHOWN_LINES)
        .map((line) => `    ${line}`)
        .join("\n"),
    );
  });
  writeFileSync(path.join(logs, `${name.replaceAll(" ", "-")}.log`), output);
  results.push(result);
}

/** A static check: it passes or fails as one. */
const check =
  ({ args, env }) =>
  async () => {
    const { output } = await run(process.execPath, args, { cwd: ROOT, env, signal });
    return { output, passed: 1, failed: 0 };
  };

/** A run of Vitest: its tests are counted from its report, whatever its exit code. */
const vitest =
  ({ projects, env, logs }) =>
  async (say) => {
    const report = path.join(logs, `${projects.join("-")}.json`);
    rmSync(report, { force: true });
    const flags = projects.flatMap((project) => ["--project", project]);
    const args = [binary("vitest/vitest.mjs"), "run", ...flags, "--passWithNoTests"];
    const reporters = ["--reporter=default", "--reporter=json", `--outputFile.json=${report}`];
    let files = 0;
    const onLine = (line) => /^[✓❯×]/.test(line) && say(`${(files += 1)} files done`);
    const { code, output } = await run(process.execPath, [...args, ...reporters], {
      cwd: ROOT,
      env,
      signal,
      anyCode: true,
      onLine,
    });
    const counts = countVitest(readJson(report));
    return { output, passed: counts.passed, failed: Math.max(counts.failed, code === 0 ? 0 : 1) };
  };

async function proveStatic({ env, logs }) {
  await prove({
    name: "format",
    logs,
    work: check({ env, args: [binary("prettier/bin/prettier.cjs"), "--check", "."] }),
  });
  await prove({ name: "lint", logs, work: check({ env, args: [binary("eslint/bin/eslint.js"), "."] }) });
  const types = async () => {
    await check({ env, args: [binary("next/dist/bin/next"), "typegen"] })();
    return check({ env, args: [binary("typescript/bin/tsc"), "--noEmit", "--project", TSCONFIG] })();
  };
  await prove({ name: "types", logs, work: types });
}

async function proveIntegration({ env, logs, home }) {
  await progress.step("PostgreSQL", (say) => ensurePostgres({ say, signal }));
  const cluster = testCluster({ home, signal });
  try {
    await progress.step("Database", async (say) => {
      await cluster.start(say);
      say("ready");
    });
    const work = vitest({ projects: ["integration"], logs, env: { ...env, DATABASE_URL: cluster.url } });
    await prove({ name: "integration", logs, work });
  } finally {
    await cluster.stop();
  }
}

async function main() {
  const args = readArguments(process.argv.slice(2), { only: "text", long: "flag" });
  const parts = chooseParts(args.only, PARTS);
  demandNode();
  const home = ensureHome(homeFolder());
  const lock = await takeLock({
    folder: home,
    name: "test",
    describe: () => `The tests already run in this folder (process ${process.pid}).`,
  });
  const logs = path.join(home, "test-logs");
  mkdirSync(logs, { recursive: true });
  const env = {
    ...process.env,
    NEXT_TELEMETRY_DISABLED: "1",
    KEEPSTEP_DIST_DIR: DIST_DIR,
    KEEPSTEP_TSCONFIG: TSCONFIG,
    ...(args.long ? { KEEPSTEP_LONG: "1" } : {}),
  };
  await progress.step("Node modules", (say) => ensureModules({ say, signal }));
  if (parts.includes("static")) await proveStatic({ env, logs });
  if (parts.includes("unit"))
    await prove({ name: "unit", logs, work: vitest({ projects: ["unit", "components"], env, logs }) });
  if (parts.includes("integration")) await proveIntegration({ env, logs, home });
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
