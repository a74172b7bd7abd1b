import Link from "next/link";
import { CHANGE_STATE_WORDS } from "@/lib/domain/change-states";
import type { ChangeRow } from "@/lib/schemas/changes";
import { DateTime } from "@/components/ui/date-time";
import { LevelMark } from "@/components/ui/level-mark";
import { Head, Table } from "@/components/ui/table";

/** Change requests as a list. */
export function ChangesTable({ changes }: { readonly changes: readonly ChangeRow[] }) {
  return (
    <Table caption="Changes" captionHidden>
      <thead>
        <tr>
          <Head>Number</Head>
          <Head>Title</Head>
          <Head>Of</Head>
          <Head>State</Head>
          <Head>Findings</Head>
          <Head>Author</Head>
          <Head>Last moved</Head>
        </tr>
      </thead>
      <tbody>
        {changes.map((change) => (
          <Row key={change.id} change={change} />
        ))}
      </tbody>
    </Table>
  );
}

function Row({ change }: { readonly change: ChangeRow }) {
  const { id, label, title, model, machine, state, stale, level, authorName, updatedAt } = change;
  return (
    <tr>
      <td>
        <Link href={`/changes/${id}`}>{label}</Link>
      </td>
      <th scope="row">{title}</th>
      <td>{machine ? `permitted deviation of ${machine.serial}` : `baseline of ${model.name}`}</td>
      <td>
        {CHANGE_STATE_WORDS[state]}
        {stale && <span className="block quiet">its base has moved</span>}
      </td>
      <td>
        <LevelMark level={level} />
      </td>
      <td>{authorName}</td>
      <td>
        <DateTime value={updatedAt} />
      </td>
    </tr>
  );
}
