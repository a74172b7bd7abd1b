import type { Metadata } from "next";
import { z } from "zod";
import { FloorMap } from "@/components/floor/floor-map";
import { FloorFilter } from "@/components/machines/floor-filter";
import { floorHeading, floorSubtitle } from "@/components/machines/floor-words";
import { ButtonLink } from "@/components/ui/button";
import { DateTime } from "@/components/ui/date-time";
import { Empty } from "@/components/ui/empty";
import { pageLinks } from "@/components/ui/page-links";
import { Pager } from "@/components/ui/pager";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { daySchema, endOfDay } from "@/lib/http/day-query";
import { load, pageActor } from "@/lib/http/page-actor";
import { readParams, type SearchParams } from "@/lib/http/search-params";
import { may } from "@/lib/policies/decide";
import { fleetFilter } from "@/lib/schemas/machines-read";
import { showFloor } from "@/lib/services/floor/show";

export const metadata: Metadata = { title: "Floor" };

const query = z.object({
  ...fleetFilter.shape,
  on: daySchema.optional(),
  page: z.coerce.number().int().min(1).max(100_000).default(1),
});

export default async function FloorPage({ searchParams }: { readonly searchParams: SearchParams }) {
  const context = await pageActor("floor.read");
  const { query: asked, typed, errors } = await readParams(query, searchParams);
  const { on, ...filter } = asked;
  const asOf = endOfDay(on, context.now);
  const floor = await load(
    showFloor(context, { ...filter, asOf, ...(asOf === undefined ? {} : { level: undefined }) }),
  );
  const { columns, rows, counts, total } = floor;
  const pager = pageLinks(floor, { path: "/floor", query: typed, what: "machines" });
  const filtered = Object.keys(typed).some((name) => name !== "page");
  return (
    <Sheet>
      <SheetHead
        title={floorHeading(counts)}
        subtitle={floorSubtitle(counts, rows, context.now)}
        acts={
          <>
            <ButtonLink href="/rehearsals">Rehearsals</ButtonLink>
            {may(context.actor, "readings.create") && (
              <ButtonLink variant="primary" href="/readings/new">
                Add a reading
              </ButtonLink>
            )}
          </>
        }
      />
      <FloorFilter floor={floor} typed={typed} errors={errors} />
      <p className="quiet">
        As of <DateTime value={floor.asOf} />, by consequence
      </p>
      {rows.length > 0 ? (
        <FloorMap columns={columns} rows={rows} />
      ) : (
        <EmptyFloor filtered={filtered} mayAdd={may(context.actor, "machines.write")} />
      )}
      {total > rows.length && <Pager label="Machines" {...pager} />}
    </Sheet>
  );
}

function EmptyFloor({ filtered, mayAdd }: { readonly filtered: boolean; readonly mayAdd: boolean }) {
  if (filtered)
    return (
      <Empty act={<ButtonLink href="/floor">Show all machines</ButtonLink>}>
        No machine answers to this filter.
      </Empty>
    );
  return (
    <Empty
      act={
        mayAdd && (
          <ButtonLink variant="primary" href="/machines/new">
            Add a machine
          </ButtonLink>
        )
      }
    >
      Here stands every machine against what it is required to run.
    </Empty>
  );
}
