import "server-only";
import { columnKey } from "@/lib/domain/floor";
import type { FloorCell } from "@/lib/domain/floor";
import { showValue } from "@/lib/review/show-value";
import type { DriftItem } from "@/lib/review/drift-types";
import { DriftItemRow, Machine, MachineStatus } from "@/models/machines";
import type { Context, Tx } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import type { RecordEntry } from "@/lib/services/record/append";
import { appendRecord } from "@/lib/services/record/append";
import type { MachineCondition } from "./condition";
import { machineCondition } from "./condition";
import { refineThermal } from "./refine-thermal";

export const NO_BASELINE = "no baseline has been released to it yet";

/**
 * Works out where a machine stands and keeps it for the floor, inside the act that may have moved it. A standing that
 * changes is on the record.
 */
export async function refreshStatus(tx: Tx, machineId: string): Promise<void> {
  const moved = await recompute(tx, machineId);
  if (moved) await appendRecord(tx, moved);
}

/** The same as a job of its own. */
export async function refreshMachineStatus(context: Context, machineId: string): Promise<void> {
  await withTransaction(context, async (tx) => {
    authorize(tx, "machines.read");
    const moved = await recompute(tx, machineId);
    if (moved) await appendRecord(tx, moved);
  });
}

/** Writes the new standing; the entry for the record where it differs from the one before. */
async function recompute(tx: Tx, machineId: string): Promise<RecordEntry | null> {
  const { transaction } = tx;
  await Machine.findByPk(machineId, { transaction, lock: transaction.LOCK.UPDATE });
  await refineThermal(tx, machineId);
  const condition = await machineCondition(machineId, tx.now, transaction);
  const before = await MachineStatus.findByPk(machineId, { transaction });
  const after = statusOf(condition);
  await MachineStatus.upsert({ machineId, ...after, computedAt: tx.now }, { transaction });
  await keepItems(tx, machineId, condition.drift?.items ?? []);
  if (before?.sentence === after.sentence && before.level === after.level) return null;
  return {
    action: "machine.standing_changed",
    object: { type: "machine", id: machineId, label: condition.machine.serial },
    machineId,
    before: before && { level: before.level, sentence: before.sentence },
    after: { level: after.level, sentence: after.sentence },
  };
}

/** What the floor keeps of a condition: level, sentence and the cells that are not as required. */
export function statusOf({ drift, counted, layers, required, requiredReport }: MachineCondition) {
  const readAt = Object.values(layers).map(({ reading }) => reading.readAt.getTime());
  const items = drift?.items ?? [];
  const cells = Object.fromEntries([
    ...deviationCells(required, requiredReport),
    ...items.map((item) => [columnKey(item.axis, item.parameter), cellOf(item)] as const),
  ]);
  return {
    level: drift ? drift.level : ("cannot" as const),
    read: counted.length > 0 && !items.some(({ kind }) => kind === "not_read"),
    stale: items.some(({ staleDays }) => staleDays !== null),
    sentence: drift ? drift.sentence : NO_BASELINE,
    cells,
    lastReadAt: readAt.length === 0 ? null : new Date(Math.max(...readAt)),
  };
}

function deviationCells(
  required: MachineCondition["required"],
  report: MachineCondition["requiredReport"],
): [string, FloorCell][] {
  return (required?.deviations ?? []).flatMap(({ edits, untilOn }) =>
    edits.map(({ axis, parameter }) => {
      const key = columnKey(axis, parameter);
      const value = report?.parameters.find((own) => columnKey(own.axis, own.parameter) === key);
      const shown = value ? `${showValue(parameter, value)}, ` : "";
      const title = `${shown}until ${untilOn}`;
      return [key, { kind: "deviation", title }] as [string, FloorCell];
    }),
  );
}

/** The title goes without the parameter's name and the word for its kind, which whoever shows the cell puts before it. */
function cellOf({ kind, parameter, required, actual, share, level, staleDays }: DriftItem): FloorCell {
  const asked = required ? `required ${showValue(parameter, required)}` : "not required";
  if (kind !== "differs")
    return { kind: "not_read", title: staleDays === null ? asked : `for ${staleDays} days, ${asked}` };
  const found = actual ? showValue(parameter, actual) : "not read";
  return { kind: "drift", share: share ?? 0, level, title: `${found}, ${asked}` };
}

async function keepItems(tx: Tx, machineId: string, items: readonly DriftItem[]): Promise<void> {
  await DriftItemRow.destroy({ where: { machineId }, transaction: tx.transaction });
  const rows = items.map((item, position) => ({
    machineId,
    position,
    axis: item.axis,
    parameter: item.parameter,
    kind: item.kind,
    requiredValue: item.required?.value ?? null,
    actualValue: item.actual?.value ?? null,
    unit: item.required?.unit ?? item.actual?.unit ?? "",
    layer: item.layer,
    share: item.share,
    level: item.level,
    sentence: item.sentence,
  }));
  await DriftItemRow.bulkCreate(rows, { transaction: tx.transaction });
}
