import type { Document, ParsedValue } from "@/lib/parsers/types";

/** A parsed value as plain data; a number with a unit as its spelling. */
export function plainValue(value: ParsedValue): unknown {
  switch (value.kind) {
    case "list":
      return value.items.map((item) => plainValue(item.value));
    case "none":
      return null;
    case "number":
      return value.unit === null ? value.value : `${value.value} ${value.unit}`;
    default:
      return value.value;
  }
}

/** What counts in a document, by key; the elements of a list by number. */
export function enabledValues({ entries }: Document): Map<string, unknown> {
  const values = new Map<string, unknown>();
  for (const { key, value, disabled, shadowed } of entries) {
    if (disabled || shadowed) continue;
    const plain = plainValue(value);
    if (Array.isArray(plain)) plain.forEach((one, index) => values.set(`${key}.${index}`, one));
    else values.set(key, plain);
  }
  return values;
}

/** The leaves of plain data as `enabledValues` has them. Names that stand in the data count as they are. */
export function flatten(data: unknown): Map<string, unknown> {
  const values = new Map<string, unknown>();
  const walk = (value: unknown, key: string): void => {
    if (value === null || typeof value !== "object" || value instanceof Date) {
      values.set(key, value);
      return;
    }
    for (const [name, inner] of Object.entries(value)) walk(inner, key === "" ? name : `${key}.${name}`);
  };
  walk(data, "");
  return values;
}
