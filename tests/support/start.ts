import type { ChildProcess, SpawnOptions } from "node:child_process";
import { spawn } from "node:child_process";
import { chmodSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import path from "node:path";
import { setTimeout as delay } from "node:timers/promises";
import { isFree } from "../../scripts/lib/ports.mjs";

export const ROOT = path.resolve(__dirname, "../..");
const TEST_ONLY = /^(DATABASE_URL|SMTP_URL|NEXTAUTH_|npm_|VITEST|NODE_ENV|NODE_OPTIONS|PORT$|TZ$)/;

export interface Ended {
  readonly code: number | null;
  readonly output: string;
  /** What was said on standard error, on one line. */
  readonly sentence: string;
}

export interface Started {
  readonly child: ChildProcess;
  readonly ended: Promise<Ended>;
  /** Resolves once the output holds this text. */
  said(text: string): Promise<void>;
  /** What it printed so far. */
  output(): string;
}

/** A folder for generated state that the database's own user can reach too. */
export function makeHome(): string {
  const home = mkdtempSync(path.join(tmpdir(), "keepstep-start-"));
  chmodSync(home, 0o711);
  return home;
}

export function removeHome(home: string): void {
  rmSync(home, { recursive: true, force: true });
}

/** The environment of a person who just cloned the repository. */
export function cleanEnvironment(changes: Readonly<Record<string, string>>): NodeJS.ProcessEnv {
  const kept = Object.entries(process.env).filter(([name]) => !TEST_ONLY.test(name));
  return { ...Object.fromEntries(kept), ...changes } as NodeJS.ProcessEnv;
}

/** Runs the start script as its own process. */
export function startDesk(
  env: Readonly<Record<string, string>>,
  { args = [], root = ROOT, ...options }: SpawnOptions & { args?: readonly string[]; root?: string } = {},
): Started {
  const script = path.join(root, "scripts/start.mjs");
  return watch(
    spawn(process.execPath, [script, ...args], { cwd: root, env: cleanEnvironment(env), ...options }),
  );
}

/** Runs `npm start`, as a person does. */
export function startByNpm(env: Readonly<Record<string, string>>, args: readonly string[]): Started {
  return watch(spawn("npm", ["start", "--", ...args], { cwd: ROOT, env: cleanEnvironment(env) }));
}

function watch(child: ChildProcess): Started {
  let output = "";
  let sentence = "";
  child.stdout?.setEncoding("utf8").on("data", (chunk: string) => (output += chunk));
  child.stderr?.setEncoding("utf8").on("data", (chunk: string) => (sentence += chunk));
  const ended = new Promise<Ended>((resolve, reject) => {
    child.once("error", reject);
    child.once("close", (code) => resolve({ code, output, sentence: sentence.trim() }));
  });
  const said = async (text: string) => {
    while (!output.includes(text)) {
      if (child.exitCode !== null) {
        const { code } = await ended;
        if (!output.includes(text))
          throw new Error(`It ended (${code}) before it said "${text}": ${output}${sentence}`);
      }
      await delay(50);
    }
  };
  return { child, ended, said, output: () => output };
}

/** Command lines of the living processes that work for this folder. */
export function processesOf(home: string): string[] {
  const read = (pid: string, file: string) => {
    try {
      return readFileSync(`/proc/${pid}/${file}`, "utf8").replaceAll("\0", " ");
    } catch {
      return "";
    }
  };
  return readdirSync("/proc")
    .filter((name) => /^\d+$/.test(name) && Number(name) !== process.pid)
    .map((pid) => ({ command: read(pid, "cmdline"), environment: read(pid, "environ") }))
    .filter(
      ({ command, environment }) => command.includes(home) || environment.includes(`KEEPSTEP_HOME=${home}`),
    )
    .map(({ command }) => command);
}

/** A folder of PostgreSQL versions whose initdb is this shell script. */
export function fakePostgres(home: string, initdb: string): string {
  const bin = path.join(home, "postgres/15/bin");
  mkdirSync(bin, { recursive: true });
  for (const name of ["initdb", "pg_ctl"]) {
    writeFileSync(path.join(bin, name), `#!/bin/sh\n${initdb}\n`);
    chmodSync(path.join(bin, name), 0o755);
  }
  return path.join(home, "postgres");
}

/** Holds a port of 127.0.0.1, as some other program would. */
export async function holdPort(): Promise<{ port: number; release: () => Promise<void> }> {
  const server = createServer();
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  const address = server.address();
  if (address === null || typeof address === "string") throw new Error("No port was given.");
  return { port: address.port, release: () => new Promise((resolve) => server.close(() => resolve())) };
}

/**
 * A port that was free a moment ago, below those that the system hands out for outgoing connections: one of these
 * could hold it by the time it is wanted.
 */
export async function freePort(): Promise<string> {
  for (;;) {
    const port = 20_000 + Math.floor(Math.random() * 12_000);
    if (await isFree(port)) return String(port);
  }
}
