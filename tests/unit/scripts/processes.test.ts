import { spawn } from "node:child_process";
import { once } from "node:events";
import { mkdtempSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterEach, beforeEach, describe, expect, test } from "vitest";
import { createUsers, identify, living } from "../../../scripts/lib/processes.mjs";

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(path.join(tmpdir(), "keepstep-users-"));
});
afterEach(() => rmSync(folder, { recursive: true }));

const sleeper = async () => {
  const child = spawn("sleep", ["60"]);
  await once(child, "spawn");
  return child;
};

test("a process is found by its name while it lives, and a number used again is no match", async () => {
  const child = await sleeper();
  const name = identify(child.pid!)!;
  expect(living(name)).toBe(child.pid);
  expect(living(`${child.pid}-1`)).toBeUndefined();
  child.kill("SIGKILL");
  await once(child, "exit");
  expect(living(name)).toBeUndefined();
});

describe("users of a shared thing", () => {
  test("are the living others; oneself does not count", async () => {
    const users = createUsers(folder);
    users.enter();
    expect(users.others()).toBe(false);
    const child = await sleeper();
    writeFileSync(path.join(folder, identify(child.pid!)!), "");
    expect(users.others()).toBe(true);
    child.kill("SIGKILL");
    await once(child, "exit");
    expect(users.others()).toBe(false);
  });

  test("who died are cleared away, and who leaves is gone", () => {
    const users = createUsers(folder);
    writeFileSync(path.join(folder, "1234567-1"), "");
    users.enter();
    users.others();
    expect(readdirSync(folder)).toEqual([identify(process.pid)]);
    users.leave();
    expect(readdirSync(folder)).toEqual([]);
  });
});
