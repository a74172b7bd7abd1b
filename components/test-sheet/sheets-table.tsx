import Link from "next/link";
import { plural } from "@/lib/domain/sentences";
import type { SheetRow } from "@/lib/schemas/test-sheets";
import { axisWord } from "@/lib/review/axis-word";
import { DateTime } from "@/components/ui/date-time";
import { Head, Table } from "@/components/ui/table";

export const SHEET_STATE_WORDS: Readonly<Record<SheetRow["state"], string>> = {
  open: "open",
  finished: "finished",
  broken_off: "broken off",
};

/** Test sheets with their machine and how far they have come. */
export function SheetsTable({ sheets }: { readonly sheets: readonly SheetRow[] }) {
  return (
    <Table caption="Test sheets" captionHidden>
      <thead>
        <tr>
          <Head>Sheet</Head>
          <Head>Machine</Head>
          <Head>Change</Head>
          <Head>Entries</Head>
          <Head>Started</Head>
        </tr>
      </thead>
      <tbody>
        {sheets.map(({ id, label, title, machine, siteName, axis, change, entries, state, ...sheet }) => (
          <tr key={id}>
            <th scope="row">
              <Link href={`/test-sheets/${id}`}>
                {label} {title}
              </Link>
              <span className="block quiet">{SHEET_STATE_WORDS[state]}</span>
            </th>
            <td>
              <Link href={`/machines/${machine.id}`}>{machine.serial}</Link>, {axisWord(axis)} axis
              <span className="block quiet">{siteName}</span>
            </td>
            <td>{change ? <Link href={`/changes/${change.id}`}>{change.label}</Link> : "–"}</td>
            <td>{plural(entries, "entry", "entries")}</td>
            <td>
              <DateTime value={sheet.createdAt} dateOnly /> {sheet.actorName}
            </td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
