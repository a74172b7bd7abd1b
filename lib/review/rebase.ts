import { diffParameters } from "@/lib/diff/parameters";
import { reapplyText, type UnfittingEdit } from "@/lib/diff/reapply";
import type { Assembly } from "@/lib/domain/assembly";
import type { KeyTable } from "@/lib/domain/key-table";
import type { ParameterName } from "@/lib/domain/parameters";
import type { ParameterValue } from "@/lib/domain/values";
import { writeParameters } from "@/lib/keytable/write-parameters";
import { axisShapes } from "./axis-shapes";
import { parameterKey } from "./axis-word";
import { mapFiles, parseFile } from "./check";
import type { ConfigurationFile } from "./types";

type Files = readonly ConfigurationFile[];

export interface RebaseInput {
  /** The baseline that the proposal was made on, the proposal itself, and the baseline of today. */
  readonly oldBase: Files;
  readonly edited: Files;
  readonly newBase: Files;
  readonly keyTable: KeyTable;
  readonly assembly: Assembly;
}

/** A parameter edit of the proposal; null: not in the text. */
interface Wish {
  readonly axis: string | null;
  readonly parameter: ParameterName;
  readonly was: ParameterValue | null;
  readonly wanted: ParameterValue | null;
}

export interface RefusedWish extends Wish {
  /** What the new base says; null: nothing. */
  readonly now: ParameterValue | null;
  readonly reason: string;
}

export interface RebaseResult {
  /** The proposal on the new base, in its order of files. */
  readonly files: Files;
  readonly reapplied: readonly Wish[];
  /** Edits that the new base already holds. */
  readonly alreadyThere: readonly Wish[];
  readonly notFitting: readonly RefusedWish[];
  readonly textNotFitting: readonly (UnfittingEdit & { readonly path: string })[];
}

/**
 * A proposal opened again on a baseline that has moved. A parameter edit is made again where the new base still means
 * what the old one meant; everything else that was edited (comments, other keys, added and removed lines) is made
 * again line by line where its lines still stand. What does not fit is not made, and told with its reason.
 */
export function rebaseEdits(input: RebaseInput): RebaseResult {
  const now = read(input, input.newBase);
  const [was, wanted] = [read(input, input.oldBase), read(input, input.edited)];
  const wishes = diffParameters([...was.values()], [...wanted.values()]).map(
    ({ axis, parameter, was: before, toBe }) => ({ axis, parameter, was: before, wanted: toBe }),
  );
  const text = reapplyTexts(input, wishes);
  const fitting = wishes.filter((wish) => fits(wish, now));
  const written = writeValues(input, { files: text.files, wishes: fitting.filter(isValueEdit) });
  const result = read(input, written.files);
  const sorted = sortWishes({ wishes, now, result, refused: written.refused });
  return { files: written.files, ...sorted, textNotFitting: text.notFitting };
}

type Values = ReadonlyMap<string, ParameterValue>;

function read(input: RebaseInput, files: Files): Values {
  const { parameters } = mapFiles(files.map(parseFile), input);
  return new Map(parameters.map((value) => [parameterKey(value), value]));
}

function same(one: ParameterValue | null | undefined, other: ParameterValue | null | undefined): boolean {
  return diffParameters(one ? [one] : [], other ? [other] : []).length === 0;
}

function fits(wish: Wish, now: Values): boolean {
  return same(now.get(parameterKey(wish)), wish.was);
}

/** Both sides state the parameter in the same file, so that only its value changes hands. */
function isValueEdit(wish: Wish): wish is Wish & { was: ParameterValue; wanted: ParameterValue } {
  return wish.was !== null && wish.wanted !== null && wish.was.source.path === wish.wanted.source.path;
}

interface Texts {
  readonly files: ConfigurationFile[];
  readonly notFitting: (UnfittingEdit & { path: string })[];
}

/** The text edits alone: edited values are first put back as they were, so that a value never stands in their way. */
function reapplyTexts({ oldBase, edited, newBase }: RebaseInput, wishes: readonly Wish[]): Texts {
  const neutral = edited.map((file) => spliced(file, wishes.filter(isValueEdit).map(oldSpelling)));
  const files: ConfigurationFile[] = [];
  const notFitting: Texts["notFitting"] = [];
  for (const path of new Set([...newBase, ...neutral, ...oldBase].map((file) => file.path))) {
    const [old, wanted, now] = [oldBase, neutral, newBase].map((list) =>
      list.find((file) => file.path === path),
    );
    const merged = reapplyFile({ old, wanted, now });
    if (merged.file) files.push(merged.file);
    notFitting.push(...merged.notFitting.map((edit) => ({ ...edit, path })));
  }
  return { files, notFitting };
}

interface Versions {
  readonly old: ConfigurationFile | undefined;
  readonly wanted: ConfigurationFile | undefined;
  readonly now: ConfigurationFile | undefined;
}

interface MergedFile {
  readonly file: ConfigurationFile | undefined;
  readonly notFitting: readonly UnfittingEdit[];
}

function reapplyFile({ old, wanted, now }: Versions): MergedFile {
  if (old && wanted && now) {
    const { text, notFitting } = reapplyText({ oldBase: old.text, edited: wanted.text, newBase: now.text });
    return { file: { ...now, text }, notFitting };
  }
  if (now?.text === old?.text) return { file: wanted, notFitting: [] };
  if (!wanted || wanted.text === old?.text || wanted.text === now?.text)
    return { file: now, notFitting: old && now ? [wholeFile(now, "removed")] : [] };
  return { file: now, notFitting: [wholeFile(wanted, old ? "changed" : "added")] };
}

function wholeFile({ text }: ConfigurationFile, kind: UnfittingEdit["kind"]): UnfittingEdit {
  return { line: 1, text, kind };
}

interface Splice {
  readonly path: string;
  readonly start: number;
  readonly end: number;
  readonly raw: string;
}

function oldSpelling({ was, wanted }: { was: ParameterValue; wanted: ParameterValue }): Splice {
  const { path, start, end } = wanted.source;
  return { path, start, end, raw: was.source.raw };
}

/** The file with other spellings at some places; two parameters of one place change it once. */
function spliced(file: ConfigurationFile, splices: readonly Splice[]): ConfigurationFile {
  const own = new Map(
    splices.filter(({ path }) => path === file.path).map((splice) => [splice.start, splice]),
  );
  if (own.size === 0) return file;
  let text = file.text;
  for (const { start, end, raw } of [...own.values()].sort((a, b) => b.start - a.start))
    text = text.slice(0, start) + raw + text.slice(end);
  return { ...file, text };
}

type ValueWish = Wish & { was: ParameterValue; wanted: ParameterValue };
type Refused = readonly { axis: string | null; parameter: ParameterName; reason: string }[];

/** The edited values: as the proposal spells them where the place is spelled as it was, else converted to what stands there. */
function writeValues(
  input: RebaseInput,
  { files, wishes }: { readonly files: Files; readonly wishes: readonly ValueWish[] },
): { files: Files; refused: Refused } {
  const there = read(input, files);
  const splices: Splice[] = [];
  const others: ValueWish[] = [];
  for (const wish of wishes) {
    const place = there.get(parameterKey(wish))?.source;
    if (place?.raw === wish.was.source.raw && place.key === wish.wanted.source.key)
      splices.push({ ...place, raw: wish.wanted.source.raw });
    else others.push(wish);
  }
  const verbatim = files.map((file) => spliced(file, splices));
  if (others.length === 0) return { files: verbatim, refused: [] };
  const { texts, refused } = writeParameters({
    documents: verbatim.map(parseFile),
    keyTable: input.keyTable,
    axes: axisShapes(input.assembly),
    edits: others.map(({ wanted }) => ({ ...wanted, basis: wanted.basis ?? undefined })),
  });
  return { files: verbatim.map((file, index) => ({ ...file, text: texts[index] ?? file.text })), refused };
}

interface SortInput {
  readonly wishes: readonly Wish[];
  readonly now: Values;
  readonly result: Values;
  readonly refused: Refused;
}

/** A wish counts as reapplied only when the new text, read once more, says what was wanted. */
function sortWishes({ wishes, now, result, refused }: SortInput) {
  const reapplied: Wish[] = [];
  const alreadyThere: Wish[] = [];
  const notFitting: RefusedWish[] = [];
  for (const wish of wishes) {
    const key = parameterKey(wish);
    const standing = now.get(key) ?? null;
    if (same(standing, wish.wanted)) alreadyThere.push(wish);
    else if (same(result.get(key), wish.wanted)) reapplied.push(wish);
    else {
      const told = refused.find((refusal) => parameterKey(refusal) === key)?.reason;
      notFitting.push({ ...wish, now: standing, reason: told ?? reasonFor(wish, standing) });
    }
  }
  return { reapplied, alreadyThere, notFitting };
}

function reasonFor(wish: Wish, now: ParameterValue | null): string {
  if (same(now, wish.was)) return "The lines around it have changed in the new baseline.";
  if (now === null) return "The new baseline no longer states it.";
  return wish.was === null
    ? "The new baseline now states it itself."
    : "The new baseline has another value for it than the proposal started from.";
}
