import Link from "next/link";
import type { RehearsalRow } from "@/lib/schemas/rehearsals";
import { DateTime } from "@/components/ui/date-time";
import { Head, NumberCell, Table } from "@/components/ui/table";

/** Rehearsals with what they came to. */
export function RehearsalsTable({ rehearsals }: { readonly rehearsals: readonly RehearsalRow[] }) {
  return (
    <Table caption="Rehearsals, the newest first" captionHidden>
      <thead>
        <tr>
          <Head>What was asked</Head>
          <Head number>Newly over limit</Head>
          <Head number>Machines</Head>
          <Head>Started</Head>
          <Head>By</Head>
        </tr>
      </thead>
      <tbody>
        {rehearsals.map(({ id, title, state, machines, rehearsed, newlyOver, startedAt, startedByName }) => (
          <tr key={id}>
            <th scope="row">
              <Link href={`/rehearsals/${id}`}>{title}</Link>
            </th>
            <NumberCell>{newlyOver}</NumberCell>
            <NumberCell>{state === "done" ? machines : `${rehearsed} of ${machines} so far`}</NumberCell>
            <td>
              <DateTime value={startedAt} />
            </td>
            <td>{startedByName}</td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
