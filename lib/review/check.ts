import type { Diagnostic } from "@/lib/domain/diagnostic";
import { plural } from "@/lib/domain/sentences";
import { mapDocuments } from "@/lib/keytable/map-documents";
import type { Mapping } from "@/lib/keytable/types";
import { inspectText } from "@/lib/parsers/inspect";
import { parseText } from "@/lib/parsers/parse-text";
import type { Document } from "@/lib/parsers/types";
import { evaluateRules } from "@/lib/rules/evaluate-rules";
import type { Assembly, AxisAssembly } from "@/lib/domain/assembly";
import type { ParameterValue } from "@/lib/domain/values";
import { axisShapes } from "./axis-shapes";
import type { CheckInput, CheckReport, ConfigurationFile, DocumentReport } from "./types";

/**
 * The whole path from texts to findings: parse each file, look for hidden characters, read the parameters out of
 * it by the key table, and evaluate every check. Pure; the same input gives the same report.
 */
export function checkConfiguration(input: CheckInput): CheckReport {
  const documents = input.files.map(parseFile);
  const mapping = mapFiles(documents, input);
  const { quantities, findings, provenance } = evaluateRules({
    parameters: mapping.parameters,
    assembly: withAxesOfTexts(input.assembly, mapping.parameters),
    policy: input.policy,
  });
  return {
    documents: documents.map((document, index) => report({ document, index, mapping, input })),
    parameters: mapping.parameters,
    unmapped: mapping.unmapped,
    quantities,
    findings,
    provenance,
  };
}

/** A file of a configuration as a document; an unknown format is recognised from path and text. */
export function parseFile({ path, text, format }: ConfigurationFile): Document {
  return parseText({ path, text, ...(format === undefined ? {} : { format }) });
}

/** What the key table reads out of documents for this machine; rules of another layer than `layer` do not apply. */
export function mapFiles(
  documents: readonly Document[],
  { keyTable, assembly, layer }: Pick<CheckInput, "keyTable" | "assembly" | "layer">,
): Mapping {
  return mapDocuments({
    documents,
    keyTable,
    axes: axisShapes(assembly),
    ...(layer === undefined ? {} : { layer }),
  });
}

/** The assembly with the axes that only the texts name: nothing is known of their hardware, and the checks say so. */
function withAxesOfTexts(assembly: Assembly, parameters: readonly ParameterValue[]): Assembly {
  const found = new Map<string, AxisAssembly>();
  for (const { axis, unit } of parameters) {
    if (axis === null || assembly.axes.some((known) => known.axis.toLowerCase() === axis.toLowerCase()))
      continue;
    if (unit.includes("deg") || unit.includes("rad"))
      found.set(axis, { axis, drive_train: { kind: "rotary" } });
    else if (!found.has(axis)) found.set(axis, { axis });
  }
  return found.size === 0 ? assembly : { ...assembly, axes: [...assembly.axes, ...found.values()] };
}

interface Place {
  readonly document: Document;
  readonly index: number;
  readonly mapping: Mapping;
  readonly input: CheckInput;
}

function report(place: Place): DocumentReport {
  const { document, index, mapping } = place;
  const found = [
    ...document.diagnostics,
    ...inspectText(document.text),
    ...(mapping.diagnostics[index] ?? []),
  ].sort((a, b) => (a.span?.start ?? -1) - (b.span?.start ?? -1));
  return {
    path: document.path,
    format: document.format,
    entries: document.entries.length,
    diagnostics: isKnown(place) ? found : [noKnownKey(document), ...found],
  };
}

/** Whether the key table knows a key of this file, be it only to say that its value cannot be read. */
function isKnown({ document, index, mapping, input }: Place): boolean {
  if (mapping.parameters.some(({ source }) => source.path === document.path)) return true;
  if ((mapping.diagnostics[index] ?? []).length > 0) return true;
  return input.files.length > 1 && mapFiles([document], input).parameters.length > 0;
}

function noKnownKey({ path, entries }: Document): Diagnostic {
  const found =
    entries.length === 0
      ? `No key with a value was found in ${path}.`
      : `${path} has ${plural(entries.length, "key")}, and the key table knows none of them.`;
  return {
    code: "no-known-key",
    severity: "error",
    message: `${found} The text is kept as it is; check that it belongs to this machine, or add its keys to the key table.`,
    span: null,
  };
}
