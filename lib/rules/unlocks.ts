import type { CatalogKind } from "@/lib/domain/catalog";
import { RULES } from "./table";

/**
 * Titles of the checks that can use a hardware field. `field` as the assembly names it, a set-point's as
 * "set_point.gain"; kind "machine" is for ambient_c and the like, "axis" for travel_mm and motor_count.
 */
export function unlockedBy(kind: CatalogKind | "load" | "axis" | "machine", field: string): string[] {
  const need = `${kind}.${field}`;
  return RULES.filter(({ needs }) => needs.includes(need)).map(({ title }) => title);
}
