import Link from "next/link";
import { CHANGE_STATE_WORDS } from "@/lib/domain/change-states";
import type { OpenChange } from "@/lib/schemas/machines-read";
import { DateTime } from "@/components/ui/date-time";
import { Head, Table } from "@/components/ui/table";

/** Changes that are not at their end and take this machine in. */
export function OpenChanges({ changes }: { readonly changes: readonly OpenChange[] }) {
  return (
    <Table caption="Open changes" captionHidden>
      <thead>
        <tr>
          <Head>Change</Head>
          <Head>Title</Head>
          <Head>Class</Head>
          <Head>State</Head>
          <Head>Author</Head>
          <Head>Last moved</Head>
        </tr>
      </thead>
      <tbody>
        {changes.map((change) => (
          <tr key={change.id}>
            <th scope="row">
              <Link href={`/changes/${change.id}`}>{change.label}</Link>
            </th>
            <td>{change.title}</td>
            <td>{change.class}</td>
            <td>{CHANGE_STATE_WORDS[change.state]}</td>
            <td>{change.authorName}</td>
            <td>
              <DateTime value={change.updatedAt} />
            </td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
