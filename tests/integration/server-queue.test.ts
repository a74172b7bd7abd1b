import { setTimeout as delay } from "node:timers/promises";
import { afterAll, beforeAll, expect, test } from "vitest";
import { enqueue, ensureQueue, startQueue, stopQueue } from "@/lib/server/queue";
import { sequelize } from "@/lib/server/sequelize";

beforeAll(() => startQueue({ tend: false }));
afterAll(async () => {
  await stopQueue();
  await sequelize.close();
});

/** Takes every waiting job of a queue. */
async function take(name: string): Promise<object[]> {
  const boss = await startQueue({ tend: false });
  return (await boss.fetch<object>(name, { batchSize: 100 })).map(({ data }) => data);
}

test("a job waits in its queue until it is worked on", async () => {
  await enqueue("plain", { machine: 7, note: "cost in $1 and $$ and :name" });
  expect(await take("plain")).toEqual([{ machine: 7, note: "cost in $1 and $$ and :name" }]);
});

test("a job of a transaction exists once it commits", async () => {
  await ensureQueue("committed");
  await sequelize.transaction(async (transaction) => {
    await enqueue("committed", { note: "cost in $1 and $$ and :name" }, { transaction });
    expect(await take("committed")).toEqual([]);
  });
  expect(await take("committed")).toEqual([{ note: "cost in $1 and $$ and :name" }]);
});

test("a job of a transaction that is undone never was", async () => {
  const undone = sequelize.transaction(async (transaction) => {
    await enqueue("undone", {}, { transaction });
    throw new Error("The act is undone.");
  });
  await expect(undone).rejects.toThrow("The act is undone.");
  expect(await take("undone")).toEqual([]);
});

test("a job of the same key waits once", async () => {
  const once = { singletonKey: "model-1", singletonSeconds: 60 };
  expect(await enqueue("single", {}, once)).not.toBeNull();
  expect(await enqueue("single", {}, once)).toBeNull();
  expect(await take("single")).toHaveLength(1);
});

test("a job that fails is tried again", async () => {
  const boss = await startQueue({ tend: false });
  await ensureQueue("again", { retryDelay: 0, retryBackoff: false });
  let tries = 0;
  await boss.work("again", { pollingIntervalSeconds: 0.5 }, async () => {
    tries += 1;
    if (tries === 1) throw new Error("The first time fails.");
  });
  await enqueue("again", {});
  for (let waited = 0; tries < 2 && waited < 50; waited += 1) await delay(100);
  expect(tries).toBe(2);
  await boss.offWork("again");
});
