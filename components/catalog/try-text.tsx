"use client";

import { useDeferredValue, useMemo, useState } from "react";
import { ParametersTable } from "@/components/findings/parameters-table";
import { Button } from "@/components/ui/button";
import { TextArea } from "@/components/ui/field";
import { SheetSection } from "@/components/ui/sheet";
import { Head, NumberCell, Table } from "@/components/ui/table";
import type { KeyRule } from "@/lib/domain/key-table";
import { parameterLabel } from "@/lib/domain/parameters";
import { plural } from "@/lib/domain/sentences";
import { mapDocuments } from "@/lib/keytable/map-documents";
import type { AxisShape, Mapping, Suggestion, UnmappedKey } from "@/lib/keytable/types";
import { parseText } from "@/lib/parsers/parse-text";

export interface TryTextProps {
  readonly rules: readonly KeyRule[];
  readonly axes: readonly AxisShape[];
  /** Null: the reader may not change the table. */
  readonly onAccept: ((key: string, suggestion: Suggestion) => void) | null;
}

const PATH = "pasted text";
const SHOWN_UNMAPPED = 100;

function useMapping(text: string, { rules, axes }: TryTextProps): Mapping | null {
  const settled = useDeferredValue(text);
  return useMemo(() => {
    if (settled.trim() === "") return null;
    const documents = [parseText({ path: PATH, text: settled })];
    return mapDocuments({ documents, keyTable: { rules: [...rules] }, axes });
  }, [settled, rules, axes]);
}

/** The table as it stands, tried on a pasted text while typing; nothing of the text is kept. */
export function TryText(props: TryTextProps) {
  const [text, setText] = useState("");
  const mapping = useMapping(text, props);
  const kinds = Object.fromEntries(props.axes.map(({ axis, kind }) => [axis.toLowerCase(), kind]));
  return (
    <SheetSection title="Try it on a text" note="The text stays in this browser and is not kept.">
      <TextArea
        code
        label="A configuration text of this model"
        rows={12}
        value={text}
        onChange={(event) => setText(event.target.value)}
      />
      {mapping && (
        <>
          <p role="status">
            {plural(mapping.parameters.length, "parameter")} read, {plural(mapping.unmapped.length, "key")}{" "}
            not mapped.
          </p>
          <ParametersTable parameters={mapping.parameters} kinds={kinds} />
          <DiagnosticsList mapping={mapping} />
          <Unmapped unmapped={mapping.unmapped} onAccept={props.onAccept} />
        </>
      )}
    </SheetSection>
  );
}

function DiagnosticsList({ mapping }: { readonly mapping: Mapping }) {
  const diagnostics = mapping.diagnostics.flat();
  if (diagnostics.length === 0) return null;
  return (
    <ul>
      {diagnostics.map(({ code, message, span }, index) => (
        <li key={`${code} ${index}`}>
          {span && `Line ${span.line}: `}
          {message}
        </li>
      ))}
    </ul>
  );
}

interface UnmappedProps {
  readonly unmapped: readonly UnmappedKey[];
  readonly onAccept: TryTextProps["onAccept"];
}

function Unmapped({ unmapped, onAccept }: UnmappedProps) {
  if (unmapped.length === 0) return null;
  const more = unmapped.length - SHOWN_UNMAPPED;
  return (
    <>
      <Table caption="Keys that no row maps">
        <thead>
          <tr>
            <Head number>Line</Head>
            <Head>Key</Head>
            <Head>Value</Head>
            <Head>Suggestions</Head>
          </tr>
        </thead>
        <tbody>
          {unmapped.slice(0, SHOWN_UNMAPPED).map(({ line, key, raw, suggestions }) => (
            <tr key={`${line} ${key}`}>
              <NumberCell>{line}</NumberCell>
              <td className="code">{key}</td>
              <td className="code">{raw}</td>
              <td>
                {suggestions.length === 0 && <span className="quiet">none</span>}
                {suggestions.map((suggestion) => (
                  <SuggestionLine
                    key={`${suggestion.parameter} ${suggestion.axis ?? ""}`}
                    suggestion={suggestion}
                    onAccept={onAccept && (() => onAccept(key, suggestion))}
                  />
                ))}
              </td>
            </tr>
          ))}
        </tbody>
      </Table>
      {more > 0 && <p className="quiet">{plural(more, "more key")} not shown.</p>}
    </>
  );
}

interface SuggestionLineProps {
  readonly suggestion: Suggestion;
  readonly onAccept: (() => void) | null;
}

function SuggestionLine({ suggestion, onAccept }: SuggestionLineProps) {
  const { parameter, axis, unit, basis, reason } = suggestion;
  const words = [axis ? `${parameterLabel(parameter)} of ${axis}` : parameterLabel(parameter), unit, basis];
  return (
    <p>
      {words.filter(Boolean).join(", ")} <span className="quiet">{reason}</span>{" "}
      {onAccept && (
        <Button variant="quiet" onClick={onAccept} aria-label={`Accept ${words.filter(Boolean).join(", ")}`}>
          accept
        </Button>
      )}
    </p>
  );
}
