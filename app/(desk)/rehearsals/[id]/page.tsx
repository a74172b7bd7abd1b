import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { MachinesBySite } from "@/components/rehearsals/machines-by-site";
import { RehearsalProgress } from "@/components/rehearsals/rehearsal-progress";
import { DateTime } from "@/components/ui/date-time";
import { Empty } from "@/components/ui/empty";
import { Facts } from "@/components/ui/facts";
import { pageLinks } from "@/components/ui/page-links";
import { Pager } from "@/components/ui/pager";
import { Sheet, SheetHead } from "@/components/ui/sheet";
import { load, pageActor } from "@/lib/http/page-actor";
import { readParams, type SearchParams } from "@/lib/http/search-params";
import { idParams } from "@/lib/schemas/common";
import {
  rehearsalMachineQuery,
  type RehearsalMachineQuery,
  type RehearsalView,
} from "@/lib/schemas/rehearsals";
import { listRehearsalMachines } from "@/lib/services/rehearsals/list-machines";
import { showRehearsal } from "@/lib/services/rehearsals/show";

export const metadata: Metadata = { title: "Rehearsal" };

interface Props {
  readonly params: Promise<{ id: string }>;
  readonly searchParams: SearchParams;
}

export default async function RehearsalPage({ params, searchParams }: Props) {
  const context = await pageActor("rehearsals.read");
  const parsed = idParams.safeParse(await params);
  if (!parsed.success) notFound();
  const { query, typed } = await readParams(rehearsalMachineQuery, searchParams);
  const { id } = parsed.data;
  const [rehearsal, machines] = await load(
    Promise.all([showRehearsal(context, { id }), listRehearsalMachines(context, { id, ...query })]),
  );
  const path = `/rehearsals/${id}`;
  const pager = pageLinks(machines, { path, query: typed, what: "machines" });
  return (
    <Sheet>
      <SheetHead
        kicker={<Link href="/rehearsals">Rehearsals</Link>}
        title={rehearsal.title}
        subtitle="Each machine's required configuration on its own hardware of the moment when it was gone through. Checks are estimates from catalog data; the physical test and a competent person decide."
      />
      {rehearsal.state !== "done" && <RehearsalProgress rehearsal={rehearsal} />}
      <RehearsalFacts rehearsal={rehearsal} />
      <ShowChoice path={path} show={query.show} />
      {machines.items.length > 0 ? (
        <MachinesBySite machines={machines.items} />
      ) : (
        <Empty>{emptyWords(rehearsal, query.show)}</Empty>
      )}
      <Pager label="Machines" {...pager} />
    </Sheet>
  );
}

function RehearsalFacts({ rehearsal }: { readonly rehearsal: RehearsalView }) {
  const { machines, newlyOver, notConcerned, withoutAnswer, startedAt, endedAt, startedByName } = rehearsal;
  return (
    <Facts
      facts={[
        { label: "Newly over limit", value: `${newlyOver} of ${machines} machines` },
        ...(notConcerned > 0 ? [{ label: "Do not carry the part", value: `${notConcerned} machines` }] : []),
        ...(withoutAnswer > 0
          ? [{ label: "Nothing can be said of", value: `${withoutAnswer} machines` }]
          : []),
        { label: "Started", value: <DateTime value={startedAt} />, note: startedByName },
        { label: "Ended", value: endedAt === null ? "not yet" : <DateTime value={endedAt} /> },
        {
          label: "Rests on",
          value: `rules ${rehearsal.rulesVersion}, policy ${rehearsal.policyVersion === 0 ? "as delivered" : rehearsal.policyVersion}`,
        },
      ]}
    />
  );
}

const SHOWS: readonly { readonly show: RehearsalMachineQuery["show"]; readonly words: string }[] = [
  { show: "newly_over", words: "newly over limit" },
  { show: "all", words: "all, with the hottest room of each" },
];

function ShowChoice({ path, show }: { readonly path: string; readonly show: RehearsalMachineQuery["show"] }) {
  return (
    <ul aria-label="Machines shown" className="flex flex-wrap gap-x-4">
      {SHOWS.map((one) => (
        <li key={one.show}>
          {one.show === show ? (
            <strong aria-current="true">{one.words}</strong>
          ) : (
            <Link href={`${path}?show=${one.show}`}>{one.words}</Link>
          )}
        </li>
      ))}
    </ul>
  );
}

function emptyWords(
  { state, machines, notConcerned }: RehearsalView,
  show: RehearsalMachineQuery["show"],
): string {
  if (state !== "done") return "No machine so far.";
  if (notConcerned === machines) return "No machine carries the part that would be replaced.";
  return show === "newly_over" ? "No machine would be newly over limit." : "No machine is left to show.";
}
