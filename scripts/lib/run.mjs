import { spawn } from "node:child_process";
import { stripVTControlCharacters } from "node:util";
import { CommandFailed, Interrupted } from "./trouble.mjs";

const KEPT_OUTPUT = 2_000_000;
const GRACE_MS = 8_000;

/** Sends a signal to a process and everything it started (children run as leaders of their own group). */
export function signalGroup(pid, signal) {
  try {
    process.kill(-pid, signal);
    return true;
  } catch (error) {
    if (error.code === "ESRCH") return false;
    throw error;
  }
}

/** Asks a child's group to end, insists after a while, and resolves when the child is gone. */
export async function endChild(child, graceMs = GRACE_MS) {
  if (child.exitCode === null && child.signalCode === null) {
    const gone = new Promise((resolve) => child.once("exit", resolve));
    signalGroup(child.pid, "SIGTERM");
    const insist = setTimeout(() => signalGroup(child.pid, "SIGKILL"), graceMs);
    await gone;
    clearTimeout(insist);
  }
  signalGroup(child.pid, "SIGKILL");
}

/** What was printed, line by line, without colours. */
function plainLines(chunk) {
  const lines = stripVTControlCharacters(chunk).split("\n");
  return lines.map((line) => line.trim()).filter(Boolean);
}

/**
 * Runs a command to its end and gives what it printed.
 * `name` is what the command is called where it has to be told. Rejects with CommandFailed on a code other than 0 (unless `anyCode`), with Interrupted when `signal` aborts.
 */
export function run(command, args, { cwd, env, signal, anyCode = false, onLine, name } = {}) {
  return new Promise((resolve, reject) => {
    if (signal?.aborted) return reject(new Interrupted());
    const child = spawn(command, args, { cwd, env, detached: true, stdio: ["ignore", "pipe", "pipe"] });
    let output = "";
    const take = (chunk) => {
      output = (output + chunk).slice(-KEPT_OUTPUT);
      if (onLine) for (const line of plainLines(chunk)) onLine(line);
    };
    child.stdout.setEncoding("utf8").on("data", take);
    child.stderr.setEncoding("utf8").on("data", take);
    const stop = () => void endChild(child);
    signal?.addEventListener("abort", stop, { once: true });
    child.on("error", (error) => {
      signal?.removeEventListener("abort", stop);
      reject(error);
    });
    child.on("close", (code, killedBy) => {
      signal?.removeEventListener("abort", stop);
      if (signal?.aborted) return reject(new Interrupted());
      if (code === 0 || anyCode) return resolve({ code, output });
      reject(
        new CommandFailed({ command: name ?? [command, ...args].join(" "), code, signal: killedBy, output }),
      );
    });
  });
}
