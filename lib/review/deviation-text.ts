import type { Assembly } from "@/lib/domain/assembly";
import type { KeyTable } from "@/lib/domain/key-table";
import type { Layer } from "@/lib/domain/readings";
import type { ParameterEdit, WriteResult } from "@/lib/keytable/types";
import { writeParameters } from "@/lib/keytable/write-parameters";
import { axisShapes } from "./axis-shapes";
import { parseFile } from "./check";
import type { ConfigurationFile } from "./types";

export interface DeviationInput {
  /** The baseline's files. */
  readonly files: readonly ConfigurationFile[];
  readonly keyTable: KeyTable;
  readonly assembly: Assembly;
  /** The machine's permitted deviations in force, oldest first; values in any unit of their dimension. */
  readonly deviations: readonly ParameterEdit[];
  readonly layer?: Layer | undefined;
}

export interface DeviationResult {
  /** The files in the order given; a file that no deviation touches is the same object. */
  readonly files: readonly ConfigurationFile[];
  readonly applied: WriteResult["applied"];
  /** What the text has no place for, with the reason: the required text then lacks this deviation. */
  readonly refused: WriteResult["refused"];
}

/** The required text of a machine: the baseline's files with its permitted deviations written in; nothing else changes. */
export function applyDeviations({
  files,
  keyTable,
  assembly,
  deviations,
  layer,
}: DeviationInput): DeviationResult {
  if (deviations.length === 0) return { files, applied: [], refused: [] };
  const { texts, applied, refused } = writeParameters({
    documents: files.map(parseFile),
    keyTable,
    axes: axisShapes(assembly),
    edits: deviations,
    ...(layer === undefined ? {} : { layer }),
  });
  return { files: files.map((file, index) => withText(file, texts[index])), applied, refused };
}

function withText(file: ConfigurationFile, text: string | undefined): ConfigurationFile {
  return text === undefined || text === file.text ? file : { ...file, text };
}
