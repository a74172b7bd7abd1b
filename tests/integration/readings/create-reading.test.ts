import { beforeAll, describe, expect, test } from "vitest";
import { Reading, Revision, FileContent, Evaluation } from "@/models/revisions";
import { RecordEvent } from "@/models/record";
import { sha256 } from "@/lib/services/kernel/hash";
import { showReading } from "@/lib/services/readings/show";
import { readingFile } from "@/lib/services/readings/file";
import { listReadings } from "@/lib/services/readings/list";
import { retireMachine } from "@/lib/services/machines/retire";
import { machine } from "@/tests/support/world";
import { at, configuration, fleet, readingOf, requireText, type Fleet } from "@/tests/support/fleet";

let world: Fleet;
beforeAll(async () => {
  world = await fleet();
});

const refusalOf = async (work: Promise<unknown>) =>
  work.then(
    () => ({ code: "none", message: "", pointer: null as string | null }),
    (error: { code: string; message: string; pointer: string | null }) => error,
  );

const base64 = (bytes: Uint8Array | string, encoding: BufferEncoding = "utf8") =>
  (typeof bytes === "string" ? Buffer.from(bytes, encoding) : Buffer.from(bytes)).toString("base64");

describe("a reading", () => {
  test("is kept with its evaluation, its record and the machine's standing", async () => {
    const { technician, machineId } = world;
    const kept = await readingOf(technician, { machineId, text: configuration() });
    expect(kept.unchanged).toBe(false);
    expect(kept.parameters).toBe(12);
    expect(kept.levels.within + kept.levels.near + kept.levels.over + kept.levels.cannot).toBeGreaterThan(10);
    expect(kept.machine).toMatchObject({ standing: "cannot", sentence: expect.stringContaining("baseline") });
    expect(kept.step).toBeNull();
    const event = await RecordEvent.findOne({ where: { action: "reading.kept", objectId: kept.id } });
    expect(event).toMatchObject({ machineId, actorName: technician.actor.name });
    expect(await Evaluation.count({ where: { id: kept.evaluationId } })).toBe(1);
  });

  test("sent twice with one key is kept once and answered alike", async () => {
    const { technician, machineId } = world;
    const send = () =>
      readingOf(technician, {
        machineId,
        text: configuration({ speed: "210" }),
        idempotencyKey: "key-of-one-send",
      });
    const answers = await Promise.all([send(), send(), send()]);
    expect(new Set(answers.map(({ id }) => id)).size).toBe(1);
    expect(await Reading.count({ where: { id: answers[0]!.id } })).toBe(1);
    expect(await RecordEvent.count({ where: { action: "reading.kept", objectId: answers[0]!.id } })).toBe(1);
    const other = await refusalOf(
      readingOf(technician, { machineId, text: configuration(), idempotencyKey: "key-of-one-send" }),
    );
    expect(other.code).toBe("conflict");
  });

  test("that is unchanged stores no second content and no second evaluation", async () => {
    const { technician, machineId } = world;
    const text = configuration({ speed: "220" });
    const first = await readingOf(technician, { machineId, text });
    const before = [await Revision.count(), await FileContent.count(), await Evaluation.count()];
    const again = await readingOf(at(technician, 60), { machineId, text, kind: "in_service" });
    expect(again).toMatchObject({ unchanged: true, revisionId: first.revisionId });
    expect([await Revision.count(), await FileContent.count(), await Evaluation.count()]).toEqual(before);
    expect(await Reading.count({ where: { revisionId: first.revisionId } })).toBe(2);
  });

  test("keeps its bytes as they are: Latin-1, byte order mark, line ends of every kind", async () => {
    const { technician, machineId, viewer } = world;
    const latin = Buffer.from("# d\xfcse\r\n[axis.x]\rrun_ma = 800\n", "latin1");
    const marked = Buffer.concat([Buffer.from([0xef, 0xbb, 0xbf]), Buffer.from("[axis.y]\nrun_ma = 700")]);
    const kept = await readingOf(technician, {
      machineId,
      text: "",
      files: [
        { path: "a/düse.conf", base64: base64(latin) },
        { path: "b.conf", base64: base64(marked) },
      ],
    });
    const view = await showReading(viewer, kept.id);
    expect(view.files.map(({ encoding, bom, sha256: hash }) => [encoding, bom, hash])).toEqual([
      ["latin-1", false, sha256(latin)],
      ["utf-8", true, sha256(marked)],
    ]);
    expect(view.files[0]?.text).toContain("düse");
    const file = await readingFile(viewer, { id: kept.id, position: 0 });
    expect(Buffer.compare(file.bytes, latin)).toBe(0);
    expect((await readingFile(viewer, { id: kept.id, position: 1 })).bytes.equals(marked)).toBe(true);
    expect((await refusalOf(readingFile(viewer, { id: kept.id, position: 2 }))).code).toBe("not_found");
  });
});

describe("bad input", () => {
  const nothingKept = async (work: () => Promise<unknown>) => {
    const before = await Reading.count();
    const refused = await refusalOf(work());
    expect(await Reading.count()).toBe(before);
    return refused;
  };

  test("another serial number is refused and nothing is kept", async () => {
    const { technician, machineId, serial } = world;
    const refused = await nothingKept(() =>
      readingOf(technician, { machineId, text: configuration(), serial: "SN-OTHER" }),
    );
    expect(refused).toMatchObject({ code: "invalid", pointer: "/serial" });
    expect(refused.message).toContain("SN-OTHER");
    expect(refused.message).toContain(serial);
    await readingOf(technician, { machineId, text: configuration(), serial: serial.toLowerCase() });
  });

  test("a time in the future is refused; a clock a little ahead is set right", async () => {
    const { technician, machineId } = world;
    const far = new Date(technician.now.getTime() + 6 * 60_000).toISOString();
    const refused = await nothingKept(() =>
      readingOf(technician, { machineId, text: configuration(), readAt: far }),
    );
    expect(refused).toMatchObject({ code: "invalid", pointer: "/readAt" });
    const near = new Date(technician.now.getTime() + 4 * 60_000).toISOString();
    const kept = await readingOf(technician, { machineId, text: configuration(), readAt: near });
    expect((await Reading.findByPk(kept.id))?.readAt.getTime()).toBe(technician.now.getTime());
  });

  test("a binary file is refused with a sentence", async () => {
    const { technician, machineId } = world;
    const bytes = Uint8Array.from({ length: 600 }, (_, i) => (i * 37) % 256);
    const refused = await nothingKept(() =>
      readingOf(technician, { machineId, text: "", files: [{ path: "image.bin", base64: base64(bytes) }] }),
    );
    expect(refused).toMatchObject({ code: "invalid", pointer: "/files/0/base64" });
    expect(refused.message).toMatch(/^image\.bin: .+\.$/);
  });

  test("an empty file is refused with a sentence", async () => {
    const { technician, machineId } = world;
    const refused = await nothingKept(() => readingOf(technician, { machineId, text: "" }));
    expect(refused).toMatchObject({ code: "invalid", pointer: "/files/0/text" });
    expect(refused.message).toMatch(/empty/i);
  });

  test("a file of 3 MB is refused with a sentence", async () => {
    const { technician, machineId } = world;
    const text = "run_ma = 800\n".repeat(250_000);
    const refused = await nothingKept(() => readingOf(technician, { machineId, text }));
    expect(refused.code).toBe("too_large");
    expect(refused.message).toMatch(/2 MB/);
  });

  test("a format that is not read here is named", async () => {
    const { technician, machineId } = world;
    const refused = await nothingKept(() =>
      readingOf(technician, { machineId, text: configuration(), format: "runes" }),
    );
    expect(refused).toMatchObject({ code: "invalid", pointer: "/format" });
    expect(refused.message).toContain("runes");
  });

  test("a text without any known key is kept, and said", async () => {
    const { technician, machineId, viewer } = world;
    const kept = await readingOf(technician, { machineId, text: "colour = green\nwidth = 12\n" });
    expect(kept.parameters).toBe(0);
    expect(kept.documents[0]?.diagnostics).toContainEqual(
      expect.objectContaining({ code: "no-known-key", severity: "error" }),
    );
    expect((await showReading(viewer, kept.id)).unmapped.map(({ key }) => key)).toEqual(["colour", "width"]);
  });

  test("hidden and bidirectional characters are kept, and said with line and column", async () => {
    const { technician, machineId } = world;
    const text = "[axis.x]\nrun_ma = 8\u200b00\n# \u202eabc\nspeed = 200\n";
    const kept = await readingOf(technician, { machineId, text });
    expect(kept.documents[0]?.diagnostics).toEqual(
      expect.arrayContaining([
        expect.objectContaining({ code: "hidden-character", line: 2, column: 11 }),
        expect.objectContaining({ code: "bidirectional-character", line: 3, column: 3 }),
      ]),
    );
    expect((await showReading(technician, kept.id)).files[0]?.text).toBe(text);
  });

  test("a retired machine takes no reading", async () => {
    const { engineer, technician, modelId, siteId } = world;
    const old = await machine(engineer, { modelId, siteId });
    await retireMachine(engineer, { id: old.id, reason: "scrapped", ifMatch: null });
    const refused = await nothingKept(() =>
      readingOf(technician, { machineId: old.id, text: configuration() }),
    );
    expect(refused.code).toBe("conflict");
  });

  test("a viewer is refused", async () => {
    const { viewer, machineId } = world;
    const refused = await nothingKept(() => readingOf(viewer, { machineId, text: configuration() }));
    expect(refused.code).toBe("forbidden");
  });
});

test("the list of readings is filtered and paged, and names the level of each", async () => {
  const own = await fleet();
  const { technician, viewer, machineId, serial, modelId } = own;
  await requireText(own.engineer, {
    modelId,
    machineIds: [machineId],
    files: [{ path: "machine.conf", text: configuration() }],
  });
  for (const minutes of [1, 2, 3])
    await readingOf(at(technician, minutes), {
      machineId,
      text: configuration(minutes === 2 ? { "x.run_ma": "1900" } : {}),
      layer: minutes === 3 ? "stored" : "file",
    });
  const query = { page: 1, pageSize: 2, machineId };
  const first = await listReadings(viewer, query);
  expect(first).toMatchObject({ total: 3, page: 1 });
  expect(first.items.map(({ layer }) => layer)).toEqual(["stored", "file"]);
  expect(first.items[1]).toMatchObject({ level: "over", machine: { serial }, files: ["machine.conf"] });
  const second = await listReadings(viewer, { ...query, page: 2 });
  expect(second.items).toHaveLength(1);
  const stored = await listReadings(viewer, { page: 1, pageSize: 50, q: serial.slice(2), layer: "stored" });
  expect(stored.items.map(({ id }) => id)).toEqual([first.items[0]?.id]);
  expect((await listReadings(viewer, { page: 1, pageSize: 50, machineId, kind: "as_left" })).total).toBe(0);
});

test("a reading says whether it still counts, and what ended it", async () => {
  const { technician, viewer, machineId } = await fleet();
  const first = await readingOf(at(technician, 1), { machineId, text: configuration() });
  expect((await showReading(at(viewer, 2), first.id)).standing).toEqual({ state: "counts" });
  const second = await readingOf(at(technician, 3), { machineId, text: configuration({ speed: "190" }) });
  expect((await showReading(at(viewer, 4), first.id)).standing).toMatchObject({
    state: "ended",
    because: "newer",
    byReadingId: second.id,
  });
});
