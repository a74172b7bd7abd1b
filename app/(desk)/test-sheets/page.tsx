import type { Metadata } from "next";
import { SheetsTable } from "@/components/test-sheet/sheets-table";
import { Button, ButtonLink } from "@/components/ui/button";
import { Empty } from "@/components/ui/empty";
import { SelectField, TextField } from "@/components/ui/field";
import { pageLinks } from "@/components/ui/page-links";
import { Pager } from "@/components/ui/pager";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { load, pageActor } from "@/lib/http/page-actor";
import { readParams, type SearchParams } from "@/lib/http/search-params";
import { may } from "@/lib/policies/decide";
import { sheetQuery } from "@/lib/schemas/test-sheets";
import { listSheets } from "@/lib/services/test-sheets/list";

export const metadata: Metadata = { title: "Test sheets" };

export default async function TestSheetsPage({ searchParams }: { readonly searchParams: SearchParams }) {
  const context = await pageActor("test_sheets.read");
  const { query, typed, errors } = await readParams(sheetQuery, searchParams);
  const found = await load(listSheets(context, query));
  const pager = pageLinks(found, { path: "/test-sheets", query: typed, what: "test sheets" });
  const start = may(context.actor, "test_sheets.write") && (
    <ButtonLink variant="primary" href="/test-sheets/new">
      Start a test sheet
    </ButtonLink>
  );
  return (
    <Sheet>
      <SheetHead
        title="Test sheets"
        subtitle="Tests on machines that settle what the physics cannot, the newest first."
        acts={start}
      />
      <search>
        <form method="get" className="field-columns">
          <TextField
            label="Part of a serial number"
            name="q"
            type="search"
            maxLength={80}
            defaultValue={typed.q ?? ""}
            error={errors.q}
          />
          <SelectField label="State" name="state" defaultValue={query.state} error={errors.state}>
            <option value="open">open</option>
            <option value="closed">closed</option>
            <option value="all">all</option>
          </SelectField>
          <div className="acts items-end pb-4">
            <Button type="submit">Show these</Button>
          </div>
        </form>
      </search>
      {found.items.length > 0 ? (
        <SheetsTable sheets={found.items} />
      ) : (
        <Empty act={start}>
          {query.state === "open" ? "No test sheet is open." : "No test sheet answers to this filter."} A
          ladder finds the level at which an axis loses steps; a run of moves shows how sure a setting is; a
          heat record holds measured temperatures against the predicted ones.
        </Empty>
      )}
      <Pager label="Test sheets" {...pager} />
    </Sheet>
  );
}
