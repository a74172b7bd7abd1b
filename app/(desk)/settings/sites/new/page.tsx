import type { Metadata } from "next";
import Link from "next/link";
import { SiteForm } from "@/components/settings/site-form";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { pageActor } from "@/lib/http/page-actor";

export const metadata: Metadata = { title: "Add a site" };

export default async function NewSitePage() {
  await pageActor("sites.write");
  return (
    <Sheet width="narrow">
      <SheetHead kicker={<Link href="/settings/sites">Sites</Link>} title="Add a site" />
      <SiteForm site={null} />
    </Sheet>
  );
}
