import type { KeyTable } from "@/lib/domain/key-table";
import type { ParameterName } from "@/lib/domain/parameters";
import type { ParameterEdit } from "@/lib/keytable/types";
import { writeParameters } from "@/lib/keytable/write-parameters";
import type { Document, Entry } from "@/lib/parsers/types";
import { diffParameters } from "@/lib/diff/parameters";
import { mapFiles, parseFile } from "./check";
import type { ConfigurationFile } from "./types";

export interface EditTextsInput {
  readonly files: readonly ConfigurationFile[];
  readonly keyTable: KeyTable;
  readonly changes: readonly ParameterEdit[];
}

export interface AppliedEdit {
  readonly axis: string | null;
  readonly parameter: ParameterName;
  readonly path: string;
  /** From 1. */
  readonly line: number;
  readonly alsoAxes: readonly string[];
  /** `enabled`: the key stood commented out; `added`: the text had no such key. */
  readonly how: "changed" | "enabled" | "added";
}

export interface EditTextsResult {
  readonly files: readonly ConfigurationFile[];
  readonly applied: readonly AppliedEdit[];
  readonly refused: readonly { axis: string | null; parameter: ParameterName; reason: string }[];
}

/** So many keys are enabled or added at a time, and so many places are tried for each: the text is read anew for each trial. */
const MOST_GIVEN = 50;
const MOST_TRIED = 3;

/**
 * Writes values into texts in their own units and spelling. A parameter that stands commented out is enabled, one that
 * is missing is added beside its like; both only where the text, read once more, says that parameter and otherwise
 * what it said before.
 */
export function editTextsOf({ files, keyTable, changes }: EditTextsInput): EditTextsResult {
  let texts = files;
  const provided = new Map<ParameterEdit, AppliedEdit["how"]>();
  const known = read(files, keyTable);
  const missing = changes.filter((change) => !known.some((value) => sameParameter(value, change)));
  for (const change of missing.slice(0, MOST_GIVEN)) {
    const found = provide({ files: texts, keyTable, change });
    if (!found) continue;
    texts = found.files;
    provided.set(change, found.how);
  }
  const written = write(texts, keyTable, changes);
  const howOf = (one: Pick<ParameterEdit, "axis" | "parameter">) =>
    [...provided].find(([change]) => sameParameter(change, one))?.[1] ?? "changed";
  const lost = written.refused.filter((one) => howOf(one) !== "changed");
  if (lost.length > 0) {
    const kept = changes.filter((change) => !lost.some((one) => sameParameter(one, change)));
    const rest = editTextsOf({ files, keyTable, changes: kept });
    return { ...rest, refused: [...rest.refused, ...lost] };
  }
  const applied = written.applied.map((one) => ({ ...one, how: howOf(one) }));
  return { files: written.files, applied, refused: written.refused };
}

type Named = Pick<ParameterEdit, "axis" | "parameter">;

function sameParameter(one: Named, other: Named): boolean {
  return one.parameter === other.parameter && one.axis?.toLowerCase() === other.axis?.toLowerCase();
}

function write(files: readonly ConfigurationFile[], keyTable: KeyTable, edits: readonly ParameterEdit[]) {
  const { texts, ...outcome } = writeParameters({
    documents: files.map(parseFile),
    keyTable,
    axes: [],
    edits,
  });
  return { ...outcome, files: files.map((file, index) => ({ ...file, text: texts[index] ?? file.text })) };
}

function read(files: readonly ConfigurationFile[], keyTable: KeyTable) {
  return mapFiles(files.map(parseFile), { keyTable, assembly: { axes: [] } }).parameters;
}

interface Providing {
  readonly files: readonly ConfigurationFile[];
  readonly keyTable: KeyTable;
  readonly change: ParameterEdit;
}

interface Provided {
  readonly files: readonly ConfigurationFile[];
  readonly how: "enabled" | "added";
}

/** The texts with a key for the parameter, whatever its value; null where none can be given. */
function provide(input: Providing): Provided | null {
  const { files, change } = input;
  const like = read(files, input.keyTable).filter(
    ({ axis }) => axis?.toLowerCase() === change.axis?.toLowerCase(),
  );
  const documents = files.map(parseFile);
  for (const how of ["enabled", "added"] as const)
    for (const [index, document] of documents.entries()) {
      const places = new Set(
        like.filter(({ source }) => source.path === document.path).map(({ source }) => source.start),
      );
      for (const pattern of patternsFor(input)) {
        const wanted = { document, pattern, axis: change.axis ?? "", places };
        const trials = how === "enabled" ? enabledTexts(wanted) : addedTexts(wanted);
        for (const text of trials.slice(0, MOST_TRIED)) {
          const changed = files.map((file, at) => (at === index ? { ...file, text } : file));
          if (saysNothingElse(input, { files: changed, document, text })) return { files: changed, how };
        }
      }
    }
  return null;
}

/** The keys that the table has for the parameter. */
function patternsFor({ keyTable, change: { axis, parameter } }: Providing): string[] {
  return keyTable.rules
    .filter((rule) => rule.parameter === parameter)
    .filter((rule) => (rule.axis ?? axis)?.toLowerCase() === axis?.toLowerCase())
    .map(({ key }) => key);
}

/** A key sought in a document. */
interface WantedKey {
  readonly document: Document;
  /** As the key table has it, with `{axis}`. */
  readonly pattern: string;
  readonly axis: string;
  /** Offsets of the values that the text states for the same axis (or for the machine). */
  readonly places: ReadonlySet<number>;
}

const COMMENT_MARK = /^([ \t]*)(?:#|;|\/\/)[ \t]*/;

/** The text with one commented-out key of that name enabled. */
function enabledTexts({ document: { entries, text }, pattern, axis }: WantedKey): string[] {
  const key = pattern.replaceAll("{axis}", axis).toLowerCase();
  return entries
    .filter((entry) => entry.disabled && entry.key.toLowerCase() === key)
    .map(({ keySpan }) => {
      const start = lineStart(text, keySpan.start);
      return text.slice(0, start) + text.slice(start).replace(COMMENT_MARK, "$1");
    });
}

function lineStart(text: string, at: number): number {
  return Math.max(text.lastIndexOf("\n", at - 1), text.lastIndexOf("\r", at - 1)) + 1;
}

/** The text with a line for the key below one of its like: a number of the same axis, the last one first. */
function addedTexts(wanted: WantedKey): string[] {
  const like = wanted.document.entries.filter(
    ({ disabled, conditions, value, valueSpan }) =>
      !disabled && conditions.length === 0 && value.kind === "number" && wanted.places.has(valueSpan.start),
  );
  return like.reverse().flatMap((entry) => addedBelow(wanted, entry) ?? []);
}

/** A copy of the entry's line without its comment, under the new name and with the value 1. */
function addedBelow({ document: { text }, pattern, axis }: WantedKey, entry: Entry): string | null {
  const key = pattern.replaceAll("{axis}", spelledAxis(axis, entry.key));
  const own = entry.path.at(-1) ?? "";
  const section = entry.key.slice(0, entry.key.length - own.length);
  const start = lineStart(text, entry.keySpan.start);
  const head = text.slice(start, entry.valueSpan.start);
  const at = head.lastIndexOf(own);
  if (own === "" || at < 0 || !key.toLowerCase().startsWith(section.toLowerCase())) return null;
  const rest = /[^\r\n]*/.exec(text.slice(entry.valueSpan.end))?.[0] ?? "";
  const end = entry.valueSpan.end + rest.length;
  const lineEnd = /\r\n|\r|\n/.exec(text.slice(end))?.[0] ?? /\r\n|\r|\n/.exec(text)?.[0] ?? "\n";
  const line = `${head.slice(0, at)}${key.slice(section.length)}${head.slice(at + own.length)}1`;
  const after = entry.commentSpan ? "" : rest.trimEnd();
  return `${text.slice(0, end)}${lineEnd}${line}${after}${text.slice(end)}`;
}

/** The axis in the case in which a key of its own has it. */
function spelledAxis(axis: string, key: string): string {
  return !key.includes(axis) && key.includes(axis.toUpperCase()) ? axis.toUpperCase() : axis;
}

interface Attempt {
  readonly files: readonly ConfigurationFile[];
  readonly document: Document;
  readonly text: string;
}

/** The attempt states the parameter, every other one as before, and reads without a new complaint. */
function saysNothingElse(
  { files: before, keyTable, change }: Providing,
  { files, document, text }: Attempt,
): boolean {
  const differences = diffParameters(read(before, keyTable), read(files, keyTable));
  const [only] = differences;
  if (differences.length !== 1 || !only || !sameParameter(only, change) || only.was !== null) return false;
  const again = parseFile({ path: document.path, text, format: document.format });
  return again.diagnostics.length <= document.diagnostics.length;
}
