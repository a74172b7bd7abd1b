import "server-only";
import type { HardwareFact } from "@/lib/domain/catalog";
import { CatalogItem } from "@/models/catalog";
import { modelHardware } from "./assembly";

export interface FittedItem {
  readonly id: string;
  readonly code: string;
  readonly name: string;
}

const AXIS_PARTS = ["motor", "driver", "drive_train", "mount"] as const;

/** Which catalog items are fitted where, by path as in a finding's `needs`; the machine's own take the model's place. */
export async function fittedItems(
  modelId: string,
  facts: readonly HardwareFact[],
): Promise<Record<string, FittedItem>> {
  const model = await modelHardware(modelId);
  const places: (readonly [string, string | null])[] = [
    ["supply", model.supply],
    ["controller_board", model.controller_board],
    ...model.axes.flatMap((axis) =>
      AXIS_PARTS.map((part) => [`axes.${axis.axis}.${part}`, axis[part]] as const),
    ),
  ];
  const ids = new Map(places);
  for (const { axis, part, itemId } of facts)
    if (itemId !== null) for (const path of pathsOf([...ids.keys()], axis, part)) ids.set(path, itemId);
  return named(ids);
}

/** A fact without an axis about a part of the axes holds for every axis. */
function pathsOf(known: readonly string[], axis: string | null, part: string): string[] {
  const own = axis === null ? null : `axes.${axis}.${part}`.toLowerCase();
  return known.filter((path) =>
    own === null ? path === part || path.endsWith(`.${part}`) : path.toLowerCase() === own,
  );
}

async function named(ids: ReadonlyMap<string, string | null>): Promise<Record<string, FittedItem>> {
  const sought = [...ids.values()].filter((id): id is string => id !== null);
  const items = await CatalogItem.findAll({ where: { id: [...new Set(sought)] } });
  const byId = new Map(items.map(({ id, code, name }) => [id, { id, code, name }]));
  return Object.fromEntries(
    [...ids].flatMap(([path, id]) => {
      const item = byId.get(id ?? "");
      return item ? [[path, item] as const] : [];
    }),
  );
}
