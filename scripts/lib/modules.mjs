import { createHash } from "node:crypto";
import { existsSync, readFileSync, writeFileSync } from "node:fs";
import path from "node:path";
import { readJson, ROOT } from "./home.mjs";
import { inTurn } from "./lock.mjs";
import { run } from "./run.mjs";
import { Trouble } from "./trouble.mjs";

const OLDEST_NODE = [20, 19];

/** Refuses a Node that is too old to run what follows. */
export function demandNode(version = process.versions.node) {
  const [major, minor] = version.split(".").map(Number);
  const [needMajor, needMinor] = OLDEST_NODE;
  if (major > needMajor || (major === needMajor && minor >= needMinor)) return;
  throw new Trouble(
    `Node ${version} is too old: Keepstep needs ${OLDEST_NODE.join(".")} or newer. Nothing was started or changed.`,
  );
}

/**
 * The packages of the lockfile that are not installed as locked, by their folder.
 * Compared with the record that npm writes at the end of an install; optional packages may be absent, and those that
 * nothing asks for (extraneous) are never installed.
 */
export function missingModules(lockfile, installed) {
  const have = installed?.packages ?? {};
  return Object.entries(lockfile.packages)
    .filter(([folder]) => folder !== "")
    .filter(([folder, locked]) => !locked.extraneous && !(locked.optional && !(folder in have)))
    .filter(([folder, locked]) => !sameModule(locked, have[folder]))
    .map(([folder]) => folder);
}

function sameModule(locked, have) {
  return have !== undefined && have.version === locked.version && have.integrity === locked.integrity;
}

const hashOf = (file) => createHash("sha256").update(readFileSync(file)).digest("hex");

/**
 * Installs the node modules as locked, those of development included; does nothing while they are as locked.
 * Two commands of one folder take turns, so that the second finds what the first installed.
 */
export function ensureModules({ say, signal, env = process.env }) {
  return inTurn({ folder: ROOT, name: "modules", signal }, () => installWhereLacking({ say, signal, env }));
}

async function installWhereLacking({ say, signal, env }) {
  const file = path.join(ROOT, "package-lock.json");
  const lockfile = readJson(file);
  if (!lockfile)
    throw new Trouble(
      `package-lock.json cannot be read in ${ROOT}. Nothing was changed. Restore the file from the repository.`,
    );
  const stamp = path.join(ROOT, "node_modules/.keepstep-lockfile");
  const stamped = existsSync(stamp) && readFileSync(stamp, "utf8") === hashOf(file);
  const installed = readJson(path.join(ROOT, "node_modules/.package-lock.json"));
  if (stamped || missingModules(lockfile, installed).length === 0) return say("installed as locked");
  const count = Object.keys(lockfile.packages).length - 1;
  say(`installing ${count} packages with npm ci; this takes a minute or two`);
  await run("npm", ["ci", "--include=dev", "--no-audit", "--no-fund"], {
    cwd: ROOT,
    env: { ...env, NODE_ENV: "development" },
    signal,
    name: "npm ci",
  });
  writeFileSync(stamp, hashOf(file));
  say(`${count} packages installed`);
}
