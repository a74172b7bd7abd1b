import "server-only";
import type { Transaction } from "sequelize";
import { literal, Op } from "sequelize";
import type { Assembly } from "@/lib/domain/assembly";
import type { HardwareFact } from "@/lib/domain/catalog";
import type { KeyTable } from "@/lib/domain/key-table";
import { REFINABLE_FIELDS } from "@/lib/domain/refined";
import { checkConfiguration } from "@/lib/review/check";
import {
  measuredHeat,
  type HeatReport,
  type MeasuredHeat,
  type MeasuredMotor,
} from "@/lib/review/measured-heat";
import { resolveAssembly } from "@/lib/review/resolve-assembly";
import type { CheckReport } from "@/lib/review/types";
import { heatModel } from "@/lib/rules/heat-model";
import { Axis, MachineModelVersion } from "@/models/catalog";
import { Verification } from "@/models/implementation";
import { MachineHardware } from "@/models/machines";
import { currentKeyTable } from "@/lib/services/key-tables/current";
import { currentPolicy } from "@/lib/services/policies/ensure";
import { machineParts } from "./assembly";
import { requiredConfiguration } from "./required";

const NOTHING: HeatReport = { readings: [], fits: [] };

interface Ground {
  readonly machineId: string;
  readonly modelId: string;
  readonly keyTable: KeyTable;
  /** Of today, with the catalog's thermal data. */
  readonly assembly: Assembly;
  readonly policy: Parameters<typeof checkConfiguration>[0]["policy"];
  readonly transaction: Transaction | undefined;
}

/** The newest verifications that are looked at. */
const LOOKED_AT = 100;

/** Every temperature measured on a machine at its verifications, and what they make of its motors' thermal data. */
export async function machineHeat(machineId: string, transaction?: Transaction): Promise<HeatReport> {
  const tests = await Verification.findAll({
    where: { [Op.and]: [{ machineId }, literal("jsonb_array_length(temperatures) > 0")] },
    order: [["at", "DESC"]],
    limit: LOOKED_AT,
    transaction: transaction ?? null,
  });
  const [newest] = tests;
  if (!newest) return NOTHING;
  const { machine, input } = await machineParts(machineId, { transaction });
  const { assembly } = resolveAssembly({ ...input, refined: [] });
  const { table: keyTable } = await currentKeyTable(machine.modelId, transaction);
  const { policy } = await currentPolicy(transaction);
  const ground = { machineId, modelId: machine.modelId, keyTable, assembly, policy, transaction };
  const changed = await motorChanges(ground);
  const measured: MeasuredHeat[] = [];
  for (const test of tests) measured.push(...(await temperaturesOf(test, ground, changed)));
  const today = await reportAt(newest.at, ground);
  return measuredHeat(measured, today ? motorsOf(today, ground, input.facts) : []);
}

async function reportAt(asOf: Date, ground: Ground): Promise<CheckReport | null> {
  const required = await requiredConfiguration({ ...ground, asOf });
  return required && checkConfiguration({ ...ground, files: required.files });
}

/** The axes whose motor heat can be reckoned, and what of it is recorded on the machine itself. */
function motorsOf(
  { parameters }: CheckReport,
  { assembly, policy }: Ground,
  facts: readonly HardwareFact[],
): MeasuredMotor[] {
  return assembly.axes.flatMap(({ axis }) => {
    const model = heatModel({ parameters, assembly, policy }, axis);
    const own = facts.filter((fact) => fact.part === "motor" && isOf(fact, axis));
    const stated = REFINABLE_FIELDS.filter((field) => own.some(({ data }) => Object.hasOwn(data, field)));
    return model.ok ? [{ ...model.value, stated }] : [];
  });
}

function isOf({ axis }: { readonly axis: string | null }, name: string): boolean {
  return axis === null || axis.toLowerCase() === name.toLowerCase();
}

async function temperaturesOf(
  { id, at, ambientC, temperatures }: Verification,
  ground: Ground,
  changed: ReadonlyMap<string, number>,
): Promise<MeasuredHeat[]> {
  const report = await reportAt(at, ground);
  const currentOf = (axis: string | null): number | null =>
    report?.quantities.find(
      (one) => one.name === "winding_current_rms" && one.axis?.toLowerCase() === axis?.toLowerCase(),
    )?.value ?? null;
  return temperatures.map((temperature) => ({
    ...temperature,
    verificationId: id,
    at: at.toISOString(),
    ambientC,
    current: currentOf(temperature.axis),
    sameMotor: at.getTime() >= (changed.get(temperature.axis?.toLowerCase() ?? "") ?? 0),
  }));
}

/** When the motor or the mount of each axis (in lower case) last became another one, ms since 1970. */
async function motorChanges({
  machineId,
  modelId,
  assembly,
  transaction,
}: Ground): Promise<Map<string, number>> {
  const facts = await MachineHardware.findAll({
    where: { machineId, part: ["motor", "mount"] },
    transaction: transaction ?? null,
  });
  const versions = await MachineModelVersion.findAll({
    where: { modelId },
    order: [["version", "ASC"]],
    include: [{ model: Axis, as: "axes" }],
    transaction: transaction ?? null,
  });
  const moments = ({ axis }: Assembly["axes"][number]): number[] => [
    ...facts
      .filter((fact) => isOf(fact, axis))
      .flatMap(({ recordedAt, endedAt }) =>
        [recordedAt, endedAt].flatMap((moment) => moment?.getTime() ?? []),
      ),
    ...versions.flatMap((version, index) => {
      const before = versions[index - 1];
      return before && partsOf(before, axis) !== partsOf(version, axis) ? [version.createdAt.getTime()] : [];
    }),
  ];
  return new Map(assembly.axes.map((axis) => [axis.axis.toLowerCase(), Math.max(0, ...moments(axis))]));
}

function partsOf({ axes = [] }: MachineModelVersion, name: string): string {
  const axis = axes.find((one) => one.axis.toLowerCase() === name.toLowerCase());
  return `${axis?.motorId} ${axis?.mountId}`;
}
