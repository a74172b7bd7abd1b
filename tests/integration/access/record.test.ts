import { beforeAll, describe, expect, test } from "vitest";
import { sequelize } from "@/lib/server/sequelize";
import type { RecordQuery } from "@/lib/schemas/record";
import { recordQuery } from "@/lib/schemas/record";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord, type RecordEntry } from "@/lib/services/record/append";
import { recordOfObject } from "@/lib/services/record/of-object";
import { searchRecord } from "@/lib/services/record/search";
import { verifyChain } from "@/lib/services/record/verify-chain";
import { RecordEvent } from "@/models/record";
import type { TestPerson } from "@/tests/support/world";
import { person, unique } from "@/tests/support/world";

let viewer: TestPerson;
let engineer: TestPerson;
beforeAll(async () => {
  [viewer, engineer] = [await person("viewer"), await person("engineer")];
});

const append = (entry: Partial<RecordEntry> = {}, now = new Date()) =>
  withTransaction({ ...engineer, now }, (tx) =>
    appendRecord(tx, {
      action: "reading.kept",
      object: { type: "reading", id: crypto.randomUUID(), label: "LD-0042, as found" },
      ...entry,
    }),
  );

const labelled = (label: string) => ({ type: "reading", id: crypto.randomUUID(), label });

describe("searching the record", () => {
  const found = async (query: Partial<Record<keyof RecordQuery, unknown>>) =>
    (await searchRecord(viewer, recordQuery.parse(query))).items;
  const labels = async (query: Partial<Record<keyof RecordQuery, unknown>>) =>
    (await found(query)).map(({ objectLabel }) => objectLabel);

  test("finds every word or its beginning: the object, the act, the actor, the reason", async () => {
    const word = unique("w").replaceAll("-", "");
    await append({
      object: labelled(`${word} gantry`),
      action: "change.taken_back",
      reason: "belt slipped at 0,8 m/s",
    });
    for (const q of [word, `${word} gant`, `${word} taken`, `${word} BELT`, `${word} ${engineer.actor.name}`])
      expect(await labels({ q }), q).toEqual([`${word} gantry`]);
    expect(await labels({ q: `${word} nowhere` })).toEqual([]);
  });

  test("finds serial numbers with hyphens and takes any signs as words", async () => {
    const serial = `LD-${unique("7").slice(-8)}`;
    await append({ object: labelled(serial) });
    expect(await labels({ q: serial })).toEqual([serial]);
    for (const q of ["'", "\\", "a & ! |", ":*", "'; drop table users --", "%"])
      await expect(labels({ q }), q).resolves.toEqual(expect.any(Array));
  });

  test("narrows by act, kind of act, object, machine, change and actor", async () => {
    const [machineId, changeId] = [crypto.randomUUID(), crypto.randomUUID()];
    const object = labelled(unique("one"));
    await append({ object, action: "change.applied", machineId, changeId });
    const all = { actorId: engineer.actor.id };
    expect(await labels({ ...all, machineId })).toEqual([object.label]);
    expect(await labels({ ...all, changeId, action: "change." })).toEqual([object.label]);
    expect(await labels({ changeId, action: "change.applied" })).toEqual([object.label]);
    expect(await labels({ changeId, action: "change.released" })).toEqual([]);
    expect(await labels({ changeId, action: "reading." })).toEqual([]);
    expect(await labels({ objectType: "reading", objectId: object.id })).toEqual([object.label]);
    expect(await labels({ changeId, actor: engineer.actor.name.slice(2, 9) })).toEqual([object.label]);
    expect(await labels({ changeId, actorId: viewer.actor.id })).toEqual([]);
  });

  test("takes whole days, the first and the last among them", async () => {
    const changeId = crypto.randomUUID();
    for (const at of ["2031-05-01T00:00:00Z", "2031-05-02T12:00:00Z", "2031-05-03T23:59:59.999Z"])
      await append({ object: labelled(at.slice(0, 10)), changeId }, new Date(at));
    expect(await labels({ changeId, from: "2031-05-01", to: "2031-05-02" })).toEqual([
      "2031-05-02",
      "2031-05-01",
    ]);
    expect(await labels({ changeId, from: "2031-05-02", to: "2031-05-03" })).toHaveLength(2);
    expect(await labels({ changeId, to: "2031-05-02T11:59:59Z" })).toEqual(["2031-05-01"]);
  });

  test("pages newest first", async () => {
    const changeId = crypto.randomUUID();
    for (const label of ["first", "second", "third"]) await append({ object: labelled(label), changeId });
    const page = await searchRecord(viewer, recordQuery.parse({ changeId, page: 2, pageSize: 2 }));
    expect([page.total, page.items.map(({ objectLabel }) => objectLabel)]).toEqual([3, ["first"]]);
  });

  test("gives an object its own acts, and a machine those on other objects that bear on it", async () => {
    const machineId = crypto.randomUUID();
    const machine = { type: "machine", id: machineId, label: "LD-7" };
    await append({ action: "machine.created", object: machine, machineId });
    await append({ machineId });
    const acts = await recordOfObject(viewer, machine);
    expect(acts.map(({ action }) => action)).toEqual(["reading.kept", "machine.created"]);
  });
});

describe("the chain of the record", () => {
  test("takes no change, no deletion and no emptying, not even by the owner of the table", async () => {
    await append();
    const event = (await RecordEvent.findOne())!;
    await expect(event.update({ reason: "other" })).rejects.toThrow(/record_events is append-only/);
    await expect(event.destroy()).rejects.toThrow(/record_events is append-only/);
    await expect(sequelize.query("truncate record_events")).rejects.toThrow(/record_events is append-only/);
  });

  test("rolls back with its act", async () => {
    const id = crypto.randomUUID();
    const act = withTransaction(engineer, async (tx) => {
      await appendRecord(tx, { action: "reading.kept", object: { type: "reading", id, label: "x" } });
      throw new Error("the act fails");
    });
    await expect(act).rejects.toThrow("the act fails");
    expect(await RecordEvent.count({ where: { objectId: id } })).toBe(0);
  });

  test("holds with many writers at once, and says so", async () => {
    await Promise.all(Array.from({ length: 20 }, () => append({ after: { b: 1, a: [null, "ü", 0.1] } })));
    const verdict = await verifyChain(viewer);
    expect(verdict.brokenAt).toBeNull();
    expect(verdict.events).toBe(await RecordEvent.count());
    expect(verdict.sentence).toMatch(/^The record is whole: [\d,]+ acts/);
  });

  /** What somebody with the rights of the database's owner could do behind the desk's back; undone afterwards. */
  async function tampered(statement: string, bind: unknown[], look: () => Promise<void>): Promise<void> {
    const switched = (how: string) => sequelize.query(`alter table record_events ${how} trigger user`);
    await sequelize.query("create table kept_events as select * from record_events");
    await switched("disable");
    try {
      await sequelize.query(statement, { bind });
      await look();
    } finally {
      await sequelize.query("delete from record_events");
      await sequelize.query("insert into record_events select * from kept_events");
      await switched("enable");
      await sequelize.query("drop table kept_events");
    }
  }

  const someSeq = async () => {
    for (let count = 0; count < 3; count += 1) await append();
    const [, event] = await RecordEvent.findAll({ order: [["seq", "DESC"]], limit: 2 });
    return event!.seq;
  };

  test.each([
    ["a reason", "update record_events set reason = 'otherwise' where seq = $1"],
    ["a name", "update record_events set actor_name = 'Somebody' where seq = $1"],
    ["a time", "update record_events set at = at + interval '1 second' where seq = $1"],
    ["what was before", "update record_events set before = '{\"a\": 1}' where seq = $1"],
    ["a hash", "update record_events set hash = repeat('a', 64) where seq = $1"],
  ])("breaks at the act in which %s was altered", async (_what, statement) => {
    const seq = await someSeq();
    await tampered(statement, [seq], async () => {
      const verdict = await verifyChain(viewer);
      expect(verdict.brokenAt).toBe(seq);
      expect(verdict.sentence).toContain(`does not hold at number ${seq}`);
    });
    expect((await verifyChain(viewer)).brokenAt).toBeNull();
  });

  test("breaks at the act after one that was taken out", async () => {
    const seq = await someSeq();
    await tampered("delete from record_events where seq = $1", [seq], async () => {
      expect((await verifyChain(viewer)).brokenAt).toBe(String(Number(seq) + 1));
    });
  });
});
