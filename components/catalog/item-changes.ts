import type { CatalogKind } from "@/lib/domain/catalog";
import { CATALOG_DATA } from "@/lib/domain/catalog";
import { formatNumber } from "@/lib/domain/units";
import type { ItemVersion } from "@/lib/schemas/catalog";
import { choiceWords, formFields, valueAt, type FormField } from "@/lib/schemas/form-fields";

export interface FieldChange {
  readonly label: string;
  readonly was: string;
  readonly toBe: string;
}

/** A stored value in words with its unit; a missing one is "not stated". */
export function fieldWords({ unit }: Pick<FormField, "unit">, value: unknown): string {
  if (value === undefined || value === null) return "not stated";
  if (typeof value === "boolean") return value ? "yes" : "no";
  if (typeof value === "number")
    return unit === "" ? formatNumber(value, 6) : `${formatNumber(value, 6)} ${unit}`;
  return choiceWords(String(value));
}

type Compared = Pick<ItemVersion, "name" | "data">;

/** What one version of an item has otherwise than the version before it. */
export function itemChanges(kind: CatalogKind, was: Compared, toBe: Compared): FieldChange[] {
  const renamed = was.name === toBe.name ? [] : [{ label: "Name", was: was.name, toBe: toBe.name }];
  const fields = formFields(CATALOG_DATA[kind]).flatMap((field) => {
    const [before, after] = [valueAt(was.data, field.path), valueAt(toBe.data, field.path)];
    return before === after
      ? []
      : [{ label: field.label, was: fieldWords(field, before), toBe: fieldWords(field, after) }];
  });
  return [...renamed, ...fields];
}
