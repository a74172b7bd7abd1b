import "server-only";
import { DEFAULT_POLICY, policySchema, type Policy } from "@/lib/domain/policy";
import { changeMaps } from "@/lib/review/axis-pictures";
import type { OperatingMap } from "@/lib/review/operating-map";
import type { CheckReport } from "@/lib/review/types";
import type { RuleInput } from "@/lib/rules/types";
import { PolicyVersion } from "@/models/catalog";
import { ProposalVersion } from "@/models/changes";
import { Evaluation } from "@/models/revisions";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";

interface Asked {
  readonly changeId: string;
  /** Number of the proposal version. */
  readonly version: number;
}

/**
 * The operating maps that a proposal moves, on the hardware and under the policy that it was evaluated on. Without a base
 * every axis has one.
 */
export async function operatingMapsOfChange(
  context: Context,
  { changeId, version }: Asked,
): Promise<readonly OperatingMap[]> {
  authorize(context, "changes.read");
  const proposal = await ProposalVersion.findOne({ where: { changeId, version } });
  if (!proposal) throw notFound("proposal version");
  const after = await evaluated(proposal.evaluationId);
  if (!after) throw notFound("evaluation");
  return changeMaps(await evaluated(proposal.baseEvaluationId), after);
}

/** What the checks saw at a stored evaluation. */
async function evaluated(id: string | null): Promise<RuleInput | null> {
  const evaluation = id === null ? null : await Evaluation.findByPk(id);
  if (!evaluation) return null;
  // Stored reports are those that storeEvaluation wrote.
  const { parameters } = evaluation.report as CheckReport;
  return {
    parameters,
    assembly: evaluation.assembly,
    policy: await policyOf(evaluation.policyVersion),
  };
}

async function policyOf(version: number): Promise<Policy> {
  const row = await PolicyVersion.findOne({ where: { version } });
  return row ? policySchema.parse(row.data) : DEFAULT_POLICY;
}
