import "server-only";
import { DEFAULT_POLICY, policySchema } from "@/lib/domain/policy";
import type { PoliciesView, PolicyVersionView } from "@/lib/schemas/policies";
import { PolicyVersion } from "@/models/catalog";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";

const NEWEST = 100;

const DEFAULTS: PolicyVersionView = {
  version: 0,
  policy: DEFAULT_POLICY,
  note: "The product's defaults",
  createdByName: "system",
  createdAt: null,
};

export function presentPolicy(row: PolicyVersion): PolicyVersionView {
  return {
    version: row.version,
    policy: policySchema.parse(row.data),
    note: row.note,
    createdByName: row.createdByName,
    createdAt: row.createdAt.toISOString(),
  };
}

/** The team's margins of this moment and what they were before. */
export async function showPolicies(context: Context): Promise<PoliciesView> {
  authorize(context, "policies.read");
  const rows = await PolicyVersion.findAll({ order: [["version", "DESC"]], limit: NEWEST });
  const history = rows.map(presentPolicy);
  return { current: history[0] ?? DEFAULTS, history };
}
