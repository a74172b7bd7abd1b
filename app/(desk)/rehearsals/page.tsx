import type { Metadata } from "next";
import { RehearsalsTable } from "@/components/rehearsals/rehearsals-table";
import { StartPartSwap } from "@/components/rehearsals/start-part-swap";
import { StartWarmDay } from "@/components/rehearsals/start-warm-day";
import { Empty } from "@/components/ui/empty";
import { pageLinks } from "@/components/ui/page-links";
import { Pager } from "@/components/ui/pager";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { load, pageActor } from "@/lib/http/page-actor";
import { readParams, type SearchParams } from "@/lib/http/search-params";
import { may } from "@/lib/policies/decide";
import { rehearsalQuery } from "@/lib/schemas/rehearsals";
import { itemChoices } from "@/lib/services/catalog/choices";
import { listModels } from "@/lib/services/models/list";
import { listRehearsals } from "@/lib/services/rehearsals/list";
import { listSites } from "@/lib/services/sites/list";

export const metadata: Metadata = { title: "Rehearsals" };

export default async function RehearsalsPage({ searchParams }: { readonly searchParams: SearchParams }) {
  const context = await pageActor("rehearsals.read");
  const { query, typed } = await readParams(rehearsalQuery, searchParams);
  const [found, items, { items: sites }, { items: models }] = await load(
    Promise.all([
      listRehearsals(context, query),
      itemChoices(context),
      listSites(context, { retired: "no" }),
      listModels(context, { retired: "no", page: 1, pageSize: 200 }),
    ]),
  );
  const pager = pageLinks(found, { path: "/rehearsals", query: typed, what: "rehearsals" });
  const starts = may(context.actor, "rehearsals.start");
  return (
    <Sheet>
      <SheetHead
        title="Rehearsals"
        subtitle="The whole fleet checked as it would be on a warmer day, or with another part fitted. Nothing is done to any machine."
      />
      {starts && (
        <>
          <SheetSection title="Warm day" note="and the hottest room that each machine tolerates">
            <StartWarmDay sites={sites} models={models} />
          </SheetSection>
          <SheetSection title="Part swap" note="which machines another motor or driver would break">
            <StartPartSwap sites={sites} models={models} items={items} />
          </SheetSection>
        </>
      )}
      <SheetSection title="What was rehearsed">
        {found.items.length > 0 ? (
          <RehearsalsTable rehearsals={found.items} />
        ) : (
          <Empty>Here stands each rehearsal with the machines that would be newly over limit.</Empty>
        )}
        <Pager label="Rehearsals" {...pager} />
      </SheetSection>
    </Sheet>
  );
}
