import type { CatalogKind } from "@/lib/domain/catalog";
import { CATALOG_DATA } from "@/lib/domain/catalog";
import { Facts } from "@/components/ui/facts";
import { unlockedBy } from "@/lib/rules/unlocks";
import { formFields, valueAt, type FieldData } from "@/lib/schemas/form-fields";
import { groupedFields, isAsked } from "./field-groups";
import { fieldWords } from "./item-changes";
import { unlockSentence } from "./unlock-sentence";

/** The data of an item to read; a missing field says which checks it would unlock. */
export function ItemFacts({ kind, data }: { readonly kind: CatalogKind; readonly data: FieldData }) {
  const typed = (path: string): string => String(valueAt(data, path) ?? "");
  return groupedFields(kind, formFields(CATALOG_DATA[kind])).map(({ legend, fields }) => (
    <section key={legend} className="mb-5">
      <h3>{legend}</h3>
      <Facts
        facts={fields
          .filter(({ path }) => isAsked(path, typed))
          .map((field) => {
            const value = valueAt(data, field.path);
            const note = value === undefined ? unlockSentence(unlockedBy(kind, field.path)) : null;
            return { label: field.label, value: fieldWords(field, value), ...(note ? { note } : {}) };
          })}
      />
    </section>
  ));
}
