import { writeParameters } from "@/lib/keytable/write-parameters";
import { axisShapes } from "./axis-shapes";
import { parseFile } from "./check";
import { assembleFile, type Decision, type FilePlan, type FileTrio } from "./merge-file";
import { slotName } from "./merge-places";
import {
  fileConflict,
  isConflict,
  planMerge,
  readValues,
  sameValue,
  touches,
  type MergePlan,
  type OpenConflict,
  type ParameterTrio,
} from "./merge-plan";
import type { MergeChoice, MergedParameter, MergeInput, MergeResult, MergeSide } from "./merge-types";
import type { ConfigurationFile } from "./types";

type Files = readonly ConfigurationFile[];

/**
 * Merges two configurations that were made of one base: per parameter first (changed on both sides to something else
 * is a conflict wherever it stands; the same value in another unit or notation is none), then line by line. What only
 * one side changed is taken from it byte for byte. With a conflict that has no choice there are no files, and never
 * a text with both sides in it.
 */
export function mergeConfigurations(input: MergeInput): MergeResult {
  const plan = planMerge(input);
  const merged = plan.parameters.flatMap(mergedParameter);
  const { files, open } = settle(plan, plan.conflicts);
  return { files, conflicts: open.map(({ conflict }) => conflict), merged };
}

function mergedParameter(trio: ParameterTrio): MergedParameter[] {
  const value = trio.ours ?? trio.theirs ?? trio.base;
  const [ours, theirs] = [!sameValue(trio.base, trio.ours), !sameValue(trio.base, trio.theirs)];
  if (!value || isConflict(trio) || (!ours && !theirs)) return [];
  const from = ours && theirs ? "both" : ours ? "ours" : "theirs";
  return [{ axis: value.axis, parameter: value.parameter, from }];
}

interface Settled {
  readonly files: Files | null;
  readonly open: readonly OpenConflict[];
}

/** Carries the choices out. A file that cannot be merged as chosen becomes a conflict of whole files, and so on until it can. */
function settle(plan: MergePlan, open: readonly OpenConflict[]): Settled {
  if (open.some(({ conflict }) => conflict.choice === null)) return { files: null, open };
  const { files, broken } = assemble(plan, open);
  const fallen = broken ?? faultAfter(plan, { open, files });
  if (fallen === null) return { files: corrected(plan, { open, files }), open };
  return settle(plan, [...open, fallen]);
}

interface Chosen {
  readonly open: readonly OpenConflict[];
  readonly files: Files;
}

function assemble(
  plan: MergePlan,
  open: readonly OpenConflict[],
): { files: Files; broken: OpenConflict | null } {
  const files: ConfigurationFile[] = [];
  for (const path of mergedOrder(plan)) {
    const file = mergedFile(plan, path, open);
    if (file === "broken") return { files, broken: fileConflict(plan, { path, trios: [] }) };
    if (file) files.push(file);
  }
  return { files, broken: null };
}

/** Later files override earlier ones, so a new order is a change: that of the side that made it, else added files last. */
function mergedOrder({ input, trios }: MergePlan): string[] {
  const paths = (files: Files) => files.map(({ path }) => path);
  const [base, ours, theirs] = [paths(input.base), paths(input.ours), paths(input.theirs)];
  const rest = [...trios.keys()].filter((path) => !base.includes(path)).sort();
  const first = equal(ours, base)
    ? theirs
    : equal(theirs, base) || equal(ours, theirs)
      ? ours
      : [...base, ...rest];
  return [...first, ...[...trios.keys()].filter((path) => !first.includes(path))];
}

function equal(one: readonly string[], other: readonly string[]): boolean {
  return one.length === other.length && one.every((path, index) => path === other[index]);
}

function mergedFile(
  plan: MergePlan,
  path: string,
  open: readonly OpenConflict[],
): ConfigurationFile | null | "broken" {
  const trio = plan.trios.get(path) ?? { base: null, ours: null, theirs: null };
  const whole = choiceOf(open, `file:${path}`);
  if (whole !== null && whole !== "both") return trio[whole];
  const [dropped, file] = [droppedIn(open, path), plan.files.get(path)];
  if (dropped.length === 0 || !file) {
    const side = wholeSide(trio);
    if (side !== null) return trio[side];
  }
  if (!file) return null;
  return assembleFile({ plan: file, ...picks({ file, open, dropped }) }) ?? "broken";
}

function choiceOf(open: readonly OpenConflict[], id: string): MergeChoice | null {
  return open.find(({ conflict }) => conflict.id === id)?.conflict.choice ?? null;
}

/** The side that has the merged file already, since the other one left it as it was or made the same of it. */
function wholeSide({ base, ours, theirs }: FileTrio): MergeSide | null {
  if (ours?.text === base?.text) return "theirs";
  return theirs?.text === base?.text || ours?.text === theirs?.text ? "ours" : null;
}

/** A parameter whose value on a side was not chosen: what that side changed at its line is left out. */
interface Dropped {
  readonly side: MergeSide;
  readonly trio: ParameterTrio;
}

function droppedIn(open: readonly OpenConflict[], path: string): Dropped[] {
  return open.flatMap(({ conflict, trios }) =>
    conflict.kind !== "parameter"
      ? []
      : (["ours", "theirs"] as const)
          .filter((side) => side !== conflict.choice)
          .flatMap((side) =>
            trios
              .filter((trio) => [trio[side], trio.base].some((value) => value?.source.path === path))
              .map((trio) => ({ side, trio })),
          ),
  );
}

interface Picking {
  readonly file: FilePlan;
  readonly open: readonly OpenConflict[];
  readonly dropped: readonly Dropped[];
}

function picks({ file, open, dropped }: Picking) {
  const regionChoice = (region: FilePlan["regions"][number]): MergeChoice => {
    const { kind, base } = region;
    if (kind === "same") return "base";
    if (kind === "conflict") return choiceOf(open, `lines:${file.path}:${base.start}-${base.end}`) ?? "base";
    const out = dropped.some(({ side, trio }) => side === kind && touches(trio, { file, region }));
    return out ? "base" : kind === "agreed" ? "ours" : kind;
  };
  const valueChoice = ({ trio, from }: Decision): MergeSide => {
    if (from === "conflict") {
      const choice = choiceOf(open, `value:${file.path}:${slotName(trio)}`);
      return choice === null || choice === "both" ? "base" : choice;
    }
    const out = dropped.some(({ side, trio: parameter }) => {
      const source = parameter[side]?.source;
      return side === from && source?.path === file.path && source.start === trio[from]?.start;
    });
    return out ? "base" : from;
  };
  return { regionChoice, valueChoice };
}

/** What the merged text is to say of a parameter. */
function expected(trio: ParameterTrio, open: readonly OpenConflict[]) {
  const choice = open.find(({ trios }) => trios.includes(trio))?.conflict.choice ?? null;
  if (choice !== null && choice !== "both") return trio[choice];
  return sameValue(trio.base, trio.ours) ? trio.theirs : trio.ours;
}

/** Parameters that the merged text does not say as it should; those of a file that was taken whole are as chosen. */
function faults(plan: MergePlan, { open, files }: Chosen): ParameterTrio[] {
  const whole = new Set(open.flatMap(({ conflict }) => (conflict.kind === "file" ? [conflict.path] : [])));
  const now = readValues(files, plan.input);
  return plan.parameters.filter((trio) => {
    const places = [trio.base, trio.ours, trio.theirs, now.get(trio.key)];
    if (places.some((value) => value && whole.has(value.source.path))) return false;
    return !sameValue(now.get(trio.key), expected(trio, open));
  });
}

/** The merged texts with the chosen values written in where another place than the chosen one counts. */
function corrected(plan: MergePlan, { open, files }: Chosen): Files {
  const edits = faults(plan, { open, files }).flatMap((trio) => {
    const value = expected(trio, open);
    return value ? [{ ...value, basis: value.basis ?? undefined }] : [];
  });
  if (edits.length === 0) return files;
  const { texts } = writeParameters({
    documents: files.map(parseFile),
    keyTable: plan.input.keyTable,
    axes: axisShapes(plan.input.assembly),
    edits,
  });
  return files.map((file, index) => ({ ...file, text: texts[index] ?? file.text }));
}

/** The file of the first parameter that no merged text can say as chosen; null where all is as it should be. */
function faultAfter(plan: MergePlan, chosen: Chosen): OpenConflict | null {
  const [fault] = faults(plan, { ...chosen, files: corrected(plan, chosen) });
  const source = (fault?.theirs ?? fault?.ours ?? fault?.base)?.source;
  if (!fault || !source) return null;
  return fileConflict(plan, { path: source.path, trios: [fault] });
}
