import Link from "next/link";
import { NoValue } from "@/components/ui/quantity";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { CATALOG_KIND_WORDS, type CatalogKind, type ModelAxis } from "@/lib/domain/catalog";
import { formatNumber } from "@/lib/domain/units";
import { kindSlug } from "@/lib/schemas/catalog";
import type { ModelView } from "@/lib/schemas/machine-models";

const PARTS = ["motor", "driver", "drive_train", "mount"] as const;

export interface ItemLinkProps {
  readonly kind: CatalogKind;
  readonly id: string | null;
  readonly items: ModelView["items"];
}

/** A catalog item by its code; a dash where none is named. */
export function ItemLink({ kind, id, items }: ItemLinkProps) {
  const item = items.find((known) => known.id === id);
  if (!item) return <NoValue />;
  return (
    <Link href={`/catalog/${kindSlug(kind)}/${item.id}`} title={item.name}>
      {item.code}
    </Link>
  );
}

function travelWords({ travel_mm: mm, travel_deg: deg }: ModelAxis): string | null {
  if (mm !== undefined) return `${formatNumber(mm, 6)}\u00a0mm`;
  return deg === undefined ? null : `${formatNumber(deg, 6)}\u00a0deg`;
}

/** The axes of a model with the hardware of each, to read. */
export function AxesTable({ model }: { readonly model: ModelView }) {
  return (
    <Table caption="Axes" captionHidden>
      <thead>
        <tr>
          <Head>Axis</Head>
          <Head number>Motors</Head>
          {PARTS.map((part) => (
            <Head key={part}>{CATALOG_KIND_WORDS[part].one}</Head>
          ))}
          <Head number>Travel</Head>
        </tr>
      </thead>
      <tbody>
        {model.hardware.axes.map((axis) => (
          <tr key={axis.axis}>
            <th scope="row">{axis.axis}</th>
            <NumberCell>{axis.motor_count}</NumberCell>
            {PARTS.map((part) => (
              <td key={part}>
                <ItemLink kind={part} id={axis[part]} items={model.items} />
              </td>
            ))}
            <NumberCell>{travelWords(axis) ?? <NoValue />}</NumberCell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
