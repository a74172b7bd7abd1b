import "server-only";
import type { ItemRow, ItemVersion } from "@/lib/schemas/catalog";
import type { CatalogItem, CatalogVersion } from "@/models/catalog";

export function presentVersion(version: CatalogVersion): ItemVersion {
  return {
    version: version.version,
    name: version.name,
    data: version.data,
    evidence: version.evidence,
    createdByName: version.createdByName,
    createdAt: version.createdAt.toISOString(),
  };
}

export function presentItem(item: CatalogItem, newest: CatalogVersion | undefined): ItemRow {
  return {
    id: item.id,
    kind: item.kind,
    code: item.code,
    name: item.name,
    version: item.version,
    retiredAt: item.retiredAt?.toISOString() ?? null,
    data: newest?.data ?? {},
    evidence: newest?.evidence ?? "",
  };
}
