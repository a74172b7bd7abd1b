import type { Metadata } from "next";
import Link from "next/link";
import { Button } from "@/components/ui/button";
import { Empty } from "@/components/ui/empty";
import { TextField } from "@/components/ui/field";
import { Sheet, SheetHead, SheetSection } from "@/components/ui/sheet";
import { load, pageActor } from "@/lib/http/page-actor";
import { readParams, type SearchParams } from "@/lib/http/search-params";
import { searchQuery, type SearchGroup } from "@/lib/schemas/search";
import { search } from "@/lib/services/search/find";

export const metadata: Metadata = { title: "Find" };

export default async function SearchPage({ searchParams }: { readonly searchParams: SearchParams }) {
  const context = await pageActor("search.read");
  const { query } = await readParams(searchQuery, searchParams);
  const { groups, q } = await load(search(context, query));
  return (
    <Sheet>
      <SheetHead
        title="Find"
        subtitle="Machines, changes, hardware, models, sites, and what can be done where."
      />
      <form method="get" role="search" aria-label="Find">
        <TextField label="Words" name="q" type="search" defaultValue={q} />
        <div className="acts">
          <Button type="submit" variant="primary">
            Find
          </Button>
        </div>
      </form>
      {groups.map((group) => (
        <Group key={group.title} group={group} />
      ))}
      {q !== "" && groups.length === 0 && (
        <Empty
          act={<Link href={`/record?${new URLSearchParams({ q }).toString()}`}>Look in the record</Link>}
        >
          Nothing answers to “{q}”. Try a part of a serial number, the number of a change such as CR-0042, or
          a single word.
        </Empty>
      )}
    </Sheet>
  );
}

function Group({ group }: { readonly group: SearchGroup }) {
  return (
    <SheetSection
      title={group.title}
      {...(group.more ? { note: "There are more; add a word to narrow it down." } : {})}
    >
      <ul className="grid gap-2">
        {group.hits.map(({ href, title, note }) => (
          <li key={href}>
            <Link href={href}>{title}</Link> <span className="quiet">{note}</span>
          </li>
        ))}
      </ul>
    </SheetSection>
  );
}
