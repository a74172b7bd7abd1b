import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { ItemForm } from "@/components/catalog/item-form";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { CATALOG_KIND_WORDS } from "@/lib/domain/catalog";
import { pageActor } from "@/lib/http/page-actor";
import { kindOfSlug } from "@/lib/schemas/catalog";

export const metadata: Metadata = { title: "Catalog, new item" };

export default async function NewItemPage({ params }: { readonly params: Promise<{ kind: string }> }) {
  await pageActor("catalog.write");
  const { kind: slug } = await params;
  const kind = kindOfSlug(slug);
  if (!kind) notFound();
  const { one, many } = CATALOG_KIND_WORDS[kind];
  return (
    <Sheet>
      <SheetHead
        kicker={
          <>
            <Link href="/catalog">Catalog</Link>, <Link href={`/catalog/${slug}`}>{many}</Link>
          </>
        }
        title={`New ${one}`}
        subtitle="Leave empty what the sheet does not state: a missing value is said to be missing, never guessed."
      />
      <ItemForm kind={kind} item={null} />
    </Sheet>
  );
}
