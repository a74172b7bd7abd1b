import "server-only";
import type { ParameterValue } from "@/lib/domain/values";
import { checkConfiguration } from "@/lib/review/check";
import type { OrderInput } from "@/lib/solve/safe-order";
import { LotMachine } from "@/models/implementation";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { machineCondition, type MachineCondition } from "@/lib/services/machines/condition";
import { requiredConfiguration } from "@/lib/services/machines/required";

/** The values before and after a change on one machine, for an order of typing them. */
export interface OrderBasis extends OrderInput {
  /** Whether `was` is what the machine was read to run; else what it was required to run before. */
  readonly fromReadings: boolean;
}

interface Step {
  readonly changeId: string;
  readonly machineId: string;
}

/** What an order is sought between on this machine; null where it requires nothing or nothing is known of before. */
export async function orderBasis(
  context: Context,
  { changeId, machineId }: Step,
): Promise<OrderBasis | null> {
  authorize(context, "changes.read");
  const place = await LotMachine.findOne({ where: { changeId, machineId } });
  if (!place) throw notFound("implementation step");
  const condition = await machineCondition(machineId, context.now);
  const { requiredReport, hardware, policy, counted } = condition;
  const fromReadings = counted.length > 0;
  const was = fromReadings
    ? counted.map(({ value }) => value)
    : await requiredBefore(condition, place.releasedAt);
  if (!requiredReport || was.length === 0) return null;
  return {
    was,
    toBe: requiredReport.parameters,
    assembly: hardware.assembly,
    policy: policy.policy,
    fromReadings,
  };
}

/** What was required until the change was released to the machine. */
async function requiredBefore(
  { machine, hardware, keyTable, policy }: MachineCondition,
  releasedAt: Date,
): Promise<readonly ParameterValue[]> {
  const shared = { assembly: hardware.assembly, keyTable: keyTable.table };
  const asOf = new Date(releasedAt.getTime() - 1);
  const before = await requiredConfiguration({ ...shared, machineId: machine.id, asOf });
  if (!before) return [];
  return checkConfiguration({ ...shared, policy: policy.policy, files: before.files }).parameters;
}
