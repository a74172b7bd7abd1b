import { createHash } from "node:crypto";
import {
  chmodSync,
  chownSync,
  existsSync,
  lstatSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  realpathSync,
} from "node:fs";
import path from "node:path";
import { findProgram, installDebian, isExecutable } from "./debian.mjs";
import { run } from "./run.mjs";
import { Trouble } from "./trouble.mjs";

const SERVICE_USER = "postgres";
const isRoot = () => process.getuid() === 0;

/** The versions of PostgreSQL installed here, newest first: { version, bin: the folder of its programs }. */
export function installedPostgres(env = process.env) {
  const base = env.KEEPSTEP_POSTGRES_HOME || "/usr/lib/postgresql";
  const versions = (existsSync(base) ? readdirSync(base) : [])
    .filter((name) => /^\d+$/.test(name) && isExecutable(path.join(base, name, "bin/initdb")))
    .sort((a, b) => Number(b) - Number(a))
    .map((version) => ({ version, bin: path.join(base, version, "bin") }));
  const onPath = findProgram("initdb", env);
  if (versions.length > 0 || !onPath) return versions;
  return [{ version: undefined, bin: path.dirname(realpathSync(onPath)) }];
}

/** Makes sure that PostgreSQL's server programs are here; installs them where that is allowed. */
export async function ensurePostgres({ say, signal, env = process.env }) {
  if (installedPostgres(env).length === 0) {
    await installDebian({ what: "PostgreSQL", packages: ["postgresql"], say, signal, env });
    await stopDebiansOwn({ signal, env });
  }
  const [newest] = installedPostgres(env);
  if (!newest)
    throw new Trouble(
      "PostgreSQL was installed, but its program initdb cannot be found. Nothing else was changed. Set KEEPSTEP_POSTGRES_HOME to the folder that holds its versions.",
    );
  say(newest.version ? `version ${newest.version}` : newest.bin);
}

/** Right after an install Debian starts a cluster of its own, which nobody here asked for: it is kept, but stopped. */
async function stopDebiansOwn({ signal, env }) {
  if (!findProgram("pg_lsclusters", env)) return;
  const { output } = await run("pg_lsclusters", ["-h"], { signal, env, anyCode: true });
  for (const line of output.split("\n")) {
    const [version, name, , status] = line.trim().split(/\s+/);
    if (status?.startsWith("online"))
      await run("pg_ctlcluster", [version, name, "stop"], { signal, env, anyCode: true });
  }
}

/** The programs of the version that the data folder was made with; of the newest for a folder yet to be made. */
export function programsFor(data, env) {
  const mark = path.join(data, "PG_VERSION");
  const made = existsSync(mark) ? readFileSync(mark, "utf8").trim() : undefined;
  const installed = installedPostgres(env);
  const fit = installed.find(
    ({ version }) => made === undefined || version === undefined || version === made,
  );
  if (fit) return fit.bin;
  const have = installed.map(({ version }) => version).join(", ") || "none";
  throw new Trouble(
    `The database folder ${data} was made by PostgreSQL ${made}, but here is ${have}. Nothing in it was changed. Install PostgreSQL ${made}, or move the folder away to start with an empty database.`,
  );
}

/** Runs a program as the user who owns the database. PostgreSQL refuses to run as root. */
export function runAsOwner(file, args, options) {
  const how = { cwd: "/", ...options };
  return isRoot() ? run("runuser", ["-u", SERVICE_USER, "--", file, ...args], how) : run(file, args, how);
}

/**
 * Where a cluster lives: { base, data, log, give }; `give` hands a file to the user who owns the database.
 * Where, as root, the service user cannot walk to the folder (a closed parent), it lives under /var/tmp.
 */
export async function findPlace({ home, name, signal }) {
  if (!isRoot()) return layOut({ base: path.join(home, name), give: () => undefined });
  const [uid, gid] = await serviceIds(signal);
  const reach = await runAsOwner("test", ["-x", home], { signal, anyCode: true });
  const hash = createHash("sha256").update(home).digest("hex").slice(0, 12);
  const base = reach.code === 0 ? path.join(home, name) : path.join("/var/tmp", `keepstep-${name}-${hash}`);
  return layOut({ base, owner: uid, give: (file) => chownSync(file, uid, gid) });
}

async function serviceIds(signal) {
  const ids = await run("sh", ["-c", `id -u ${SERVICE_USER} && id -g ${SERVICE_USER}`], {
    signal,
    anyCode: true,
  });
  if (ids.code === 0) return ids.output.trim().split("\n").map(Number);
  throw new Trouble(
    `PostgreSQL does not run as root, and there is no user ${SERVICE_USER} to run it as. Nothing was changed. Run this as an ordinary user, or install the Debian package postgresql.`,
  );
}

function layOut({ base, give, owner }) {
  mkdirSync(base, { recursive: true, mode: 0o711 });
  const held = lstatSync(base);
  if (!held.isDirectory() || (owner !== undefined && held.uid !== 0 && held.uid !== owner))
    throw new Trouble(
      `${base} is needed for the database, but belongs to somebody else. Nothing was changed. Move it away, or set KEEPSTEP_HOME to another folder.`,
    );
  chmodSync(base, 0o711);
  give(base);
  return { base, give, data: path.join(base, "data"), log: path.join(base, "postgres.log") };
}
