"use client";

import { useMutation } from "@tanstack/react-query";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { parameterDefinition } from "@/lib/domain/parameters";
import type { Suggestion, UnmappedKey } from "@/lib/keytable/types";
import { onAxis } from "@/lib/review/axis-word";
import { apiCall } from "@/components/api";
import { Refusal } from "@/components/forms/refusal";
import { lineHref, type LineAnchors } from "@/components/revision/line-anchor";
import { Button } from "@/components/ui/button";
import { Head, NumberCell, Table } from "@/components/ui/table";

/** A text of another kind can have thousands; the key table's own page has room for them all. */
const SHOWN = 60;

export interface UnmappedKeysProps {
  readonly unmapped: readonly UnmappedKey[];
  readonly anchors: LineAnchors;
  readonly modelId: string | null;
  readonly mayAccept: boolean;
  /** After a suggestion was accepted; left out: the page is loaded again. */
  readonly onAccepted?: (() => void) | undefined;
}

function ruleOf({ key }: UnmappedKey, { parameter, axis, unit, basis }: Suggestion) {
  return {
    key,
    parameter,
    ...(axis === null ? {} : { axis }),
    ...(unit === null ? {} : { unit }),
    ...(basis === null ? {} : { basis }),
  };
}

function suggestionWords({ axis, parameter, unit, basis }: Suggestion): string {
  const label = onAxis(axis, parameterDefinition(parameter).label.toLowerCase());
  const more = [unit, basis].filter(Boolean).join(" ");
  return more === "" ? label : `${label}, ${more}`;
}

/** Keys that the key table does not know, with what they may be; an engineer accepts a suggestion with one press. */
export function UnmappedKeys({ unmapped, anchors, modelId, mayAccept, onAccepted }: UnmappedKeysProps) {
  const router = useRouter();
  const accept = useMutation({
    mutationFn: (rule: ReturnType<typeof ruleOf>) =>
      apiCall("POST", `/key-tables/${modelId ?? ""}/accept`, { body: { rule } }),
    onSuccess: () => (onAccepted ? onAccepted() : router.refresh()),
  });
  const onAccept =
    mayAccept && modelId !== null
      ? (row: UnmappedKey, suggestion: Suggestion) => accept.mutate(ruleOf(row, suggestion))
      : null;
  return (
    <>
      <Refusal error={accept.error} />
      <Table caption="Keys that the key table does not know" captionHidden>
        <thead>
          <tr>
            <Head number>Line</Head>
            <Head>Key</Head>
            <Head>Value</Head>
            <Head>It may be</Head>
          </tr>
        </thead>
        <tbody>
          {unmapped.slice(0, SHOWN).map((row) => (
            <Row
              key={`${row.path} ${row.line} ${row.key}`}
              {...{ row, anchors, onAccept }}
              busy={accept.isPending}
            />
          ))}
        </tbody>
      </Table>
      {unmapped.length > SHOWN && <p className="quiet">{unmapped.length - SHOWN} more keys are not shown.</p>}
      {modelId !== null && mayAccept && (
        <p>
          <Link href={`/catalog/models/${modelId}/key-table`}>Map keys by hand in the key table</Link>
        </p>
      )}
    </>
  );
}

interface RowProps {
  readonly row: UnmappedKey;
  readonly anchors: LineAnchors;
  readonly busy: boolean;
  readonly onAccept: ((row: UnmappedKey, suggestion: Suggestion) => void) | null;
}

function Row({ row, anchors, busy, onAccept }: RowProps) {
  const { path, line, key, raw, suggestions } = row;
  const href = lineHref(anchors, path, line);
  return (
    <tr>
      <NumberCell>{href === null ? line : <a href={href}>{line}</a>}</NumberCell>
      <td className="code">{key}</td>
      <td className="code">{raw.length > 40 ? `${raw.slice(0, 40)}…` : raw}</td>
      <td>
        {suggestions.length === 0 && <span className="quiet">nothing comes near it</span>}
        <ul>
          {suggestions.map((suggestion) => (
            <li
              key={`${suggestion.axis ?? ""} ${suggestion.parameter}`}
              className="flex flex-wrap items-baseline gap-2"
            >
              <span title={suggestion.reason}>{suggestionWords(suggestion)}</span>
              <span className="quiet">{suggestion.reason}</span>
              {onAccept && (
                <Button
                  variant="quiet"
                  disabled={busy}
                  onClick={() => onAccept(row, suggestion)}
                  aria-label={`Accept: ${key} is ${suggestionWords(suggestion)}`}
                >
                  accept
                </Button>
              )}
            </li>
          ))}
        </ul>
      </td>
    </tr>
  );
}
