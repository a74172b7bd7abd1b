import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { RecordList } from "@/components/record/record-list";
import { RetireSite } from "@/components/settings/retire-site";
import { SiteForm } from "@/components/settings/site-form";
import { Facts } from "@/components/ui/facts";
import { Quantity } from "@/components/ui/quantity";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { load, pageActor } from "@/lib/http/page-actor";
import { may } from "@/lib/policies/decide";
import { idParams } from "@/lib/schemas/common";
import type { SiteView } from "@/lib/schemas/sites";
import { recordOfObject } from "@/lib/services/record/of-object";
import { showSite } from "@/lib/services/sites/show";

export const metadata: Metadata = { title: "Site" };

export default async function SitePage({ params }: { readonly params: Promise<{ id: string }> }) {
  const context = await pageActor("catalog.read");
  const parsed = idParams.safeParse(await params);
  if (!parsed.success) notFound();
  const [site, events] = await load(
    Promise.all([
      showSite(context, parsed.data),
      recordOfObject(context, { type: "site", id: parsed.data.id }),
    ]),
  );
  const writes = may(context.actor, "sites.write");
  return (
    <Sheet>
      <SheetHead
        kicker={<Link href="/settings/sites">Sites</Link>}
        title={site.name}
        subtitle={`${site.code}, ${site.retiredAt === null ? "in use" : "out of use"}`}
        acts={writes && <RetireSite site={site} />}
      />
      <SiteFacts site={site} />
      {writes && (
        <SheetSection title="Change">
          <SiteForm key={site.version} site={site} />
        </SheetSection>
      )}
      <SheetSection title="Record">
        <RecordList events={events} caption={`Record of ${site.name}`} />
      </SheetSection>
    </Sheet>
  );
}

function SiteFacts({ site }: { readonly site: SiteView }) {
  return (
    <Facts
      facts={[
        {
          label: "Ambient temperature, design maximum",
          value: site.ambientC === null ? "not stated" : <Quantity value={site.ambientC} unit="°C" />,
        },
        {
          label: "Machines",
          value: <Link href={`/floor?siteId=${site.id}`}>{site.machines} on the floor</Link>,
        },
      ]}
    />
  );
}
