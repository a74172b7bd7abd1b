import { spawn } from "node:child_process";
import { closeSync, existsSync, openSync, readFileSync, renameSync } from "node:fs";
import { setTimeout as delay } from "node:timers/promises";
import { NEXT } from "./build.mjs";
import { ROOT } from "./home.mjs";
import { endChild } from "./run.mjs";
import { Interrupted, lastLines, Trouble } from "./trouble.mjs";

const READY_WITHIN_MS = 120_000;

/**
 * Starts the built desk on 127.0.0.1 and waits until it says that it is well.
 * Gives { pid, ended, stop }; `ended` resolves with a sentence should the server end by itself.
 */
export async function startServer({ port, env, logFile, signal }) {
  if (existsSync(logFile)) renameSync(logFile, `${logFile}.1`);
  const log = openSync(logFile, "a", 0o600);
  const child = spawn(process.execPath, [NEXT, "start", "-H", "127.0.0.1", "-p", String(port)], {
    cwd: ROOT,
    env: { ...env, NODE_ENV: "production", NEXT_TELEMETRY_DISABLED: "1", NEXT_MANUAL_SIG_HANDLE: "1" },
    detached: true,
    stdio: ["ignore", log, log],
  });
  closeSync(log);
  const ended = new Promise((resolve) => {
    child.once("error", (error) => resolve(`The server cannot be started (${error.message}).`));
    child.once("exit", (code, killedBy) =>
      resolve(
        `The server ended by itself (${killedBy ?? `code ${code}`}): ${lastLines(readFileSync(logFile, "utf8"))}.`,
      ),
    );
  });
  const stop = () => (child.pid === undefined ? Promise.resolve() : endChild(child));
  try {
    await ready({ url: `http://127.0.0.1:${port}/api/v1/health`, ended, signal, logFile });
  } catch (error) {
    await stop();
    throw error;
  }
  return { pid: child.pid, ended, stop };
}

async function ready({ url, ended, signal, logFile }) {
  let failure;
  void ended.then((sentence) => (failure = sentence));
  let answer = "no answer";
  for (const from = Date.now(); Date.now() - from < READY_WITHIN_MS;) {
    if (signal?.aborted) throw new Interrupted();
    if (failure) throw new Trouble(`${failure} The data are kept; its whole log is ${logFile}.`);
    const response = await fetch(url, { signal: AbortSignal.timeout(5_000) }).catch(() => undefined);
    if (response?.ok) return;
    if (response) answer = `${response.status} ${lastLines(await response.text(), 1).slice(0, 200)}`;
    await delay(200);
  }
  throw new Trouble(
    `The server was started, but is not well after ${READY_WITHIN_MS / 1000} s (${url} gives ${answer}). The data are kept; its log is ${logFile}.`,
  );
}
