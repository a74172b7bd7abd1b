import { accessSync, constants } from "node:fs";
import path from "node:path";
import { run } from "./run.mjs";
import { Trouble } from "./trouble.mjs";

const isRoot = () => process.getuid() === 0;

export function isExecutable(file) {
  try {
    accessSync(file, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

/** The full path of a program on PATH, or undefined. */
export function findProgram(name, env = process.env) {
  return (env.PATH ?? "")
    .split(":")
    .filter(Boolean)
    .map((folder) => path.join(folder, name))
    .find(isExecutable);
}

/** Installs Debian packages; says plainly why not when this user may not. */
export async function installDebian({ what, packages, say, signal, env = process.env }) {
  const command = `apt-get install -y ${packages.join(" ")}`;
  const cure = `Nothing was changed. Run this as root, then run the same command again: ${command}`;
  if (!isRoot()) throw new Trouble(`${what} is not installed, and this user may not install it. ${cure}`);
  if (!findProgram("apt-get", env))
    throw new Trouble(`${what} is not installed, and there is no apt-get here to install it with. ${cure}`);
  const options = { cwd: "/", env: { ...env, DEBIAN_FRONTEND: "noninteractive" }, signal };
  say(`installing the Debian packages ${packages.join(", ")}`);
  await run("apt-get", ["update", "-q"], { ...options, anyCode: true });
  await run("apt-get", ["install", "-y", "-q", "--no-install-recommends", ...packages], options);
}
