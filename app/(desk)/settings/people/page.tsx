import type { Metadata } from "next";
import Link from "next/link";
import { Button, ButtonLink } from "@/components/ui/button";
import { DateTime } from "@/components/ui/date-time";
import { Empty } from "@/components/ui/empty";
import { TextField } from "@/components/ui/field";
import { pageLinks } from "@/components/ui/page-links";
import { Pager } from "@/components/ui/pager";
import { NoValue } from "@/components/ui/quantity";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { load, pageActor } from "@/lib/http/page-actor";
import { readParams, type SearchParams } from "@/lib/http/search-params";
import { may } from "@/lib/policies/decide";
import { userQuery, type UserView } from "@/lib/schemas/people";
import { listSites } from "@/lib/services/sites/list";
import { listUsers } from "@/lib/services/users/list";

export const metadata: Metadata = { title: "People" };

export default async function PeoplePage({ searchParams }: { readonly searchParams: SearchParams }) {
  const context = await pageActor("users.read");
  const { query, typed } = await readParams(userQuery, searchParams);
  const [people, sites] = await load(
    Promise.all([listUsers(context, query), listSites(context, { retired: "all" })]),
  );
  const siteNames = new Map(sites.items.map(({ id, name }) => [id, name]));
  return (
    <Sheet>
      <SheetHead
        kicker={<Link href="/settings">Settings</Link>}
        title="People"
        subtitle="Who may sign in, with which role."
        acts={
          may(context.actor, "users.write") && (
            <ButtonLink variant="primary" href="/settings/people/new">
              Add a person
            </ButtonLink>
          )
        }
      />
      <form method="get" role="search" aria-label="Find people">
        <TextField label="Name or e-mail address" name="q" type="search" defaultValue={typed.q ?? ""} />
        <div className="acts">
          <Button type="submit">Find</Button>
        </div>
      </form>
      {people.items.length === 0 ? (
        <Empty act={<Link href="/settings/people">Show everybody</Link>}>
          Nobody answers to this search.
        </Empty>
      ) : (
        <PeopleTable people={people.items} siteNames={siteNames} />
      )}
      <Pager
        label="People"
        {...pageLinks(people, { path: "/settings/people", query: typed, what: "people" })}
      />
    </Sheet>
  );
}

interface PeopleTableProps {
  readonly people: readonly UserView[];
  readonly siteNames: ReadonlyMap<string, string>;
}

function PeopleTable({ people, siteNames }: PeopleTableProps) {
  return (
    <Table caption="People" captionHidden>
      <thead>
        <tr>
          <Head>Name</Head>
          <Head>Role</Head>
          <Head>Site</Head>
          <Head>State</Head>
          <Head number>Open sessions</Head>
          <Head>Last signed in</Head>
        </tr>
      </thead>
      <tbody>
        {people.map((person) => (
          <tr key={person.id}>
            <td>
              <Link href={`/settings/people/${person.id}`}>{person.name}</Link>
              <p className="row-note">{person.email}</p>
            </td>
            <td>{person.role}</td>
            <td>{person.siteId === null ? "every site" : (siteNames.get(person.siteId) ?? <NoValue />)}</td>
            <td>{person.active ? "active" : "deactivated"}</td>
            <NumberCell>{person.openSessions}</NumberCell>
            <td>{person.lastSignInAt === null ? "never" : <DateTime value={person.lastSignInAt} />}</td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
