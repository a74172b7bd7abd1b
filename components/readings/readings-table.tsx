import Link from "next/link";
import { LAYER_WORDS, READING_KIND_WORDS } from "@/lib/domain/readings";
import type { ReadingRow } from "@/lib/schemas/readings";
import { DateTime } from "@/components/ui/date-time";
import { LevelMark } from "@/components/ui/level-mark";
import { Head, Table } from "@/components/ui/table";

export interface ReadingsTableProps {
  readonly readings: readonly ReadingRow[];
  /** Left out on a machine's own sheet. */
  readonly withMachine?: boolean | undefined;
}

/** Readings in the order given: when, what was read, by whom, and the gravest finding of each. */
export function ReadingsTable({ readings, withMachine = false }: ReadingsTableProps) {
  return (
    <Table caption="Readings" captionHidden>
      <thead>
        <tr>
          <Head>Read</Head>
          {withMachine && <Head>Machine</Head>}
          {withMachine && <Head>Model, site</Head>}
          <Head>Kind</Head>
          <Head>Layer</Head>
          <Head>Files</Head>
          <Head>Firmware</Head>
          <Head>By</Head>
          <Head>When kept</Head>
        </tr>
      </thead>
      <tbody>
        {readings.map((reading) => (
          <Row key={reading.id} reading={reading} withMachine={withMachine} />
        ))}
      </tbody>
    </Table>
  );
}

function Row({ reading, withMachine }: { readonly reading: ReadingRow; readonly withMachine: boolean }) {
  const { id, machine, model, site, kind, layer, files, firmwareVersion, actorName, level, note } = reading;
  return (
    <tr>
      <th scope="row">
        <Link href={`/readings/${id}`}>
          <DateTime value={reading.readAt} />
        </Link>
      </th>
      {withMachine && (
        <td>
          <Link href={`/machines/${machine.id}`}>{machine.serial}</Link>
        </td>
      )}
      {withMachine && (
        <td>
          {model.name}, {site.name}
        </td>
      )}
      <td>{READING_KIND_WORDS[kind]}</td>
      <td>{LAYER_WORDS[layer]}</td>
      <td className="code">{files.join(", ")}</td>
      <td>{firmwareVersion ?? <span className="quiet">not said</span>}</td>
      <td>
        {actorName}
        {note !== "" && <p className="row-note">{note}</p>}
      </td>
      <td>{level && <LevelMark level={level} />}</td>
    </tr>
  );
}
