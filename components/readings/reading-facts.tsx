import Link from "next/link";
import type { ReactNode } from "react";
import { READING_KIND_WORDS, type ReadingKind } from "@/lib/domain/readings";
import type { Level } from "@/lib/domain/levels";
import type { ReadingStanding } from "@/lib/schemas/readings";
import { DateTime } from "@/components/ui/date-time";
import { Facts, type Fact } from "@/components/ui/facts";
import { fileSize } from "@/components/ui/file-size";
import { LevelMark } from "@/components/ui/level-mark";

interface FactsOfReading {
  readonly kind: ReadingKind;
  readonly receivedAt: string;
  readonly firmwareVersion: string | null;
  readonly serial: string | null;
  readonly note: string;
  readonly standing: ReadingStanding;
  readonly whenKept: {
    readonly level: Level;
    readonly rules: string;
    readonly policy: string;
    readonly at: string;
  } | null;
  readonly versions: { readonly rules: string; readonly policy: string; readonly keyTable: number };
  readonly files: readonly {
    readonly path: string;
    readonly encoding: string;
    readonly bom: boolean;
    readonly size: number;
    readonly sha256: string;
  }[];
}

const ENDED: Record<Extract<ReadingStanding, { state: "ended" }>["because"], string> = {
  newer: "a newer reading of its layer took its place",
  as_left: "work on the machine was read as left after it",
  firmware: "the machine runs another firmware version since",
};

function standingWords(standing: ReadingStanding): ReactNode {
  if (standing.state === "counts") return "It counts.";
  if (standing.state === "past") return "It no longer counts; many readings came after it.";
  return (
    <>
      It no longer counts: <Link href={`/readings/${standing.byReadingId}`}>{ENDED[standing.because]}</Link>.
    </>
  );
}

function factsOf(reading: FactsOfReading): Fact[] {
  const { whenKept, versions, files } = reading;
  const notSaid = <span className="quiet">not said</span>;
  return [
    { label: "Kind", value: READING_KIND_WORDS[reading.kind] },
    { label: "Does it count?", value: standingWords(reading.standing) },
    { label: "Received", value: <DateTime value={reading.receivedAt} /> },
    { label: "Firmware version", value: reading.firmwareVersion ?? notSaid },
    { label: "Serial number read", value: reading.serial ?? notSaid },
    ...(reading.note === "" ? [] : [{ label: "Note", value: reading.note }]),
    {
      label: "Checked now",
      value: `rules ${versions.rules}, policy ${versions.policy}`,
      note:
        versions.keyTable === 0
          ? "The model has no key table yet."
          : `Key table, version ${versions.keyTable}`,
    },
    ...(whenKept
      ? [
          {
            label: "When it was kept",
            value: <LevelMark level={whenKept.level} />,
            note: `rules ${whenKept.rules}, policy ${whenKept.policy}`,
          },
        ]
      : []),
    ...files.map(({ path, encoding, bom, size, sha256 }) => ({
      label: path,
      value: `${fileSize(size)}, ${encoding === "utf-8" ? "UTF-8" : "Latin-1"}${bom ? " with byte order mark" : ""}`,
      note: <span className="code" title={sha256}>{`SHA-256 ${sha256.slice(0, 16)}…`}</span>,
    })),
  ];
}

/** What is known of a reading beside its text. */
export function ReadingFacts({ reading }: { readonly reading: FactsOfReading }) {
  return <Facts facts={factsOf(reading)} />;
}
