import type { Metadata } from "next";
import { RecordFilter } from "@/components/record/record-filter";
import { RecordList } from "@/components/record/record-list";
import { VerifyChain } from "@/components/record/verify-chain";
import { DateTime } from "@/components/ui/date-time";
import { pageLinks } from "@/components/ui/page-links";
import { Pager } from "@/components/ui/pager";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { TitleBlock } from "@/components/ui/title-block";
import { load, pageActor } from "@/lib/http/page-actor";
import { readParams, type SearchParams } from "@/lib/http/search-params";
import { recordQuery } from "@/lib/schemas/record";
import { searchRecord } from "@/lib/services/record/search";

export const metadata: Metadata = { title: "Record" };

export default async function RecordPage({ searchParams }: { readonly searchParams: SearchParams }) {
  const context = await pageActor("record.read");
  const { query, typed, errors } = await readParams(recordQuery, searchParams);
  const found = await load(searchRecord(context, query));
  const newest = found.items[0];
  const pager = pageLinks(found, { path: "/record", query: typed, what: "acts" });
  return (
    <Sheet>
      <SheetHead
        title="Record"
        subtitle="Every act at this desk: who, when, on what and why. Nothing in it can be altered here."
      />
      <RecordFilter typed={typed} errors={errors} />
      <SheetSection title="Acts" note="Newest first">
        <RecordList
          events={found.items}
          caption="Acts, newest first"
          empty="No act answers to this search. Take a word out, or widen the dates."
        />
        <Pager label="Acts" {...pager} />
      </SheetSection>
      <SheetSection title="Chain">
        <p>Each act carries the hash of the one before it. Verifying computes all of them again.</p>
        <VerifyChain />
      </SheetSection>
      <TitleBlock
        title="Record of acts"
        documentType="Record"
        identificationNumber={newest ? `to no. ${newest.seq}` : "–"}
        revision="–"
        sheet={`${query.page} of ${Math.max(1, Math.ceil(found.total / found.pageSize))}`}
        dateOfIssue={<DateTime value={context.now.toISOString()} dateOnly />}
        creator={context.actor.name}
        status="append-only"
        approvedBy="–"
      />
    </Sheet>
  );
}
