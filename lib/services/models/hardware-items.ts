import "server-only";
import type { Transaction } from "sequelize";
import { CATALOG_KIND_WORDS, type CatalogKind, type ModelHardware } from "@/lib/domain/catalog";
import { CatalogItem } from "@/models/catalog";
import type { Tx } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";

interface NamedItem {
  readonly id: string;
  readonly kind: CatalogKind;
  /** Where the request names it. */
  readonly pointer: string;
}

const AXIS_PARTS = ["motor", "driver", "drive_train", "mount"] as const;

/** Every catalog item that a model's hardware names, with the kind that it must be of. */
function namedItems(hardware: ModelHardware): NamedItem[] {
  const of = (id: string | null, kind: CatalogKind, place: string): NamedItem[] =>
    id === null ? [] : [{ id, kind, pointer: `/hardware/${place}` }];
  return [
    ...of(hardware.supply, "supply", "supply"),
    ...of(hardware.controller_board, "controller_board", "controller_board"),
    ...hardware.axes.flatMap((axis, index) =>
      AXIS_PARTS.flatMap((part) => of(axis[part], part, `axes/${index}/${part}`)),
    ),
  ];
}

export function itemIdsOf(hardware: ModelHardware): string[] {
  return [...new Set(namedItems(hardware).map(({ id }) => id))];
}

export function itemsById(ids: readonly string[], transaction?: Transaction): Promise<CatalogItem[]> {
  return CatalogItem.findAll({
    where: { id: [...new Set(ids)] },
    order: [["code", "ASC"]],
    transaction: transaction ?? null,
  });
}

/**
 * Refuses hardware that names what is not in the catalog, what is of another kind, or what is retired and was not
 * there before.
 */
export async function requireFittingItems(
  tx: Tx,
  hardware: ModelHardware,
  keeps: ReadonlySet<string>,
): Promise<void> {
  const named = namedItems(hardware);
  const items = new Map(
    (await itemsById(itemIdsOf(hardware), tx.transaction)).map((item) => [item.id, item]),
  );
  for (const { id, kind, pointer } of named) {
    const item = items.get(id);
    const { one } = CATALOG_KIND_WORDS[kind];
    if (!item)
      throw new ServiceError("invalid", `This ${one} is not in the catalog. Nothing was stored.`, {
        pointer,
      });
    if (item.kind !== kind)
      throw new ServiceError(
        "invalid",
        `${item.code} is a ${CATALOG_KIND_WORDS[item.kind].one}; a ${one} belongs here. Nothing was stored.`,
        { pointer },
      );
    if (item.retiredAt && !keeps.has(id))
      throw new ServiceError(
        "invalid",
        `The ${one} ${item.code} is retired. Choose another, or take it back into use first.`,
        { pointer },
      );
  }
}
