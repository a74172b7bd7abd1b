import "server-only";
import type { CatalogItem } from "@/models/catalog";
import { CatalogVersion } from "@/models/catalog";
import type { Tx } from "@/lib/services/kernel/context";
import { personBehind } from "@/lib/services/kernel/context";

export interface VersionData {
  readonly data: Record<string, unknown>;
  readonly evidence: string;
}

/** Stores the item's data as the version that its row names; versions before it stay readable. */
export async function storeVersion(tx: Tx, item: CatalogItem, { data, evidence }: VersionData) {
  await CatalogVersion.create(
    {
      itemId: item.id,
      version: item.version,
      name: item.name,
      data,
      evidence,
      createdBy: personBehind(tx.actor),
      createdByName: tx.actor.name,
      createdAt: tx.now,
    },
    { transaction: tx.transaction },
  );
}
