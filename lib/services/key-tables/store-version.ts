import "server-only";
import type { KeyRule } from "@/lib/domain/key-table";
import { KeyTableVersion } from "@/models/catalog";
import type { Tx } from "@/lib/services/kernel/context";
import { personBehind } from "@/lib/services/kernel/context";

interface NewVersion {
  readonly modelId: string;
  readonly version: number;
  readonly rules: readonly KeyRule[];
  readonly note: string;
}

/** Stores a version of a key table; versions before it stay readable. The caller holds the model's lock. */
export async function storeKeyTableVersion(tx: Tx, { rules, ...version }: NewVersion): Promise<void> {
  await KeyTableVersion.create(
    {
      ...version,
      rules: [...rules],
      createdBy: personBehind(tx.actor),
      createdByName: tx.actor.name,
      createdAt: tx.now,
    },
    { transaction: tx.transaction },
  );
}
