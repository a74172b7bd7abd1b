import "server-only";
import type { z } from "zod";
import type { createChangeSchema } from "@/lib/schemas/changes";
import { MachineModel } from "@/models/catalog";
import { ChangeRequest } from "@/models/changes";
import { Machine } from "@/models/machines";
import type { Context, Tx } from "@/lib/services/kernel/context";
import { authorize, personBehind } from "@/lib/services/kernel/context";
import { notFound, ServiceError } from "@/lib/services/kernel/errors";
import { once } from "@/lib/services/kernel/idempotency";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { acceptFile } from "@/lib/services/revisions/files";
import { proposalBase } from "./base";
import { demandEffectivity } from "./effectivity";
import type { ChangeBrief } from "./load";
import { briefOf, recordObject } from "./load";
import { writeVersion } from "./write-version";

type CreateChange = z.output<typeof createChangeSchema>;

/** Drafts a change with its first proposal version. A text that is its base unchanged is no change yet, and may be kept. */
export async function createChange(
  context: Context,
  input: CreateChange,
  idempotencyKey: string | null = null,
): Promise<ChangeBrief> {
  return withTransaction(context, async (tx) => {
    authorize(tx, "changes.create");
    const { answer } = await once(tx, { key: idempotencyKey, request: input }, async () => {
      const target = await targetOf(tx, input);
      const files = input.files.map((file, index) => acceptFile({ file, index }));
      const base = await proposalBase({ ...target, asOf: tx.now, transaction: tx.transaction });
      const change = await insert(tx, input, target);
      await writeVersion(tx, change, { files, base, note: input.note });
      await appendRecord(tx, {
        action: "change.drafted",
        object: recordObject(change),
        changeId: change.id,
        machineId: change.machineId,
        after: { title: change.title, class: change.class, kind: change.kind, base: base.label },
        reason: change.reason,
      });
      return briefOf(change);
    });
    return answer;
  });
}

interface Target {
  readonly kind: "baseline" | "deviation";
  readonly modelId: string;
  readonly machineId: string | null;
}

async function targetOf(tx: Tx, { modelId, machineId }: CreateChange): Promise<Target> {
  if (machineId !== undefined) {
    const machine = await Machine.findByPk(machineId, { transaction: tx.transaction });
    if (!machine) throw notFound("machine");
    if (machine.state === "retired")
      throw new ServiceError("conflict", `${machine.serial} is retired; nothing is changed on it any more.`);
    return { kind: "deviation", modelId: machine.modelId, machineId };
  }
  const model = await MachineModel.findByPk(modelId, { transaction: tx.transaction });
  if (!model) throw notFound("machine model");
  return { kind: "baseline", modelId: model.id, machineId: null };
}

async function insert(tx: Tx, input: CreateChange, target: Target): Promise<ChangeRequest> {
  const effectivity =
    target.machineId === null
      ? (input.effectivity ?? { kind: "model" as const })
      : { kind: "machines" as const, machineIds: [target.machineId] };
  await demandEffectivity({ modelId: target.modelId, effectivity, transaction: tx.transaction });
  demandFutureDay(input.deviationUntil, tx.now);
  const person = personBehind(tx.actor);
  return ChangeRequest.create(
    {
      ...target,
      title: input.title,
      reason: input.reason,
      class: input.class,
      state: "draft",
      effectivity,
      deviationUntil: target.kind === "deviation" ? (input.deviationUntil ?? null) : null,
      authorId: person,
      authorName: tx.actor.name,
      lastEditorId: person,
    },
    { transaction: tx.transaction },
  );
}

/** A permitted deviation that has already ended permits nothing. */
export function demandFutureDay(day: string | undefined | null, now: Date): void {
  if (!day || day >= now.toISOString().slice(0, 10)) return;
  throw new ServiceError("invalid", "The last day of a permitted deviation lies in the past.", {
    pointer: "/deviationUntil",
  });
}
