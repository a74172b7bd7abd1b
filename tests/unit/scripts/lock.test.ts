import { spawn } from "node:child_process";
import { once } from "node:events";
import path from "node:path";
import { describe, expect, test } from "vitest";
import { inTurn, takeLock } from "../../../scripts/lib/lock.mjs";

const folder = `/keepstep-lock-test-${process.pid}`;
const lockModule = path.resolve(__dirname, "../../../scripts/lib/lock.mjs");

describe("a lock", () => {
  test("refuses a second holder and tells who the first is, until it is released", async () => {
    const lock = await takeLock({ folder, name: "one", describe: () => "The first runs." });
    const second = () => takeLock({ folder, name: "one", describe: () => "" });
    await expect(second()).rejects.toThrow("The first runs. Nothing was started or changed.");
    await lock.release();
    await (await second()).release();
  });

  test("of another folder or name is another lock", async () => {
    const held = await Promise.all([
      takeLock({ folder, name: "one", describe: () => "" }),
      takeLock({ folder, name: "two", describe: () => "" }),
      takeLock({ folder: `${folder}-b`, name: "one", describe: () => "" }),
    ]);
    await Promise.all(held.map((lock) => lock.release()));
  });

  test("is free again when its holder is killed", async () => {
    const code = `import(${JSON.stringify(lockModule)}).then(async ({ takeLock }) => {
      await takeLock({ folder: ${JSON.stringify(folder)}, name: "killed", describe: () => "The child." });
      console.log("held");
      setInterval(() => {}, 1000);
    })`;
    const child = spawn(process.execPath, ["-e", code]);
    await once(child.stdout, "data");
    const take = () => takeLock({ folder, name: "killed", describe: () => "" });
    await expect(take()).rejects.toThrow("The child.");
    child.kill("SIGKILL");
    await once(child, "exit");
    await (await take()).release();
  });

  test("taken in turn never has two holders", async () => {
    let inside = 0;
    let most = 0;
    const work = async () => {
      most = Math.max(most, (inside += 1));
      await new Promise((resolve) => setTimeout(resolve, 20));
      inside -= 1;
    };
    await Promise.all([1, 2, 3].map(() => inTurn({ folder, name: "turn" }, work)));
    expect(most).toBe(1);
  });
});
