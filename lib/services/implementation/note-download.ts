import "server-only";
import { ChangeRequest } from "@/models/changes";
import { Machine } from "@/models/machines";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { recordObject } from "@/lib/services/changes/load";
import { openStep } from "./advance";

/**
 * The exact text of a machine went out to somebody who may put it onto the machine: from now on its read-back counts
 * for the open step. A second download does not move that time. Nothing happens without an open step.
 */
export async function noteDownload(context: Context, { machineId }: { machineId: string }): Promise<void> {
  await withTransaction(context, async (tx) => {
    authorize(tx, "readings.create");
    const place = await openStep(tx, machineId);
    if (!place) return;
    const change = await ChangeRequest.findByPk(place.changeId, { transaction: tx.transaction });
    const machine = await Machine.findByPk(machineId, { transaction: tx.transaction });
    if (!change || !machine) return;
    await place.update({ downloadedAt: place.downloadedAt ?? tx.now }, { transaction: tx.transaction });
    await appendRecord(tx, {
      action: "change.text_downloaded",
      object: recordObject(change),
      changeId: change.id,
      machineId,
      after: { machine: machine.serial },
    });
  });
}
