import { CATALOG_KIND_WORDS, type DifferingPart } from "@/lib/domain/catalog";

/** What a part is called on a page. */
export function partWords(part: DifferingPart): string {
  if (part === "sense_resistor") return "sense resistor";
  return part === "load" ? "load" : CATALOG_KIND_WORDS[part].one;
}
