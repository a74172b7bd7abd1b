import { mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { fileURLToPath } from "node:url";

/** The repository's root folder. */
export const ROOT = fileURLToPath(new URL("../..", import.meta.url)).replace(/\/$/, "");

/** The folder of everything generated: database, ports, secrets, mails. KEEPSTEP_HOME moves it. */
export function homeFolder(env = process.env) {
  return path.resolve(ROOT, env.KEEPSTEP_HOME || ".keepstep");
}

/** Makes the folder; others may walk through it (the database's own user must), not list it. */
export function ensureHome(home) {
  mkdirSync(home, { recursive: true, mode: 0o711 });
  return home;
}

/** What a JSON file holds; undefined when there is none or it cannot be read as JSON. */
export function readJson(file) {
  try {
    return JSON.parse(readFileSync(file, "utf8"));
  } catch (error) {
    if (error.code === "ENOENT" || error instanceof SyntaxError) return undefined;
    throw error;
  }
}

/** Writes a file whole or not at all; only this user may read it. */
export function writePrivate(file, content) {
  const draft = `${file}.${process.pid}.tmp`;
  try {
    writeFileSync(draft, content, { mode: 0o600 });
    renameSync(draft, file);
  } catch (error) {
    rmSync(draft, { force: true });
    throw error;
  }
}

export function writeJson(file, value) {
  writePrivate(file, `${JSON.stringify(value, null, 2)}\n`);
}
