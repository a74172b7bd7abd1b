import "server-only";
import { changeLabel } from "@/lib/domain/changes";
import { compareFindings } from "@/lib/review/compare-findings";
import { effects } from "@/lib/review/effects";
import { parameterChanges } from "@/lib/review/parameter-changes";
import type { CheckReport, Effect, FindingComparison, ParameterChange } from "@/lib/review/types";
import type { ChangeViewData } from "@/lib/schemas/changes";
import { KeyTableVersion, MachineModel } from "@/models/catalog";
import { ChangeRequest, Comment, Disposition, ProposalVersion } from "@/models/changes";
import { Machine } from "@/models/machines";
import { Evaluation } from "@/models/revisions";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { loadFiles } from "@/lib/services/revisions/load";
import type { StoredFile } from "@/lib/services/revisions/files";
import { proposalBase, staleReason } from "./base";
import { deviationsTouched } from "./deviations-touched";
import { targetOf } from "./edit";
import { effectivityWords, machinesOf } from "./effectivity";
import { overKeys } from "./evaluate";
import { machinesOfChange } from "./machines-of-change";

/** A change as its page and the API show it. */
export interface ChangeView extends Omit<ChangeViewData, "evaluation"> {
  readonly evaluation: Omit<
    ChangeViewData["evaluation"],
    "report" | "baseReport" | "changes" | "effects" | "comparison"
  > & {
    readonly report: CheckReport;
    readonly baseReport: CheckReport;
    readonly changes: readonly ParameterChange[];
    readonly effects: readonly Effect[];
    readonly comparison: FindingComparison;
  };
}

const EMPTY_REPORT: CheckReport = {
  documents: [],
  parameters: [],
  unmapped: [],
  quantities: [],
  findings: [],
  provenance: [],
};

/** Everything that bears on the decision about a change, in one object. An older proposal version on request. */
export async function showChange(context: Context, id: string, versionNumber?: number): Promise<ChangeView> {
  authorize(context, "changes.read");
  const change = await ChangeRequest.findByPk(id);
  if (!change) throw notFound("change");
  const versions = await ProposalVersion.findAll({ where: { changeId: id }, order: [["version", "ASC"]] });
  const version = versions.find((row) => row.version === (versionNumber ?? change.currentVersion));
  if (!version) throw notFound("proposal version");
  const evaluation = await evaluationView(version);
  return {
    ...(await headOf(change)),
    proposal: { ...versionView(version), files: (await loadFiles(version.revisionId)).map(fileView) },
    ...(await baseView(context, change, version)),
    versions: versions.map(versionView),
    evaluation,
    comments: await commentsOf(id),
    dispositions: await dispositionsOf(id),
    machines: await machinesOfChange(context, id),
    deviationsTouched: await deviationsTouched(change, evaluation.changes, context.now),
  };
}

async function headOf(change: ChangeRequest) {
  const model = await MachineModel.findByPk(change.modelId);
  const machine = change.machineId ? await Machine.findByPk(change.machineId) : null;
  const machines = await machinesOf({ modelId: change.modelId, effectivity: change.effectivity });
  return {
    id: change.id,
    label: changeLabel(change.number),
    lockVersion: change.lockVersion,
    kind: change.kind,
    class: change.class,
    state: change.state,
    title: change.title,
    reason: change.reason,
    model: { id: change.modelId, name: model?.name ?? "", code: model?.code ?? "" },
    machine: machine && { id: machine.id, serial: machine.serial },
    effectivity: change.effectivity,
    effectivityWords: effectivityWords(change.effectivity, machines),
    deviationUntil: change.deviationUntil,
    author: { id: change.authorId, name: change.authorName },
    lastEditorId: change.lastEditorId,
    createdAt: change.createdAt.toISOString(),
    submittedAt: change.submittedAt?.toISOString() ?? null,
    decidedAt: change.decidedAt?.toISOString() ?? null,
  };
}

function versionView(version: ProposalVersion) {
  return {
    version: version.version,
    editorName: version.editorName,
    createdAt: version.createdAt.toISOString(),
    note: version.note,
    signedContentHash: version.signedContentHash,
  };
}

function fileView({ path, format, text }: StoredFile) {
  return { path, format, text };
}

const UNDECIDED = ["draft", "evaluation", "deferred"] as const;

async function baseView(context: Context, change: ChangeRequest, version: ProposalVersion) {
  const files = version.baseRevisionId ? await loadFiles(version.baseRevisionId) : [];
  const undecided = UNDECIDED.some((state) => state === change.state);
  const today = undecided ? await proposalBase({ ...targetOf(change), asOf: context.now }) : null;
  const stale = today && staleReason(version, today);
  const label = today && !stale ? today.label : "the text that it was made on";
  return { base: { label, files: files.map(fileView) }, stale };
}

async function evaluationView(version: ProposalVersion): Promise<ChangeView["evaluation"]> {
  const evaluation = await Evaluation.findByPk(version.evaluationId);
  if (!evaluation) throw notFound("evaluation");
  const before = version.baseEvaluationId ? await Evaluation.findByPk(version.baseEvaluationId) : null;
  const table = evaluation.keyTableId ? await KeyTableVersion.findByPk(evaluation.keyTableId) : null;
  // Stored reports are those that storeEvaluation wrote.
  const report = evaluation.report as CheckReport;
  const baseReport = (before?.report as CheckReport | undefined) ?? EMPTY_REPORT;
  const changes = parameterChanges(baseReport, report);
  return {
    level: evaluation.level,
    rulesVersion: evaluation.rulesVersion,
    policyVersion: evaluation.policyVersion,
    keyTableVersion: table?.version ?? 0,
    assemblyHash: evaluation.assemblyHash,
    ambientC: evaluation.assembly.ambient_c ?? null,
    report,
    baseReport,
    changes,
    effects: effects({ before: baseReport, after: report, changes }),
    comparison: compareFindings(baseReport.findings, report.findings),
    machines: version.machinesEvaluated,
    overKeys: overKeys(report, version.machinesEvaluated),
  };
}

async function commentsOf(changeId: string): Promise<ChangeView["comments"]> {
  const rows = await Comment.findAll({ where: { changeId }, order: [["createdAt", "ASC"]] });
  return rows.map(({ id, anchor, body, authorName, proposalVersion, createdAt }) => ({
    id,
    anchor,
    body,
    authorName,
    proposalVersion,
    createdAt: createdAt.toISOString(),
  }));
}

async function dispositionsOf(changeId: string): Promise<ChangeView["dispositions"]> {
  const rows = await Disposition.findAll({ where: { changeId }, order: [["at", "ASC"]] });
  return rows.map((row) => ({
    decision: row.decision,
    actorName: row.actorName,
    at: row.at.toISOString(),
    meaning: row.meaning,
    reason: row.reason,
    justifications: row.justifications,
    proposalVersion: row.proposalVersion,
    signedHash: row.signedHash,
    voidAt: row.voidAt?.toISOString() ?? null,
    voidReason: row.voidReason,
  }));
}
