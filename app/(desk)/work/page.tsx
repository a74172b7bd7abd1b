import type { Metadata } from "next";
import { z } from "zod";
import { StepsTable } from "@/components/implementation/steps-table";
import { SheetsTable } from "@/components/test-sheet/sheets-table";
import { Button, ButtonLink } from "@/components/ui/button";
import { Empty } from "@/components/ui/empty";
import { SelectField, TextField } from "@/components/ui/field";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { load, pageActor } from "@/lib/http/page-actor";
import { readParams, type SearchParams } from "@/lib/http/search-params";
import { listSteps } from "@/lib/services/implementation/steps";
import { listSites } from "@/lib/services/sites/list";
import { listSheets } from "@/lib/services/test-sheets/list";
import { may } from "@/lib/policies/decide";

export const metadata: Metadata = { title: "Work" };

/** The newest of those that are open; the page of test sheets has them all. */
const SHEETS_SHOWN = 8;

const query = z.object({ siteId: z.uuid().optional(), q: z.string().trim().max(80).optional() });

export default async function WorkPage({ searchParams }: { readonly searchParams: SearchParams }) {
  const context = await pageActor("changes.read");
  const { query: asked, typed, errors } = await readParams(query, searchParams);
  const steps = await load(listSteps(context, asked));
  const { items: sites } = await load(listSites(context, { retired: "no" }));
  const sheets = await load(
    listSheets(context, {
      state: "open",
      page: 1,
      pageSize: SHEETS_SHOWN,
      ...(asked.q ? { q: asked.q } : {}),
    }),
  );
  const filtered = Object.keys(typed).length > 0;
  return (
    <Sheet>
      <SheetHead
        title="Work"
        subtitle="Released changes that are not yet verified on their machine, the oldest release first."
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
          <SelectField label="Site" name="siteId" defaultValue={typed.siteId ?? ""} error={errors.siteId}>
            <option value="">all sites</option>
            {sites.map(({ id, name }) => (
              <option key={id} value={id}>
                {name}
              </option>
            ))}
          </SelectField>
          <div className="acts items-end pb-4">
            <Button type="submit">Show these</Button>
          </div>
        </form>
      </search>
      {steps.length > 0 ? (
        <StepsTable steps={steps} />
      ) : (
        <Empty
          act={
            filtered ? (
              <ButtonLink href="/work">Show all steps</ButtonLink>
            ) : (
              <ButtonLink href="/readings/new">Add a reading</ButtonLink>
            )
          }
        >
          {filtered
            ? "No step answers to this filter."
            : "Nothing waits. When a change is released to machines, each machine stands here until it is verified."}
        </Empty>
      )}
      <SheetSection
        title="Open test sheets"
        note={sheets.total > SHEETS_SHOWN ? `the newest ${SHEETS_SHOWN} of ${sheets.total}` : undefined}
        acts={
          <>
            {may(context.actor, "test_sheets.write") && (
              <ButtonLink href="/test-sheets/new">Start a test sheet</ButtonLink>
            )}
            <ButtonLink variant="quiet" href="/test-sheets">
              All test sheets
            </ButtonLink>
          </>
        }
      >
        {sheets.items.length > 0 ? (
          <SheetsTable sheets={sheets.items} />
        ) : (
          <p className="quiet">No test sheet is open.</p>
        )}
      </SheetSection>
    </Sheet>
  );
}
