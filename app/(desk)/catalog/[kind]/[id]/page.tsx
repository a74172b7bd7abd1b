import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { z } from "zod";
import { ItemFacts } from "@/components/catalog/item-facts";
import { ItemForm } from "@/components/catalog/item-form";
import { ItemVersions } from "@/components/catalog/item-versions";
import { RetireAndCopy } from "@/components/catalog/retire-and-copy";
import { UsedBy } from "@/components/catalog/used-by";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { CATALOG_KIND_WORDS } from "@/lib/domain/catalog";
import { load, pageActor } from "@/lib/http/page-actor";
import { may } from "@/lib/policies/decide";
import { kindOfSlug } from "@/lib/schemas/catalog";
import { showItem } from "@/lib/services/catalog/show";

export const metadata: Metadata = { title: "Catalog, item" };

interface PageProps {
  readonly params: Promise<{ kind: string; id: string }>;
}

export default async function ItemPage({ params }: PageProps) {
  const context = await pageActor("catalog.read");
  const { kind: slug, id } = await params;
  const kind = kindOfSlug(slug);
  if (!kind || !z.uuid().safeParse(id).success) notFound();
  const item = await load(showItem(context, { kind, id }));
  const mayWrite = may(context.actor, "catalog.write");
  const { one, many } = CATALOG_KIND_WORDS[kind];
  return (
    <Sheet>
      <SheetHead
        kicker={
          <>
            <Link href="/catalog">Catalog</Link>, <Link href={`/catalog/${slug}`}>{many}</Link>
          </>
        }
        title={`${item.code} ${item.name}`}
        subtitle={`${one}, version ${item.version}${item.retiredAt ? ", retired: no longer offered, kept where it is fitted" : ""}`}
        acts={
          mayWrite && (
            <RetireAndCopy
              apiPath={`/catalog/${slug}/${id}`}
              pagePath={`/catalog/${slug}`}
              noun={one}
              code={item.code}
              name={item.name}
              retired={item.retiredAt !== null}
              copyNote={`The copy starts with the data of version ${item.version} and says so in its evidence.`}
            />
          )
        }
      />
      {mayWrite ? (
        <ItemForm kind={kind} item={item} />
      ) : (
        <>
          <p>Evidence: {item.evidence}</p>
          <ItemFacts kind={kind} data={item.data} />
        </>
      )}
      <SheetSection title="Where it is used">
        <UsedBy kind={kind} usedBy={item.usedBy} />
      </SheetSection>
      <SheetSection title="Versions" note="Every version stays readable.">
        <ItemVersions item={item} mayWrite={mayWrite} />
      </SheetSection>
    </Sheet>
  );
}
