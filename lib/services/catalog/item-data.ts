import "server-only";
import type { z } from "zod";
import { setPointSchema } from "@/lib/domain/assembly";
import { CATALOG_DATA, CATALOG_KIND_WORDS, type CatalogKind } from "@/lib/domain/catalog";
import { ServiceError } from "@/lib/services/kernel/errors";

/** The schema of a kind's data that refuses fields which no check knows, instead of dropping them. */
function strictData(kind: CatalogKind): z.ZodType<Record<string, unknown>> {
  if (kind !== "driver") return CATALOG_DATA[kind].strict();
  return CATALOG_DATA.driver.extend({ set_point: setPointSchema.strict().optional() }).strict();
}

/** The data of an item as its kind takes them; a field that does not fit is refused by name. */
export function readItemData(kind: CatalogKind, data: unknown): Record<string, unknown> {
  const read = strictData(kind).safeParse(data);
  if (read.success) return read.data;
  const [issue] = read.error.issues;
  const unknown = issue?.code === "unrecognized_keys" ? issue.keys.slice(0, 1) : [];
  const path = [...(issue?.path ?? []), ...unknown].map(String);
  throw new ServiceError(
    "invalid",
    unknown.length > 0
      ? `A ${CATALOG_KIND_WORDS[kind].one} has no field “${path.join(".")}”. Nothing was stored.`
      : `The field “${path.join(".")}” does not fit: ${issue?.message ?? "not valid"}. Nothing was stored.`,
    { pointer: `/data${path.map((part) => `/${part}`).join("")}` },
  );
}
