"use client";

import { useQuery } from "@tanstack/react-query";
import Link from "next/link";
import { useState } from "react";
import type { ParameterName } from "@/lib/domain/parameters";
import { LAYER_WORDS, READING_KIND_WORDS } from "@/lib/domain/readings";
import { onAxis } from "@/lib/review/axis-word";
import type { History, HistoryEntry } from "@/lib/schemas/machines-read";
import { apiCall } from "@/components/api";
import { Refusal } from "@/components/forms/refusal";
import { Button } from "@/components/ui/button";
import { DateTime } from "@/components/ui/date-time";
import { Dialog } from "@/components/ui/dialog";
import { Loading } from "@/components/ui/loading";
import { NoValue, ParameterQuantity } from "@/components/ui/quantity";
import { Head, NumberCell, Table } from "@/components/ui/table";

export interface ParameterHistoryProps {
  readonly machineId: string;
  readonly axis: string | null;
  readonly parameter: ParameterName;
  readonly label: string;
}

/** Opens every value that a parameter of this machine had. */
export function ParameterHistory({ machineId, axis, parameter, label }: ParameterHistoryProps) {
  const [open, setOpen] = useState(false);
  const words = onAxis(axis, axis === null ? label : label.toLowerCase());
  return (
    <>
      <Button variant="quiet" onClick={() => setOpen(true)} aria-label={`History of ${words}`}>
        history
      </Button>
      <Dialog
        open={open}
        onClose={() => setOpen(false)}
        title={`History of ${words}`}
        acts={<Button onClick={() => setOpen(false)}>Close</Button>}
      >
        {open && <Entries machineId={machineId} axis={axis} parameter={parameter} />}
      </Dialog>
    </>
  );
}

function Entries({ machineId, axis, parameter }: Omit<ParameterHistoryProps, "label">) {
  const query = new URLSearchParams({ parameter, ...(axis === null ? {} : { axis }) });
  const history = useQuery({
    queryKey: ["history", machineId, axis, parameter],
    queryFn: ({ signal }) => apiCall<History>("GET", `/machines/${machineId}/history?${query}`, { signal }),
  });
  if (history.isPending) return <Loading>Looking through readings and baselines.</Loading>;
  if (!history.data) return <Refusal error={history.error} title="Not shown" />;
  const { entries, truncated } = history.data;
  if (entries.length === 0) return <p>It was neither read nor required yet.</p>;
  return (
    <>
      <Table caption="Values, newest first" captionHidden>
        <thead>
          <tr>
            <Head>When</Head>
            <Head number>Value</Head>
            <Head number>Change</Head>
            <Head>What</Head>
            <Head>By</Head>
          </tr>
        </thead>
        <tbody>
          {entries.map((entry, index) => (
            <Row
              key={`${entry.at} ${index}`}
              entry={entry}
              before={entries.slice(index + 1).find((older) => older.value !== null) ?? null}
              parameter={parameter}
            />
          ))}
        </tbody>
      </Table>
      {truncated && <p className="quiet">Older readings are in the list of readings.</p>}
    </>
  );
}

interface RowProps {
  readonly entry: HistoryEntry;
  /** The value before this one in time. */
  readonly before: HistoryEntry | null;
  readonly parameter: ParameterName;
}

function Row({ entry, before, parameter }: RowProps) {
  const { value, by, raw, line } = entry;
  return (
    <tr>
      <th scope="row">
        <DateTime value={entry.at} />
      </th>
      <NumberCell title={raw === null ? undefined : `as typed: ${raw}, line ${line}`}>
        {value === null ? <NoValue /> : <ParameterQuantity parameter={parameter} {...value} />}
      </NumberCell>
      <NumberCell>{changeWords(entry, before)}</NumberCell>
      <td>
        <What entry={entry} />
      </td>
      <td>{by}</td>
    </tr>
  );
}

/** "+12 %" against the value before; empty where they are the same or not of one unit and basis. */
function changeWords({ value }: HistoryEntry, before: HistoryEntry | null): string {
  const earlier = before?.value ?? null;
  if (!value || !earlier || earlier.value === 0) return "";
  if (value.unit !== earlier.unit || value.basis !== earlier.basis) return "";
  const share = (value.value - earlier.value) / Math.abs(earlier.value);
  if (Math.abs(share) < 1e-9) return "";
  const percent = Math.abs(share * 100);
  return `${share < 0 ? "\u2212" : "+"}${percent < 10 ? percent.toFixed(1) : percent.toFixed(0)}\u00a0%`;
}

function What({ entry }: { readonly entry: HistoryEntry }) {
  const { source, kind, layer, readingId, baseline, change, until } = entry;
  if (source === "reading")
    return (
      <Link href={`/readings/${readingId ?? ""}`}>
        read, {kind && READING_KIND_WORDS[kind]}, {layer && LAYER_WORDS[layer]}
      </Link>
    );
  const words = source === "baseline" ? `required, baseline ${baseline}` : "permitted deviation";
  return (
    <>
      {words}
      {change && (
        <>
          {" "}
          by <Link href={`/changes/${change.id}`}>{change.label}</Link>
        </>
      )}
      {until !== null && (
        <span className="quiet">
          {" "}
          until <DateTime value={until} dateOnly />
        </span>
      )}
    </>
  );
}
