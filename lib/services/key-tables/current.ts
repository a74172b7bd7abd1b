import "server-only";
import type { Transaction } from "sequelize";
import type { KeyTable } from "@/lib/domain/key-table";
import { keyTableSchema } from "@/lib/domain/key-table";
import { KeyTableVersion } from "@/models/catalog";

export interface CurrentKeyTable {
  /** Row of the version; null where the model has no key table yet. */
  readonly id: string | null;
  readonly version: number;
  readonly table: KeyTable;
}

/** The newest key table of a model; an empty one of version 0 where nobody has made one. */
export async function currentKeyTable(modelId: string, transaction?: Transaction): Promise<CurrentKeyTable> {
  const row = await KeyTableVersion.findOne({
    where: { modelId },
    order: [["version", "DESC"]],
    transaction: transaction ?? null,
  });
  if (!row) return { id: null, version: 0, table: { rules: [] } };
  return { id: row.id, version: row.version, table: keyTableSchema.parse({ rules: row.rules }) };
}
