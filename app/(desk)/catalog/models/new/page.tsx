import type { Metadata } from "next";
import Link from "next/link";
import { ModelFormSheet } from "@/components/catalog/model-form";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { load, pageActor } from "@/lib/http/page-actor";
import { itemChoices } from "@/lib/services/catalog/choices";

export const metadata: Metadata = { title: "Catalog, new machine model" };

export default async function NewModelPage() {
  const context = await pageActor("models.write");
  const choices = await load(itemChoices(context));
  return (
    <Sheet>
      <SheetHead
        kicker={
          <>
            <Link href="/catalog">Catalog</Link>, <Link href="/catalog/models">machine models</Link>
          </>
        }
        title="New machine model"
        subtitle="Its axes with the hardware of each. What is not in the catalog yet can be left open and filled later."
      />
      <ModelFormSheet model={null} choices={choices} />
    </Sheet>
  );
}
