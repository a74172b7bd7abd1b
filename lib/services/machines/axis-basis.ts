import "server-only";
import { axisKind, type AxisKind } from "@/lib/domain/axis-kind";
import type { Assembly } from "@/lib/domain/assembly";
import type { Finding } from "@/lib/domain/findings";
import type { KeyTable } from "@/lib/domain/key-table";
import type { Policy } from "@/lib/domain/policy";
import type { Quantity } from "@/lib/domain/quantities";
import type { ConfigurationFile } from "@/lib/review/types";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { momentOf } from "./as-of";
import { machineCondition, type MachineCondition } from "./condition";
import { fittedItems, type FittedItem } from "./fitted-items";

/** What the pictures and tools of one axis start from; the same shape as their components take. */
export interface AxisBasisData {
  readonly machineId: string;
  readonly serial: string;
  readonly axis: string;
  readonly kind: AxisKind;
  readonly files: readonly ConfigurationFile[];
  readonly keyTable: KeyTable;
  readonly assembly: Assembly;
  readonly policy: Policy;
}

export interface AxisSheet {
  readonly basis: AxisBasisData;
  readonly model: { readonly id: string; readonly name: string };
  readonly siteName: string;
  /** Number of the baseline that the machine requires; null without one. */
  readonly baseline: number | null;
  readonly fitted: Readonly<Record<string, FittedItem>>;
  /** What is the machine's own, with its evidence. */
  readonly own: readonly { readonly path: string; readonly evidence: string }[];
  /** What the required configuration comes to on this axis. */
  readonly quantities: readonly Quantity[];
  readonly findings: readonly Finding[];
}

interface Asked {
  readonly machineId: string;
  /** Without regard to case. */
  readonly axis: string;
}

/** One axis of a machine with its required configuration and the hardware that counts. */
export async function axisBasis(context: Context, asked: Asked): Promise<AxisSheet> {
  authorize(context, "machines.read");
  const condition = await machineCondition(asked.machineId, momentOf(context, undefined));
  const { machine, hardware, required, requiredReport } = condition;
  const basis = basisOf(condition, asked.axis);
  const here = <T extends { readonly axis: string | null }>(rows: readonly T[] = []) =>
    rows.filter(({ axis }) => axis?.toLowerCase() === basis.axis.toLowerCase());
  return {
    basis,
    model: { id: machine.modelId, name: machine.model?.name ?? "" },
    siteName: machine.site?.name ?? "",
    baseline: required?.baseline.number ?? null,
    fitted: await fittedItems(machine.modelId, hardware.facts),
    own: [...hardware.evidence],
    quantities: here(requiredReport?.quantities),
    findings: here(requiredReport?.findings),
  };
}

function basisOf(
  { machine, hardware, keyTable, policy, required }: MachineCondition,
  name: string,
): AxisBasisData {
  const { assembly } = hardware;
  const found = assembly.axes.find(({ axis }) => axis.toLowerCase() === name.toLowerCase());
  if (!found)
    throw new ServiceError("not_found", `${machine.serial} has no axis “${name}” in its recorded hardware.`);
  return {
    machineId: machine.id,
    serial: machine.serial,
    axis: found.axis,
    kind: axisKind(found.drive_train?.kind),
    files: (required?.files ?? []).map(({ path, text, format }) => ({ path, text, format })),
    keyTable: keyTable.table,
    assembly,
    policy: policy.policy,
  };
}
