import "server-only";
import type { Transaction } from "sequelize";
import type { Assembly } from "@/lib/domain/assembly";
import type { ChangeKind, Effectivity, MachineEvaluation } from "@/lib/domain/changes";
import type { Finding } from "@/lib/domain/findings";
import { findingKey } from "@/lib/domain/findings";
import { gravest, levelRank } from "@/lib/domain/levels";
import { checkConfiguration } from "@/lib/review/check";
import { findingWords } from "@/lib/review/finding-words";
import type { CheckInput, CheckReport, ConfigurationFile } from "@/lib/review/types";
import { Site } from "@/models/catalog";
import type { Machine } from "@/models/machines";
import { MachineHardware } from "@/models/machines";
import { hashOf } from "@/lib/services/kernel/hash";
import type { CurrentKeyTable } from "@/lib/services/key-tables/current";
import { currentKeyTable } from "@/lib/services/key-tables/current";
import { machineAssembly, modelAssembly } from "@/lib/services/machines/assembly";
import type { CurrentPolicy } from "@/lib/services/policies/ensure";
import { currentPolicy } from "@/lib/services/policies/ensure";
import { machinesOf } from "./effectivity";

export interface ProposalEvaluation {
  readonly assembly: Assembly;
  readonly keyTable: CurrentKeyTable;
  readonly policy: CurrentPolicy;
  readonly report: CheckReport;
  readonly baseReport: CheckReport;
  /** Machines of the effectivity whose own hardware makes it come out otherwise than on the design. */
  readonly machines: readonly MachineEvaluation[];
}

interface EvaluateInput {
  readonly kind: ChangeKind;
  readonly modelId: string;
  readonly machineId: string | null;
  readonly effectivity: Effectivity;
  readonly files: readonly ConfigurationFile[];
  readonly baseFiles: readonly ConfigurationFile[];
  readonly transaction?: Transaction | undefined;
}

/**
 * Evaluates a proposal and its base on the same hardware: a machine's own for a deviation; otherwise the model's
 * design in the hottest place of the effectivity, and besides on every machine there that differs from the design.
 */
export async function evaluateProposal(input: EvaluateInput): Promise<ProposalEvaluation> {
  const { modelId, transaction } = input;
  const keyTable = await currentKeyTable(modelId, transaction);
  const policy = await currentPolicy(transaction);
  const machines = input.machineId === null ? await machinesOf(input) : [];
  const assembly = await proposalAssembly(input, machines);
  const shared = { keyTable: keyTable.table, policy: policy.policy };
  const report = checkConfiguration({ ...shared, assembly, files: input.files });
  const baseReport = checkConfiguration({ ...shared, assembly, files: input.baseFiles });
  const differing = await evaluateDiffering(
    { ...shared, files: input.files },
    { machines, report, transaction },
  );
  return { assembly, keyTable, policy, report, baseReport, machines: differing };
}

/** The hardware that a proposal is evaluated on. */
export async function proposalAssembly(
  { modelId, machineId, transaction }: Pick<EvaluateInput, "modelId" | "machineId" | "transaction">,
  machines: readonly Machine[],
): Promise<Assembly> {
  if (machineId !== null) return (await machineAssembly(machineId, transaction)).assembly;
  return modelAssembly(modelId, await hottestAmbient(machines, transaction), transaction);
}

/** Highest ambient among the machines' sites, or among all sites where there is no machine yet. */
async function hottestAmbient(
  machines: readonly Machine[],
  transaction?: Transaction,
): Promise<number | null> {
  const sites =
    machines.length > 0
      ? machines.map(({ site }) => site)
      : await Site.findAll({ where: { retiredAt: null }, transaction: transaction ?? null });
  const known = sites.flatMap((site) => site?.ambientC ?? []);
  return known.length === 0 ? null : Math.max(...known);
}

interface Differing {
  readonly machines: readonly Machine[];
  readonly report: CheckReport;
  readonly transaction?: Transaction | undefined;
}

async function evaluateDiffering(
  shared: Omit<CheckInput, "assembly">,
  { machines, report, transaction }: Differing,
): Promise<MachineEvaluation[]> {
  const withFacts = await MachineHardware.findAll({
    where: { machineId: machines.map(({ id }) => id), endedAt: null },
    attributes: ["machineId"],
    group: ["machineId"],
    transaction: transaction ?? null,
  });
  const own = new Set(withFacts.map(({ machineId }) => machineId));
  const differing = machines.filter(
    (machine) => own.has(machine.id) || (machine.site?.ambientC ?? null) === null,
  );
  const known = new Map<string, CheckReport>();
  const evaluated: MachineEvaluation[] = [];
  for (const machine of differing) {
    const { assembly } = await machineAssembly(machine.id, transaction);
    const hash = hashOf(assembly);
    const there = known.get(hash) ?? checkConfiguration({ ...shared, assembly });
    known.set(hash, there);
    evaluated.push(machineEvaluation(machine, there, report));
  }
  return evaluated.sort((a, b) => levelRank(a.level) - levelRank(b.level));
}

function machineEvaluation(machine: Machine, there: CheckReport, design: CheckReport): MachineEvaluation {
  const onDesign = new Map(design.findings.map((finding) => [findingKey(finding), finding]));
  const graver = there.findings.filter((finding) => isGraver(finding, onDesign.get(findingKey(finding))));
  return {
    machineId: machine.id,
    serial: machine.serial,
    siteName: machine.site?.name ?? "",
    level: gravest(there.findings.map(({ level }) => level)),
    graver: graver.map((finding) => ({
      key: findingKey(finding),
      ruleId: finding.ruleId,
      axis: finding.axis,
      level: finding.level,
      sentence: finding.sentence,
    })),
  };
}

function isGraver(finding: Finding, design: Finding | undefined): boolean {
  return levelRank(finding.level) < levelRank(design?.level ?? "within");
}

export interface OverKey {
  readonly key: string;
  readonly sentence: string;
}

/** The over-limit findings, on the design or on a machine, that an approval has to justify one by one. */
export function overKeys(
  report: Pick<CheckReport, "findings">,
  machines: readonly MachineEvaluation[],
): OverKey[] {
  const keys = new Map<string, string>();
  for (const finding of report.findings)
    if (finding.level === "over") keys.set(findingKey(finding), findingWords(finding));
  for (const { serial, graver } of machines)
    for (const finding of graver)
      if (finding.level === "over" && !keys.has(finding.key))
        keys.set(finding.key, `${serial}: ${findingWords(finding)}`);
  return [...keys].map(([key, sentence]) => ({ key, sentence }));
}
