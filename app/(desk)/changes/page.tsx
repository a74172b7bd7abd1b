import type { Metadata } from "next";
import { ChangesFilter } from "@/components/changes/changes-filter";
import { ChangesTable } from "@/components/changes/changes-table";
import { ButtonLink } from "@/components/ui/button";
import { Empty } from "@/components/ui/empty";
import { pageLinks } from "@/components/ui/page-links";
import { Pager } from "@/components/ui/pager";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { load, pageActor } from "@/lib/http/page-actor";
import { readParams, type SearchParams } from "@/lib/http/search-params";
import { may } from "@/lib/policies/decide";
import { changeListQuery } from "@/lib/schemas/changes";
import { listChanges } from "@/lib/services/changes/list";
import { listModels } from "@/lib/services/models/list";

export const metadata: Metadata = { title: "Changes" };

export default async function ChangesPage({ searchParams }: { readonly searchParams: SearchParams }) {
  const context = await pageActor("changes.read");
  const { query, typed, errors } = await readParams(changeListQuery, searchParams);
  const found = await load(listChanges(context, query));
  const models = await load(listModels(context, { page: 1, pageSize: 200, retired: "no" }));
  const pager = pageLinks(found, { path: "/changes", query: typed, what: "changes" });
  const filtered = Object.keys(typed).some((name) => name !== "page");
  const propose = may(context.actor, "changes.create") && (
    <ButtonLink variant="primary" href="/changes/new">
      Propose a change
    </ButtonLink>
  );
  return (
    <Sheet>
      <SheetHead
        title="Changes"
        subtitle="What was proposed, decided and put onto machines, what moved last first."
        acts={propose}
      />
      <ChangesFilter typed={typed} errors={errors} models={models.items} />
      {found.items.length > 0 ? (
        <ChangesTable changes={found.items} />
      ) : (
        <Empty act={filtered ? <ButtonLink href="/changes">Show all changes</ButtonLink> : propose}>
          {filtered
            ? "No change answers to this filter."
            : "Here stands every proposed change with its evaluation, its decision and the machines it went onto."}
        </Empty>
      )}
      <Pager label="Changes" {...pager} />
    </Sheet>
  );
}
