"use client";

import Link from "next/link";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { sentenceOf } from "@/components/api";
import { fieldWords } from "@/components/catalog/item-changes";
import { useSave } from "@/components/catalog/use-save";
import { axisTitle } from "@/components/findings/axis-title";
import { Button } from "@/components/ui/button";
import { DateTime } from "@/components/ui/date-time";
import { Empty } from "@/components/ui/empty";
import { Notice } from "@/components/ui/notice";
import { Head, Table } from "@/components/ui/table";
import { catalogKindSchema } from "@/lib/domain/catalog";
import { kindSlug } from "@/lib/schemas/catalog";
import { factSchema, isMachinePart } from "@/lib/schemas/fact-form";
import { formFields } from "@/lib/schemas/form-fields";
import type { HardwareFactView } from "@/lib/schemas/machines-write";
import { partWords } from "./part-words";

export interface FactsTableProps {
  readonly machineId: string;
  readonly facts: readonly HardwareFactView[];
}

function whereWords({ axis, part }: HardwareFactView): string {
  if (axis !== null) return axisTitle(axis);
  return isMachinePart(part) ? "Machine" : "Every axis";
}

function What({ part, item, data }: HardwareFactView) {
  const kind = catalogKindSchema.safeParse(part).data;
  const values = formFields(factSchema(part)).filter(({ path }) => data[path] !== undefined);
  return (
    <ul>
      {item && kind && (
        <li>
          <Link href={`/catalog/${kindSlug(kind)}/${item.id}`}>
            {item.code} {item.name}
          </Link>
        </li>
      )}
      {values.map((field) => (
        <li key={field.path}>
          {field.label}: {fieldWords(field, data[field.path])}
        </li>
      ))}
    </ul>
  );
}

/** The hardware recorded on a machine with its evidence; one that is taken back can be recorded again. */
export function FactsTable({ machineId, facts }: FactsTableProps) {
  const router = useRouter();
  const [gone, setGone] = useState<HardwareFactView | null>(null);
  const path = `/machines/${machineId}/hardware`;
  const remove = useSave<unknown>({ onSaved: () => router.refresh() });
  const restore = useSave<unknown>({
    onSaved: () => {
      setGone(null);
      router.refresh();
    },
  });
  const takeBack = (fact: HardwareFactView): void =>
    remove.mutate({ method: "DELETE", path: `${path}/${fact.id}` }, { onSuccess: () => setGone(fact) });
  const recordAgain = ({ axis, part, item, data, evidence }: HardwareFactView): void =>
    restore.mutate({ method: "POST", path, body: { axis, part, itemId: item?.id ?? null, data, evidence } });
  const trouble = remove.error ?? restore.error;
  const standing = facts.filter(({ endedAt }) => endedAt === null);
  const ended = facts.filter(({ endedAt }) => endedAt !== null);
  return (
    <>
      {trouble && (
        <Notice live="alert">
          <p>{sentenceOf(trouble)}</p>
        </Notice>
      )}
      {gone && (
        <Notice
          live="status"
          acts={
            <Button busy={restore.isPending} onClick={() => recordAgain(gone)}>
              Record it again
            </Button>
          }
        >
          <p>The {partWords(gone.part)} counts as the model has it again. The machine is being checked.</p>
        </Notice>
      )}
      {standing.length === 0 ? (
        <Empty>Nothing is recorded: the machine counts as built like its model.</Empty>
      ) : (
        <FactRows
          caption="Hardware that differs from the model"
          facts={standing}
          busy={remove.isPending}
          onTakeBack={takeBack}
        />
      )}
      {ended.length > 0 && (
        <details>
          <summary>What stood before ({ended.length})</summary>
          <FactRows caption="Hardware recorded before" facts={ended} busy={false} onTakeBack={null} />
        </details>
      )}
    </>
  );
}

interface FactRowsProps {
  readonly caption: string;
  readonly facts: readonly HardwareFactView[];
  readonly busy: boolean;
  readonly onTakeBack: ((fact: HardwareFactView) => void) | null;
}

function FactRows({ caption, facts, busy, onTakeBack }: FactRowsProps) {
  return (
    <Table caption={caption} captionHidden>
      <thead>
        <tr>
          <Head>Where</Head>
          <Head>Part</Head>
          <Head>What</Head>
          <Head>Evidence</Head>
          <Head>Recorded</Head>
          {onTakeBack ? <td /> : <Head>Until</Head>}
        </tr>
      </thead>
      <tbody>
        {facts.map((fact) => (
          <tr key={fact.id}>
            <th scope="row">{whereWords(fact)}</th>
            <td>{partWords(fact.part)}</td>
            <td>
              <What {...fact} />
            </td>
            <td>{fact.evidence}</td>
            <td>
              <DateTime value={fact.recordedAt} /> {fact.recordedByName}
            </td>
            <td>
              {fact.endedAt && <DateTime value={fact.endedAt} />}
              {onTakeBack && (
                <Button
                  variant="quiet"
                  busy={busy}
                  onClick={() => onTakeBack(fact)}
                  aria-label={`Take back the ${partWords(fact.part)} of ${whereWords(fact).toLowerCase()}`}
                >
                  take back
                </Button>
              )}
            </td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
