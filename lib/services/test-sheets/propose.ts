import "server-only";
import { axisKind, type AxisKind } from "@/lib/domain/axis-kind";
import type { Test } from "@/lib/domain/test-sheets";
import type { Planned } from "@/lib/review/test-plan";
import { PLAN_DEFAULTS, planTest } from "@/lib/review/test-plan";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { testBasis } from "./basis";

export interface ProposedSheet {
  readonly machine: { readonly id: string; readonly serial: string };
  readonly change: { readonly id: string; readonly label: string } | null;
  readonly axes: readonly { readonly axis: string; readonly kind: AxisKind }[];
  /** Null where no axis and test are chosen yet, or the machine has no such axis. */
  readonly planned: Planned | null;
}

interface Asked {
  readonly machineId: string;
  readonly changeId: string | null;
  readonly axis: string | null;
  readonly test: Test | null;
}

/** The plan that a test sheet would start with, before anybody starts it. */
export async function proposeSheet(context: Context, asked: Asked): Promise<ProposedSheet> {
  authorize(context, "test_sheets.read");
  const { machineId, changeId, axis, test } = asked;
  const { machine, change, assembly, ...basis } = await testBasis({ machineId, changeId, asOf: context.now });
  const planned =
    axis === null || test === null ? null : planTest({ ...basis, assembly, axis, test }, PLAN_DEFAULTS);
  return {
    machine: { id: machine.id, serial: machine.serial },
    change,
    axes: assembly.axes.map((one) => ({ axis: one.axis, kind: axisKind(one.drive_train?.kind) })),
    planned,
  };
}
