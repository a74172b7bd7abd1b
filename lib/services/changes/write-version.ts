import "server-only";
import type { ChangeRequest } from "@/models/changes";
import { ProposalVersion } from "@/models/changes";
import { findingKey } from "@/lib/domain/findings";
import { RULES_VERSION } from "@/lib/rules/version";
import type { Tx } from "@/lib/services/kernel/context";
import { personBehind } from "@/lib/services/kernel/context";
import { hashOf } from "@/lib/services/kernel/hash";
import { storeEvaluation } from "@/lib/services/evaluations/store";
import { ensurePolicy } from "@/lib/services/policies/ensure";
import type { StoredFile } from "@/lib/services/revisions/files";
import { contentHash } from "@/lib/services/revisions/files";
import { storeRevision } from "@/lib/services/revisions/store";
import type { ProposalBase } from "./base";
import type { ProposalEvaluation } from "./evaluate";
import { evaluateProposal } from "./evaluate";

interface VersionInput {
  readonly files: readonly StoredFile[];
  readonly base: ProposalBase;
  readonly note: string;
}

/** Evaluates the proposal as the change stands and keeps it as the next version, with the hash that a signature binds. */
export async function writeVersion(
  tx: Tx,
  change: ChangeRequest,
  input: VersionInput,
): Promise<ProposalVersion> {
  const { version: policyVersion } = await ensurePolicy(tx.transaction);
  const { kind, modelId, machineId, effectivity } = change;
  const scope = { kind, modelId, machineId, effectivity, transaction: tx.transaction };
  const evaluation = await evaluateProposal({ ...scope, files: input.files, baseFiles: input.base.files });
  const kept = await keepReports(tx, { change, evaluation, policyVersion, ...input });
  const version = change.currentVersion + 1;
  const row = await ProposalVersion.create(
    {
      changeId: change.id,
      version,
      revisionId: kept.revisionId,
      baseRevisionId: kept.baseRevisionId,
      baseBaselineId: input.base.baselineId,
      baseHash: input.base.hash,
      baseEvaluationId: kept.baseEvaluationId,
      evaluationId: kept.evaluationId,
      machinesEvaluated: [...evaluation.machines],
      title: change.title,
      reason: change.reason,
      class: change.class,
      effectivity,
      deviationUntil: change.deviationUntil,
      editorId: personBehind(tx.actor),
      editorName: tx.actor.name,
      note: input.note,
      signedContentHash: signedContentHash(change, { evaluation, policyVersion, ...input }),
      createdAt: tx.now,
    },
    { transaction: tx.transaction },
  );
  await change.update(
    { currentVersion: version, lastEditorId: personBehind(tx.actor), lockVersion: change.lockVersion + 1 },
    { transaction: tx.transaction },
  );
  return row;
}

interface Evaluated extends VersionInput {
  readonly evaluation: ProposalEvaluation;
  readonly policyVersion: number;
}

async function keepReports(tx: Tx, input: Evaluated & { readonly change: ChangeRequest }) {
  const { change, evaluation, base, files, policyVersion } = input;
  const place = { modelId: change.modelId, machineId: change.machineId };
  const shared = {
    machineId: change.machineId,
    assembly: evaluation.assembly,
    keyTableId: evaluation.keyTable.id,
    policyVersion,
  };
  const { id: revisionId } = await storeRevision(tx, {
    ...place,
    kind: "proposal",
    files,
    parameters: evaluation.report.parameters,
  });
  const { id: evaluationId } = await storeEvaluation(tx, {
    ...shared,
    revisionId,
    report: evaluation.report,
  });
  if (base.files.length === 0)
    return { revisionId, evaluationId, baseRevisionId: null, baseEvaluationId: null };
  const baseRevisionId = base.revisionId ?? (await keepBase(tx, input)).id;
  const baseEvaluation = await storeEvaluation(tx, {
    ...shared,
    revisionId: baseRevisionId,
    report: evaluation.baseReport,
  });
  return { revisionId, evaluationId, baseRevisionId, baseEvaluationId: baseEvaluation.id };
}

function keepBase(tx: Tx, { change, base, evaluation }: Evaluated & { readonly change: ChangeRequest }) {
  return storeRevision(tx, {
    kind: "baseline",
    modelId: change.modelId,
    machineId: change.machineId,
    files: base.files,
    parameters: evaluation.baseReport.parameters,
  });
}

/** Everything that an approval states: words, effectivity, both texts, and what the checks made of it under which versions. */
function signedContentHash(
  change: ChangeRequest,
  { evaluation, policyVersion, base, files }: Evaluated,
): string {
  return hashOf({
    number: change.number,
    kind: change.kind,
    title: change.title,
    reason: change.reason,
    class: change.class,
    modelId: change.modelId,
    machineId: change.machineId,
    effectivity: change.effectivity,
    deviationUntil: change.deviationUntil,
    base: base.hash,
    content: contentHash(files),
    rules: RULES_VERSION,
    policy: policyVersion,
    keyTable: evaluation.keyTable.version,
    assembly: hashOf(evaluation.assembly),
    findings: evaluation.report.findings.map((finding) => [
      findingKey(finding),
      finding.level,
      finding.value,
      finding.limit,
    ]),
    machines: evaluation.machines,
  });
}
