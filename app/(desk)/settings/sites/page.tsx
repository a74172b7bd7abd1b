import type { Metadata } from "next";
import Link from "next/link";
import { ButtonLink } from "@/components/ui/button";
import { Empty } from "@/components/ui/empty";
import { Quantity } from "@/components/ui/quantity";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { load, pageActor } from "@/lib/http/page-actor";
import { may } from "@/lib/policies/decide";
import type { SiteView } from "@/lib/schemas/sites";
import { listSites } from "@/lib/services/sites/list";

export const metadata: Metadata = { title: "Sites" };

export default async function SitesPage() {
  const context = await pageActor("catalog.read");
  const { items } = await load(listSites(context, { retired: "all" }));
  const add = may(context.actor, "sites.write") && (
    <ButtonLink variant="primary" href="/settings/sites/new">
      Add a site
    </ButtonLink>
  );
  return (
    <Sheet>
      <SheetHead
        kicker={<Link href="/settings">Settings</Link>}
        title="Sites"
        subtitle="Where machines stand. Temperatures are checked at the warmest the room gets."
        acts={add}
      />
      {items.length === 0 ? (
        <Empty act={add}>Sites belong here: each place with machines, and how warm it gets there.</Empty>
      ) : (
        <SiteTable sites={items} />
      )}
    </Sheet>
  );
}

function SiteTable({ sites }: { readonly sites: readonly SiteView[] }) {
  return (
    <Table caption="Sites" captionHidden>
      <thead>
        <tr>
          <Head>Site</Head>
          <Head number>Ambient, design maximum</Head>
          <Head number>Machines</Head>
          <Head>State</Head>
        </tr>
      </thead>
      <tbody>
        {sites.map((site) => (
          <tr key={site.id}>
            <td>
              <Link href={`/settings/sites/${site.id}`}>{site.name}</Link>
              <p className="row-note">{site.code}</p>
            </td>
            <NumberCell>
              {site.ambientC === null ? "not stated" : <Quantity value={site.ambientC} unit="°C" />}
            </NumberCell>
            <NumberCell>{site.machines}</NumberCell>
            <td>{site.retiredAt === null ? "in use" : "out of use"}</td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
