import "server-only";
import type { CatalogKind } from "@/lib/domain/catalog";
import { CATALOG_KIND_WORDS } from "@/lib/domain/catalog";
import { CatalogItem } from "@/models/catalog";
import type { Tx } from "@/lib/services/kernel/context";
import { notFound, ServiceError } from "@/lib/services/kernel/errors";

export interface ItemIdentity {
  readonly kind: CatalogKind;
  readonly id: string;
}

/** The item's row, locked until the act is over. */
export async function lockItem(tx: Tx, { kind, id }: ItemIdentity): Promise<CatalogItem> {
  const item = await CatalogItem.findOne({
    where: { id, kind },
    transaction: tx.transaction,
    lock: tx.transaction.LOCK.UPDATE,
  });
  if (!item) throw notFound(CATALOG_KIND_WORDS[kind].one);
  return item;
}

/** Refuses a code that another item of the kind has. */
export async function requireFreeCode(tx: Tx, { kind, code }: { kind: CatalogKind; code: string }) {
  const taken = await CatalogItem.findOne({ where: { kind, code }, transaction: tx.transaction });
  if (taken)
    throw new ServiceError(
      "conflict",
      `There is a ${CATALOG_KIND_WORDS[kind].one} with the code ${code} already: ${taken.name}. Choose another code.`,
      { pointer: "/code" },
    );
}
