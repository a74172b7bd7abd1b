import type { Metadata } from "next";
import Link from "next/link";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { CATALOG_KIND_WORDS, CATALOG_KINDS } from "@/lib/domain/catalog";
import { load, pageActor } from "@/lib/http/page-actor";
import { kindSlug } from "@/lib/schemas/catalog";
import { catalogOverview } from "@/lib/services/catalog/overview";

export const metadata: Metadata = { title: "Catalog" };

const WHAT: Record<(typeof CATALOG_KINDS)[number], string> = {
  motor: "winding, torque, rotor, heat",
  driver: "current, voltage, set-point, heat, step signal",
  controller_board: "step rate",
  supply: "voltage, power, bus capacitance",
  drive_train: "belt, screw, rack or rotary, with its ratio",
  mount: "the temperature that softens it",
};

function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}

interface Row {
  readonly href: string;
  readonly title: string;
  readonly what: string;
  readonly count: number;
}

function Rows({ caption, rows }: { readonly caption: string; readonly rows: readonly Row[] }) {
  return (
    <Table caption={caption}>
      <thead>
        <tr>
          <Head>What</Head>
          <Head>What it holds</Head>
          <Head number>In use</Head>
        </tr>
      </thead>
      <tbody>
        {rows.map(({ href, title, what, count }) => (
          <tr key={title}>
            <th scope="row">
              <Link href={href}>{title}</Link>
            </th>
            <td>{what}</td>
            <NumberCell>{count}</NumberCell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

export default async function CatalogPage() {
  const context = await pageActor("catalog.read");
  const { items, models, keyTables, machines } = await load(catalogOverview(context));
  const hardware = CATALOG_KINDS.map((kind) => ({
    href: `/catalog/${kindSlug(kind)}`,
    title: capital(CATALOG_KIND_WORDS[kind].many),
    what: WHAT[kind],
    count: items[kind],
  }));
  const designs = [
    { href: "/catalog/models", title: "Machine models", what: "axes and their hardware", count: models },
    {
      href: "/catalog/models",
      title: "Key tables",
      what: "which key is which parameter, one a model",
      count: keyTables,
    },
    {
      href: "/catalog/machines",
      title: "Machines",
      what: "built units with serial number and site",
      count: machines,
    },
  ];
  return (
    <Sheet>
      <SheetHead
        title="Catalog"
        subtitle="The hardware that the checks reckon with, the machine models made of it, and the machines built after them."
      />
      <Rows caption="Hardware catalog" rows={hardware} />
      <Rows caption="Models and machines" rows={designs} />
    </Sheet>
  );
}
