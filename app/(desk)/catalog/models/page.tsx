import type { Metadata } from "next";
import Link from "next/link";
import { ListFilter } from "@/components/catalog/list-filter";
import { leafThrough } from "@/components/catalog/pages";
import { ButtonLink } from "@/components/ui/button";
import { Empty } from "@/components/ui/empty";
import { Pager } from "@/components/ui/pager";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { load, pageActor } from "@/lib/http/page-actor";
import { may } from "@/lib/policies/decide";
import { modelQuery, type ModelRow } from "@/lib/schemas/machine-models";
import { listModels } from "@/lib/services/models/list";

export const metadata: Metadata = { title: "Catalog, machine models" };

interface PageProps {
  readonly searchParams: Promise<Record<string, string | string[] | undefined>>;
}

function ModelRows({ models }: { readonly models: readonly ModelRow[] }) {
  return (
    <Table caption="Machine models" captionHidden>
      <thead>
        <tr>
          <Head>Code</Head>
          <Head>Name</Head>
          <Head>Axes</Head>
          <Head number>Machines</Head>
          <Head number>Version</Head>
          <Head>Key table</Head>
        </tr>
      </thead>
      <tbody>
        {models.map(({ id, code, name, axes, machines, version, keyTableVersion, retiredAt }) => (
          <tr key={id}>
            <th scope="row">
              <Link href={`/catalog/models/${id}`}>{code}</Link>
              {retiredAt && <span className="quiet"> retired</span>}
            </th>
            <td>{name}</td>
            <td>{axes.join(", ")}</td>
            <NumberCell>{machines}</NumberCell>
            <NumberCell>{version}</NumberCell>
            <td>
              <Link href={`/catalog/models/${id}/key-table`} aria-label={`Key table of ${code}`}>
                {keyTableVersion === 0 ? "none yet" : `version ${keyTableVersion}`}
              </Link>
            </td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

export default async function ModelsPage({ searchParams }: PageProps) {
  const context = await pageActor("catalog.read");
  const query = modelQuery.safeParse(await searchParams).data ?? modelQuery.parse({});
  const found = await load(listModels(context, query));
  const add = may(context.actor, "models.write") && (
    <ButtonLink href="/catalog/models/new">New machine model</ButtonLink>
  );
  const leaf = leafThrough(found, {
    path: "/catalog/models",
    filters: { q: query.q, retired: query.retired === "no" ? undefined : query.retired },
    noun: "machine model",
  });
  return (
    <Sheet>
      <SheetHead kicker={<Link href="/catalog">Catalog</Link>} title="Machine models" acts={add} />
      <ListFilter q={query.q ?? ""} retired={query.retired} />
      {found.total === 0 ? (
        <Empty act={add}>
          {query.q || query.retired !== "no"
            ? "No machine model fits this."
            : "The designs that the machines are built after belong here: their axes and the hardware of each."}
        </Empty>
      ) : (
        <>
          <ModelRows models={found.items} />
          <Pager label="Machine models" {...leaf} />
        </>
      )}
    </Sheet>
  );
}
