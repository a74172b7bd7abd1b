"use client";

import type { ComponentProps } from "react";
import { SelectField } from "@/components/ui/field";
import { CATALOG_KIND_WORDS, type CatalogKind } from "@/lib/domain/catalog";
import type { ItemChoice } from "@/lib/schemas/catalog";

export interface ItemSelectProps extends ComponentProps<"select"> {
  readonly kind: CatalogKind;
  readonly choices: readonly ItemChoice[];
  /** The item chosen now: offered even where it is retired. */
  readonly chosen: string;
  readonly error: string | undefined;
  readonly label?: string;
}

/** One item of a kind, or none. */
export function ItemSelect({ kind, choices, chosen, label, ...control }: ItemSelectProps) {
  const { one } = CATALOG_KIND_WORDS[kind];
  const offered = choices.filter(
    (choice) => choice.kind === kind && (!choice.retired || choice.id === chosen),
  );
  return (
    <SelectField label={label ?? one.charAt(0).toUpperCase() + one.slice(1)} {...control}>
      <option value="">not stated</option>
      {offered.map(({ id, code, name, retired }) => (
        <option key={id} value={id}>
          {code} {name}
          {retired ? " (retired)" : ""}
        </option>
      ))}
    </SelectField>
  );
}
