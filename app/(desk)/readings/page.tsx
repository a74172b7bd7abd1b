import type { Metadata } from "next";
import { ReadingsFilter } from "@/components/readings/readings-filter";
import { ReadingsTable } from "@/components/readings/readings-table";
import { ButtonLink } from "@/components/ui/button";
import { Empty } from "@/components/ui/empty";
import { pageLinks } from "@/components/ui/page-links";
import { Pager } from "@/components/ui/pager";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { load, pageActor } from "@/lib/http/page-actor";
import { readParams, type SearchParams } from "@/lib/http/search-params";
import { may } from "@/lib/policies/decide";
import { readingQuery } from "@/lib/schemas/readings";
import { listReadings } from "@/lib/services/readings/list";

export const metadata: Metadata = { title: "Readings" };

export default async function ReadingsPage({ searchParams }: { readonly searchParams: SearchParams }) {
  const context = await pageActor("readings.read");
  const { query, typed, errors } = await readParams(readingQuery, searchParams);
  const found = await load(listReadings(context, query));
  const pager = pageLinks(found, { path: "/readings", query: typed, what: "readings" });
  const filtered = Object.keys(typed).some((name) => name !== "page");
  const add = may(context.actor, "readings.create") && (
    <ButtonLink variant="primary" href="/readings/new">
      Add a reading
    </ButtonLink>
  );
  return (
    <Sheet>
      <SheetHead
        title="Readings"
        subtitle="What was read from the machines, the newest first."
        acts={
          <>
            <ButtonLink href="/readings/new?mode=check">Check a text without keeping it</ButtonLink>
            {add}
          </>
        }
      />
      <ReadingsFilter typed={typed} errors={errors} />
      {found.items.length > 0 ? (
        <ReadingsTable readings={found.items} withMachine />
      ) : (
        <Empty act={filtered ? <ButtonLink href="/readings">Show all readings</ButtonLink> : add}>
          {filtered
            ? "No reading answers to this filter."
            : "Here stands every text read from a machine: as found, as left, or in service."}
        </Empty>
      )}
      <Pager label="Readings" {...pager} />
    </Sheet>
  );
}
