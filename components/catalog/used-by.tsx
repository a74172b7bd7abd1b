import Link from "next/link";
import { axisTitle } from "@/components/findings/axis-title";
import { Empty } from "@/components/ui/empty";
import { Head, Table } from "@/components/ui/table";
import { CATALOG_KIND_WORDS, type CatalogKind } from "@/lib/domain/catalog";
import { joinWords } from "@/lib/domain/sentences";
import type { ItemView } from "@/lib/schemas/catalog";

interface Use {
  readonly key: string;
  readonly href: string;
  readonly label: string;
  readonly where: string;
}

function usesOf({ models, machines }: ItemView["usedBy"]): Use[] {
  return [
    ...models.map(({ id, code, name, axes }) => ({
      key: id,
      href: `/catalog/models/${id}`,
      label: `${code} ${name}`,
      where: axes.length === 0 ? "the model" : `the model, ${joinWords(axes.map(axisTitle))}`,
    })),
    ...machines.map(({ id, serial, axis, part }) => ({
      key: `${id} ${part} ${axis ?? ""}`,
      href: `/machines/${id}`,
      label: serial,
      where: `this machine's own, ${axis === null ? "the machine or every axis" : axisTitle(axis)}`,
    })),
  ];
}

/** Models and machines that have an item. */
export function UsedBy({
  kind,
  usedBy,
}: {
  readonly kind: CatalogKind;
  readonly usedBy: ItemView["usedBy"];
}) {
  const uses = usesOf(usedBy);
  if (uses.length === 0)
    return (
      <Empty>
        No machine model names this {CATALOG_KIND_WORDS[kind].one}, and no machine has it recorded as its own.
      </Empty>
    );
  return (
    <Table caption="Where it is used" captionHidden>
      <thead>
        <tr>
          <Head>Machine model or machine</Head>
          <Head>Where</Head>
        </tr>
      </thead>
      <tbody>
        {uses.map(({ key, href, label, where }) => (
          <tr key={key}>
            <th scope="row">
              <Link href={href}>{label}</Link>
            </th>
            <td>{where}</td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
