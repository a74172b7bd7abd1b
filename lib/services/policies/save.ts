import "server-only";
import { savePolicySchema, type PolicyVersionView, type SavePolicy } from "@/lib/schemas/policies";
import { sequelize } from "@/lib/server/sequelize";
import { PolicyVersion } from "@/models/catalog";
import type { Context, Tx } from "@/lib/services/kernel/context";
import { authorize, personBehind } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { requireVersion } from "@/lib/services/kernel/versions";
import { appendRecord } from "@/lib/services/record/append";
import { enqueueRecheck } from "@/lib/services/recheck/enqueue";
import { currentPolicy } from "./ensure";
import { presentPolicy } from "./show";

/** One save at a time, readers go on: two who save on the same version are told apart by it. */
async function lockPolicies(tx: Tx): Promise<void> {
  await sequelize.query("lock table policies in share row exclusive mode", { transaction: tx.transaction });
}

/** Saves a new version of the team's margins; the whole fleet is checked again with it. */
export async function savePolicy(
  context: Context,
  input: SavePolicy & { readonly ifMatch: number | null },
): Promise<PolicyVersionView> {
  const { policy, note } = savePolicySchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "policies.write");
    await lockPolicies(tx);
    const before = await currentPolicy(tx.transaction);
    requireVersion(input.ifMatch, before);
    const row = await PolicyVersion.create(
      {
        version: before.version + 1,
        data: policy,
        note,
        createdBy: personBehind(tx.actor),
        createdByName: tx.actor.name,
        createdAt: tx.now,
      },
      { transaction: tx.transaction },
    );
    await enqueueRecheck(tx, { all: true });
    await appendRecord(tx, {
      action: "policy.saved",
      object: { type: "policy", id: String(row.version), label: `Policy, version ${row.version}` },
      before: before.policy,
      after: policy,
      reason: note,
    });
    return presentPolicy(row);
  });
}
