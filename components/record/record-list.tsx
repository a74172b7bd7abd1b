import Link from "next/link";
import { DateTime } from "@/components/ui/date-time";
import { Empty } from "@/components/ui/empty";
import { Head, NumberCell, Table } from "@/components/ui/table";
import type { RecordEventView } from "@/lib/schemas/record";
import { actWords, objectHref } from "./act-words";

export interface RecordListProps {
  readonly events: readonly RecordEventView[];
  /** Said where nothing is recorded yet. */
  readonly empty?: string;
  readonly caption?: string;
}

/** The record of one object, or of a search: who did what, when, on what and why. */
export function RecordList({
  events,
  empty = "Nothing is recorded here yet. Every act on it will be.",
  caption = "Record",
}: RecordListProps) {
  if (events.length === 0) return <Empty>{empty}</Empty>;
  return (
    <Table caption={caption} captionHidden className="record">
      <thead>
        <tr>
          <Head number>No.</Head>
          <Head>When</Head>
          <Head>Who</Head>
          <Head>Act</Head>
          <Head>On what</Head>
        </tr>
      </thead>
      <tbody>
        {events.map((event) => (
          <RecordRow key={event.seq} event={event} />
        ))}
      </tbody>
    </Table>
  );
}

const ACTOR_NOTES: Record<RecordEventView["actorKind"], string> = {
  person: "",
  token: ", a token",
  system: "",
};

function RecordRow({ event }: { readonly event: RecordEventView }) {
  const href = objectHref(event);
  return (
    <tr>
      <NumberCell>{event.seq}</NumberCell>
      <td>
        <DateTime value={event.at} />
      </td>
      <td>
        {event.actorName}
        <span className="quiet">{ACTOR_NOTES[event.actorKind]}</span>
      </td>
      <td>
        {actWords(event.action)}
        {event.reason && <p className="row-note">{event.reason}</p>}
        <Difference event={event} />
      </td>
      <td>{href === null ? event.objectLabel : <Link href={href}>{event.objectLabel}</Link>}</td>
    </tr>
  );
}

/** What the act changed, and the hash that binds it to the act before it. */
function Difference({ event }: { readonly event: RecordEventView }) {
  const { before, after, hash } = event;
  return (
    <details>
      <summary className="quiet">In full</summary>
      {before !== null && <Data title="Before" data={before} />}
      {after !== null && <Data title="After" data={after} />}
      <p className="row-note">
        Hash <code className="code break-all">{hash}</code>
      </p>
    </details>
  );
}

function Data({ title, data }: { readonly title: string; readonly data: unknown }) {
  return (
    <>
      <p className="row-note">{title}</p>
      <pre className="code whitespace-pre-wrap break-words">{JSON.stringify(data, null, 1)}</pre>
    </>
  );
}
