import "server-only";
import type { z } from "zod";
import { LEVELS, type Level } from "@/lib/domain/levels";
import { LAYER_WORDS, READING_KIND_WORDS } from "@/lib/domain/readings";
import { checkConfiguration } from "@/lib/review/check";
import type { CheckReport } from "@/lib/review/types";
import { createReadingSchema, type CreatedReading, type CreateReading } from "@/lib/schemas/readings";
import { LotMachine } from "@/models/implementation";
import { Machine, MachineStatus } from "@/models/machines";
import { Reading } from "@/models/revisions";
import { lockChange } from "@/lib/services/changes/load";
import { presentDocuments } from "@/lib/services/check/present";
import type { StoredEvaluation } from "@/lib/services/evaluations/store";
import type { Context, Tx } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound, ServiceError } from "@/lib/services/kernel/errors";
import { once } from "@/lib/services/kernel/idempotency";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { noteAppliedReading } from "@/lib/services/implementation/note-reading";
import { currentKeyTable } from "@/lib/services/key-tables/current";
import { machineAssembly } from "@/lib/services/machines/assembly";
import { refreshStatus } from "@/lib/services/machines/refresh-status";
import { standingOf } from "@/lib/services/machines/standing";
import { ensurePolicy } from "@/lib/services/policies/ensure";
import { appendRecord } from "@/lib/services/record/append";
import { acceptFiles } from "@/lib/services/revisions/accept";
import { storeRevision, type StoredRevision } from "@/lib/services/revisions/store";
import { keepEvaluation } from "./keep-evaluation";

/** Clocks of controllers and phones go a little ahead. */
const CLOCK_SLACK_MS = 5 * 60_000;

interface Wanted extends CreateReading {
  readonly machineId: string;
  readonly idempotencyKey: string | null;
}

type Body = z.output<typeof createReadingSchema>;

/** Keeps what was read from a machine, checks it on the machine's own hardware, and says where the machine stands. */
export async function createReading(context: Context, input: Wanted): Promise<CreatedReading> {
  const { machineId, idempotencyKey } = input;
  const body = createReadingSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "readings.create");
    const { answer } = await once(tx, { key: idempotencyKey, request: { machineId, body } }, async () => {
      await lockOpenChange(tx, machineId);
      const machine = await lockMachine(tx, machineId);
      refuseMisfit(tx, machine, body);
      const kept = await keep(tx, machine, body);
      await appendRecord(tx, {
        action: "reading.kept",
        object: {
          type: "reading",
          id: kept.reading.id,
          label: `${machine.serial}, ${READING_KIND_WORDS[body.kind]}, ${LAYER_WORDS[body.layer]}`,
        },
        machineId,
        after: recorded(kept, body),
        reason: body.note || null,
      });
      const step = await noteAppliedReading(tx, {
        machineId,
        serial: machine.serial,
        readingId: kept.reading.id,
      });
      await refreshStatus(tx, machineId);
      return { ...(await answerOf(tx, machine, kept)), step };
    });
    return answer;
  });
}

/** The change that this reading may move on is locked before the machine, as acts on the change do. */
async function lockOpenChange(tx: Tx, machineId: string): Promise<void> {
  const step = await LotMachine.findOne({
    where: { machineId, verifiedAt: null, endedAt: null },
    attributes: ["changeId"],
    transaction: tx.transaction,
  });
  if (step) await lockChange(tx, step.changeId, null);
}

async function lockMachine(tx: Tx, machineId: string): Promise<Machine> {
  const { transaction } = tx;
  const machine = await Machine.findByPk(machineId, { transaction, lock: transaction.LOCK.UPDATE });
  if (!machine) throw notFound("machine");
  return machine;
}

function refuseMisfit(tx: Tx, machine: Machine, { serial, readAt }: Body): void {
  if (machine.state === "retired")
    throw new ServiceError(
      "conflict",
      `The machine ${machine.serial} is retired. Nothing was stored; put it into service first if it runs again.`,
    );
  if (serial && serial.toLowerCase() !== machine.serial.toLowerCase())
    throw new ServiceError(
      "invalid",
      `The serial number read is ${serial}, but this machine is ${machine.serial}. Nothing was stored; choose the machine ${serial}, or read the plate again.`,
      { pointer: "/serial" },
    );
  if (new Date(readAt).getTime() > tx.now.getTime() + CLOCK_SLACK_MS)
    throw new ServiceError(
      "invalid",
      `The time read, ${readAt}, lies in the future. Nothing was stored; correct the time or the clock that gave it.`,
      { pointer: "/readAt" },
    );
}

interface Kept {
  readonly reading: Reading;
  readonly revision: StoredRevision;
  readonly evaluation: StoredEvaluation;
  readonly report: CheckReport;
}

async function keep(tx: Tx, machine: Machine, body: Body): Promise<Kept> {
  const { transaction } = tx;
  const files = acceptFiles(body.files, body.format);
  const hardware = await machineAssembly(machine.id, transaction);
  const keyTable = await currentKeyTable(machine.modelId, transaction);
  const policy = await ensurePolicy(transaction);
  const report = checkConfiguration({
    files,
    keyTable: keyTable.table,
    assembly: hardware.assembly,
    policy: policy.policy,
    layer: body.layer,
  });
  const revision = await storeRevision(tx, {
    kind: body.kind,
    modelId: machine.modelId,
    machineId: machine.id,
    files,
    parameters: report.parameters,
  });
  const at = { revisionId: revision.id, machineId: machine.id };
  const evaluation = await keepEvaluation(tx, { ...at, hardware, keyTable, policy, report });
  const reading = await Reading.create(rowOf(tx, { ...at, body }), { transaction });
  return { reading, revision, evaluation, report };
}

function rowOf(tx: Tx, { body, ...at }: { revisionId: string; machineId: string; body: Body }) {
  return {
    ...at,
    kind: body.kind,
    layer: body.layer,
    // A clock that goes ahead a little is set right: nothing is read after it came in.
    readAt: new Date(Math.min(new Date(body.readAt).getTime(), tx.now.getTime())),
    receivedAt: tx.now,
    firmwareVersion: body.firmwareVersion || null,
    serial: body.serial || null,
    note: body.note,
    actorKind: tx.actor.kind,
    actorId: tx.actor.id,
    actorName: tx.actor.name,
  };
}

function recorded({ reading, revision, evaluation, report }: Kept, body: Body) {
  return {
    kind: body.kind,
    layer: body.layer,
    readAt: reading.readAt.toISOString(),
    firmwareVersion: reading.firmwareVersion,
    serial: reading.serial,
    files: report.documents.map(({ path, format }) => ({ path, format })),
    contentHash: revision.contentHash,
    unchanged: revision.unchanged,
    level: evaluation.level,
  };
}

async function answerOf(tx: Tx, machine: Machine, kept: Kept): Promise<Omit<CreatedReading, "step">> {
  const { reading, revision, evaluation, report } = kept;
  const status = await MachineStatus.findByPk(machine.id, { transaction: tx.transaction });
  return {
    id: reading.id,
    machineId: machine.id,
    serial: machine.serial,
    revisionId: revision.id,
    evaluationId: evaluation.id,
    unchanged: revision.unchanged,
    level: evaluation.level,
    levels: countLevels(report),
    parameters: report.parameters.length,
    unmapped: report.unmapped.length,
    documents: presentDocuments(report.documents),
    machine: standingOf(machine.state, status),
  };
}

function countLevels({ findings }: CheckReport): Record<Level, number> {
  const of = (level: Level) => findings.filter((finding) => finding.level === level).length;
  const [over, near, cannot, within] = LEVELS.map(of);
  return { over: over ?? 0, near: near ?? 0, cannot: cannot ?? 0, within: within ?? 0 };
}
