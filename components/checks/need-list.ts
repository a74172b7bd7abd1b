import type { z } from "zod";
import { assemblySchema, axisAssemblySchema, loadSchema } from "@/lib/domain/assembly";
import { CATALOG_DATA, CATALOG_KIND_WORDS, CATALOG_KINDS } from "@/lib/domain/catalog";
import { PARAMETER_NAMES, parameterLabel } from "@/lib/domain/parameters";
import { formFields } from "@/lib/schemas/form-fields";

const PARTS: Readonly<Record<string, { readonly words: string; readonly schema: z.ZodObject }>> = {
  ...Object.fromEntries(
    CATALOG_KINDS.map((kind) => [kind, { words: CATALOG_KIND_WORDS[kind].one, schema: CATALOG_DATA[kind] }]),
  ),
  load: { words: "load", schema: loadSchema },
  axis: { words: "axis", schema: axisAssemblySchema },
  machine: { words: "machine and site", schema: assemblySchema },
};

const TEXT = "configuration text";

function lowerFirst(words: string): string {
  return /^[A-Z][a-z ,-]/.test(words) ? words.charAt(0).toLowerCase() + words.slice(1) : words;
}

function placed(need: string): { readonly part: string; readonly words: string } {
  const parameter = PARAMETER_NAMES.find((name) => name === need);
  if (parameter) return { part: TEXT, words: lowerFirst(parameterLabel(parameter)) };
  const [part = "", ...field] = need.split(".");
  const known = PARTS[part];
  if (!known) return { part: "other", words: need };
  const label = formFields(known.schema).find(({ path }) => path === field.join("."))?.label;
  return { part: known.words, words: lowerFirst(label ?? field.join(" ").replaceAll("_", " ")) };
}

/** What a check can use, one line for each part: "Motor: rated current, winding inductance". */
export function hardwareWords(needs: readonly string[]): string[] {
  const parts = new Map<string, string[]>();
  for (const { part, words } of needs.map(placed)) parts.set(part, [...(parts.get(part) ?? []), words]);
  return [...parts].map(
    ([part, words]) => `${part.charAt(0).toUpperCase()}${part.slice(1)}: ${[...new Set(words)].join(", ")}`,
  );
}
