import "server-only";
import type { z } from "zod";
import { MAX_ATTACHMENT_BYTES, type verificationSchema } from "@/lib/schemas/changes";
import { ChangeRequest } from "@/models/changes";
import { Attachment, LotMachine, Verification } from "@/models/implementation";
import { Machine } from "@/models/machines";
import type { Context, Tx } from "@/lib/services/kernel/context";
import { authorize, requirePerson } from "@/lib/services/kernel/context";
import { notFound, ServiceError } from "@/lib/services/kernel/errors";
import { sha256 } from "@/lib/services/kernel/hash";
import { once } from "@/lib/services/kernel/idempotency";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { recordObject } from "@/lib/services/changes/load";
import { refreshStatus } from "@/lib/services/machines/refresh-status";
import { appendRecord } from "@/lib/services/record/append";
import { keepContents } from "@/lib/services/revisions/store";
import { advance } from "./advance";

type Request = z.output<typeof verificationSchema>;

export interface VerificationAnswer {
  readonly id: string;
  readonly state: string;
  readonly machineVerified: boolean;
  readonly missing: string | null;
}

interface VerifyRequest {
  readonly changeId: string;
  readonly request: Request;
  readonly idempotencyKey: string | null;
}

/** Records the test on a machine. Whether it verifies the machine, and with it the change, follows from the proof. */
export async function recordVerification(
  context: Context,
  input: VerifyRequest,
): Promise<VerificationAnswer> {
  const person = requirePerson(context);
  const files = input.request.attachments.map(decodeAttachment);
  return withTransaction(context, async (tx) => {
    authorize(tx, "verifications.create");
    const { answer } = await once(tx, { key: input.idempotencyKey, request: input.request }, async () => {
      const { change, place, machine } = await stepOf(tx, input);
      const row = await Verification.create(rowOf(tx, { input, place, person }), {
        transaction: tx.transaction,
      });
      await keepAttachments(tx, row.id, files);
      await appendRecord(tx, {
        action: "verification.recorded",
        object: recordObject(change),
        changeId: change.id,
        machineId: machine.id,
        after: {
          verification: row.id,
          machine: machine.serial,
          result: row.result,
          tested: row.tested,
          attachments: files.length,
        },
      });
      const { missing } = await advance(tx, { place, serial: machine.serial });
      await refreshStatus(tx, machine.id);
      await change.reload({ transaction: tx.transaction });
      return { id: row.id, state: change.state, machineVerified: place.verifiedAt !== null, missing };
    });
    return answer;
  });
}

async function stepOf(tx: Tx, { changeId, request }: VerifyRequest) {
  const { transaction } = tx;
  const place = await LotMachine.findOne({
    where: { changeId, machineId: request.machineId },
    transaction,
    lock: transaction.LOCK.UPDATE,
  });
  const change = await ChangeRequest.findByPk(changeId, { transaction });
  const machine = await Machine.findByPk(request.machineId, { transaction });
  if (!change) throw notFound("change");
  if (!place || !machine)
    throw new ServiceError(
      "conflict",
      "This change has not been released to that machine. Nothing was recorded.",
      {
        pointer: "/machineId",
      },
    );
  if (place.endedAt)
    throw new ServiceError("conflict", "The change was backed out on this machine. Nothing was recorded.");
  return { change, place, machine };
}

interface Row {
  readonly input: VerifyRequest;
  readonly place: LotMachine;
  readonly person: { readonly id: string; readonly name: string };
}

function rowOf(tx: Tx, { input: { request, changeId }, place, person }: Row) {
  const { machineId, tested, result, ambientC, temperatures, note, statement } = request;
  return {
    changeId,
    machineId,
    lotMachineId: place.id,
    tested,
    result,
    ambientC,
    temperatures,
    note,
    statement: statement === "" ? null : statement,
    actorId: person.id,
    actorName: person.name,
    at: tx.now,
  };
}

interface DecodedAttachment {
  readonly name: string;
  readonly mediaType: string;
  readonly bytes: Buffer;
  readonly sha256: string;
}

function decodeAttachment(
  { name, mediaType, base64 }: Request["attachments"][number],
  index: number,
): DecodedAttachment {
  const bytes = Buffer.from(base64, "base64");
  if (bytes.byteLength > MAX_ATTACHMENT_BYTES)
    throw new ServiceError(
      "too_large",
      `${name} is larger than 10 MB. Nothing was recorded; send a smaller copy.`,
      {
        pointer: `/attachments/${index}`,
      },
    );
  return { name, mediaType, bytes, sha256: sha256(bytes) };
}

async function keepAttachments(
  tx: Tx,
  verificationId: string,
  files: readonly DecodedAttachment[],
): Promise<void> {
  await keepContents(tx, files);
  const rows = files.map(({ name, mediaType, bytes, sha256: hash }) => ({
    verificationId,
    name,
    mediaType,
    size: bytes.byteLength,
    sha256: hash,
    createdAt: tx.now,
  }));
  await Attachment.bulkCreate(rows, { transaction: tx.transaction });
}
