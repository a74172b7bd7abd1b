import "server-only";
import type { Transaction } from "sequelize";
import type { Policy } from "@/lib/domain/policy";
import { DEFAULT_POLICY, policySchema } from "@/lib/domain/policy";
import { PolicyVersion } from "@/models/catalog";

export interface CurrentPolicy {
  /** 0 where the team has not saved one: the product's defaults. */
  readonly version: number;
  readonly policy: Policy;
}

/** The team's policy of this moment. */
export async function currentPolicy(transaction?: Transaction): Promise<CurrentPolicy> {
  const row = await PolicyVersion.findOne({ order: [["version", "DESC"]], transaction: transaction ?? null });
  return row
    ? { version: row.version, policy: policySchema.parse(row.data) }
    : { version: 0, policy: DEFAULT_POLICY };
}

/** The same, and where nobody has saved one yet the defaults become version 1, because evaluations refer to a version. */
export async function ensurePolicy(transaction: Transaction): Promise<CurrentPolicy> {
  const current = await currentPolicy(transaction);
  if (current.version > 0) return current;
  await PolicyVersion.bulkCreate(
    [{ version: 1, data: DEFAULT_POLICY, note: "The product's defaults", createdByName: "system" }],
    { transaction, ignoreDuplicates: true },
  );
  return currentPolicy(transaction);
}
