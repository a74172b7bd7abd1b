import "server-only";
import type { Transaction } from "sequelize";
import { changeLabel } from "@/lib/domain/changes";
import { checkConfiguration } from "@/lib/review/check";
import type { CheckReport } from "@/lib/review/types";
import type { PlanInput } from "@/lib/review/test-plan";
import { Site } from "@/models/catalog";
import { ChangeRequest, ProposalVersion } from "@/models/changes";
import { LotMachine } from "@/models/implementation";
import { Machine } from "@/models/machines";
import { machinesOf } from "@/lib/services/changes/effectivity";
import { notFound, ServiceError } from "@/lib/services/kernel/errors";
import { currentKeyTable } from "@/lib/services/key-tables/current";
import { machineAssembly } from "@/lib/services/machines/assembly";
import { requiredConfiguration } from "@/lib/services/machines/required";
import { currentPolicy } from "@/lib/services/policies/ensure";
import { loadFiles } from "@/lib/services/revisions/load";

interface Sought {
  readonly machineId: string;
  /** The change whose proposal is tested; null: what the machine is required to run. */
  readonly changeId: string | null;
  readonly asOf: Date;
  readonly transaction?: Transaction | undefined;
}

/** What a test on a machine is planned from, on the machine's own hardware. */
export interface TestBasis extends Omit<PlanInput, "axis" | "test"> {
  readonly machine: Machine;
  readonly change: { readonly id: string; readonly label: string } | null;
  readonly report: CheckReport;
  /** What stood before the change; null without one. */
  readonly before: CheckReport | null;
}

export async function testBasis({ machineId, changeId, asOf, transaction }: Sought): Promise<TestBasis> {
  const machine = await Machine.findByPk(machineId, {
    include: [{ model: Site, as: "site", required: true }],
    transaction: transaction ?? null,
  });
  if (!machine) throw notFound("machine");
  const { assembly } = await machineAssembly(machineId, transaction);
  const { table: keyTable } = await currentKeyTable(machine.modelId, transaction);
  const { policy } = await currentPolicy(transaction);
  const shared = { assembly, keyTable, policy };
  if (changeId === null) {
    const required = await requiredConfiguration({ machineId, asOf, keyTable, assembly, transaction });
    const report = checkConfiguration({ ...shared, files: required?.files ?? [] });
    return { machine, change: null, assembly, policy, report, parameters: report.parameters, before: null };
  }
  const { change, version } = await proposalOn(machine, changeId, transaction);
  const report = checkConfiguration({ ...shared, files: await loadFiles(version.revisionId, transaction) });
  const base = version.baseRevisionId ? await loadFiles(version.baseRevisionId, transaction) : [];
  const before = checkConfiguration({ ...shared, files: base });
  const named = { id: change.id, label: changeLabel(change.number) };
  return { machine, change: named, assembly, policy, report, parameters: report.parameters, before };
}

async function proposalOn(machine: Machine, changeId: string, transaction?: Transaction) {
  const change = await ChangeRequest.findByPk(changeId, { transaction: transaction ?? null });
  if (!change) throw notFound("change");
  if (!(await appliesTo(change, machine, transaction)))
    throw new ServiceError(
      "invalid",
      `${changeLabel(change.number)} does not apply to the machine ${machine.serial}.`,
      { pointer: "/changeId" },
    );
  const version = await ProposalVersion.findOne({
    where: { changeId, version: change.currentVersion },
    transaction: transaction ?? null,
  });
  if (!version) throw notFound("proposal version");
  return { change, version };
}

/** Released to the machine, whatever has become of it since, or in the effectivity of today. */
async function appliesTo(
  { id, machineId, modelId, effectivity }: ChangeRequest,
  machine: Machine,
  transaction?: Transaction,
): Promise<boolean> {
  if (machineId !== null) return machineId === machine.id;
  const released = { changeId: id, machineId: machine.id };
  if (await LotMachine.findOne({ where: released, transaction: transaction ?? null })) return true;
  const machines = await machinesOf({ modelId, effectivity, transaction });
  return machines.some((one) => one.id === machine.id);
}
