import { readdirSync, readFileSync, rmSync, writeFileSync, mkdirSync } from "node:fs";
import path from "node:path";

/**
 * When a process started, in clock ticks since the machine did; undefined when it is gone.
 * Together with its number it names a process for good: numbers are used again.
 */
export function startOf(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, "utf8");
    const fields = stat.slice(stat.lastIndexOf(")") + 2).split(" ");
    return fields[0] === "Z" ? undefined : fields[19];
  } catch {
    return undefined;
  }
}

/** A name for a process that no other process will have. */
export function identify(pid) {
  const started = startOf(pid);
  return started && `${pid}-${started}`;
}

/** The number of the process of that name while it lives. */
export function living(name) {
  const pid = Number(name.split("-")[0]);
  return identify(pid) === name ? pid : undefined;
}

/** Who uses something that several processes share: one file a process; those of dead processes do not count. */
export function createUsers(folder) {
  const own = () => path.join(folder, identify(process.pid));
  return {
    enter() {
      mkdirSync(folder, { recursive: true, mode: 0o700 });
      writeFileSync(own(), "");
    },
    leave() {
      rmSync(own(), { force: true });
    },
    /** Whether any other living process uses it; clears what dead ones left. */
    others() {
      const names = readdirSync(folder, { withFileTypes: true }).map(({ name }) => name);
      const dead = names.filter((name) => living(name) === undefined);
      for (const name of dead) rmSync(path.join(folder, name), { force: true });
      return names.some((name) => !dead.includes(name) && name !== identify(process.pid));
    },
  };
}
