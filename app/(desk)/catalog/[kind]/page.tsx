import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { ListFilter } from "@/components/catalog/list-filter";
import { leafThrough } from "@/components/catalog/pages";
import { ButtonLink } from "@/components/ui/button";
import { Empty } from "@/components/ui/empty";
import { Pager } from "@/components/ui/pager";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { CATALOG_DATA, CATALOG_KIND_WORDS, type CatalogKind } from "@/lib/domain/catalog";
import { load, pageActor } from "@/lib/http/page-actor";
import { may } from "@/lib/policies/decide";
import { itemQuery, kindOfSlug, type ItemRow } from "@/lib/schemas/catalog";
import { formFields, valueAt } from "@/lib/schemas/form-fields";
import { listItems } from "@/lib/services/catalog/list";

interface PageProps {
  readonly params: Promise<{ kind: string }>;
  readonly searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export async function generateMetadata({ params }: PageProps): Promise<Metadata> {
  const kind = kindOfSlug((await params).kind);
  return { title: kind ? `Catalog, ${CATALOG_KIND_WORDS[kind].many}` : "Catalog" };
}

/** How many of a kind's fields an item states. */
function stated(kind: CatalogKind, { data }: ItemRow): { filled: number; of: number } {
  const fields = formFields(CATALOG_DATA[kind]);
  return { filled: fields.filter(({ path }) => valueAt(data, path) !== undefined).length, of: fields.length };
}

function ItemRows({ kind, slug, items }: { kind: CatalogKind; slug: string; items: readonly ItemRow[] }) {
  return (
    <Table caption={CATALOG_KIND_WORDS[kind].many} captionHidden>
      <thead>
        <tr>
          <Head>Code</Head>
          <Head>Name</Head>
          <Head number>Version</Head>
          <Head number>Fields stated</Head>
          <Head>Evidence</Head>
        </tr>
      </thead>
      <tbody>
        {items.map((item) => {
          const { filled, of } = stated(kind, item);
          return (
            <tr key={item.id}>
              <th scope="row">
                <Link href={`/catalog/${slug}/${item.id}`}>{item.code}</Link>
                {item.retiredAt && <span className="quiet"> retired</span>}
              </th>
              <td>{item.name}</td>
              <NumberCell>{item.version}</NumberCell>
              <NumberCell>
                {filled} of {of}
              </NumberCell>
              <td>{item.evidence}</td>
            </tr>
          );
        })}
      </tbody>
    </Table>
  );
}

export default async function CatalogKindPage({ params, searchParams }: PageProps) {
  const context = await pageActor("catalog.read");
  const { kind: slug } = await params;
  const kind = kindOfSlug(slug);
  if (!kind) notFound();
  const query = itemQuery.safeParse(await searchParams).data ?? itemQuery.parse({});
  const found = await load(listItems(context, { ...query, kind }));
  const { one, many } = CATALOG_KIND_WORDS[kind];
  const add = may(context.actor, "catalog.write") && (
    <ButtonLink href={`/catalog/${slug}/new`}>New {one}</ButtonLink>
  );
  const leaf = leafThrough(found, {
    path: `/catalog/${slug}`,
    filters: { q: query.q, retired: query.retired === "no" ? undefined : query.retired },
    noun: one,
  });
  return (
    <Sheet>
      <SheetHead
        kicker={<Link href="/catalog">Catalog</Link>}
        title={many.charAt(0).toUpperCase() + many.slice(1)}
        acts={add}
      />
      <ListFilter q={query.q ?? ""} retired={query.retired} />
      {found.total === 0 ? (
        <Empty act={add}>
          {query.q || query.retired !== "no"
            ? `No ${one} fits this.`
            : `The ${many} that the machines have belong here, with the data of their sheets.`}
        </Empty>
      ) : (
        <>
          <ItemRows kind={kind} slug={slug} items={found.items} />
          <Pager label={many} {...leaf} />
        </>
      )}
    </Sheet>
  );
}
