import { diffParameters } from "@/lib/diff/parameters";
import type { MergeRegion } from "@/lib/diff/merge-lines";
import type { ParameterValue } from "@/lib/domain/values";
import { parameterKey } from "./axis-word";
import { mapFiles, parseFile } from "./check";
import { planFile, type FilePlan, type FileTrio } from "./merge-file";
import { slotName, type PlaceTrio, type ValuePlace } from "./merge-places";
import {
  MERGE_SIDES,
  type ConflictPlace,
  type MergeChoice,
  type MergeConflict,
  type MergedValue,
  type MergeInput,
  type MergeSide,
} from "./merge-types";
import type { ConfigurationFile } from "./types";

/** What one text says, by `parameterKey`. */
export type Values = ReadonlyMap<string, ParameterValue>;
export type ValuesOfSides = { readonly [side in MergeSide]: Values };

/** A parameter as the three texts have it; it counts as changed where its meaning differs from the base's. */
export interface ParameterTrio {
  readonly key: string;
  readonly base: ParameterValue | undefined;
  readonly ours: ParameterValue | undefined;
  readonly theirs: ParameterValue | undefined;
}

/** A conflict with what it is about; `choice` of the conflict says how it is settled. */
export interface OpenConflict {
  readonly conflict: MergeConflict;
  readonly trios: readonly ParameterTrio[];
}

export interface MergePlan {
  readonly input: MergeInput;
  readonly values: ValuesOfSides;
  readonly parameters: readonly ParameterTrio[];
  /** Files that both sides have, by path; files that only one side has are taken or left whole. */
  readonly files: ReadonlyMap<string, FilePlan>;
  readonly trios: ReadonlyMap<string, FileTrio>;
  readonly conflicts: readonly OpenConflict[];
}

/** Where two configurations of one base differ, and what both sides made something else of; the choices are noted, not made. */
export function planMerge(input: MergeInput): MergePlan {
  const values = valuesOfSides(input);
  const parameters = parameterTrios(values);
  const trios = fileTrios(input);
  const files = new Map<string, FilePlan>();
  for (const [path, trio] of trios) {
    const plan = planOf(path, trio, values);
    if (plan) files.set(path, plan);
  }
  const shared = { input, values, parameters, files, trios };
  return { ...shared, conflicts: findConflicts(shared) };
}

function valuesOfSides(input: MergeInput): ValuesOfSides {
  const read = (files: readonly ConfigurationFile[]): Values => readValues(files, input);
  return { base: read(input.base), ours: read(input.ours), theirs: read(input.theirs) };
}

export function readValues(
  files: readonly ConfigurationFile[],
  { keyTable, assembly }: Pick<MergeInput, "keyTable" | "assembly">,
): Values {
  const { parameters } = mapFiles(files.map(parseFile), { keyTable, assembly });
  return new Map(parameters.map((value) => [parameterKey(value), value]));
}

function parameterTrios({ base, ours, theirs }: ValuesOfSides): ParameterTrio[] {
  const keys = new Set([...base.keys(), ...ours.keys(), ...theirs.keys()]);
  return [...keys].map((key) => ({ key, base: base.get(key), ours: ours.get(key), theirs: theirs.get(key) }));
}

/** Whether two texts mean the same; undefined: not in the text. */
export function sameValue(one: ParameterValue | undefined, other: ParameterValue | undefined): boolean {
  return diffParameters(one ? [one] : [], other ? [other] : []).length === 0;
}

export function isConflict({ base, ours, theirs }: ParameterTrio): boolean {
  return !sameValue(base, ours) && !sameValue(base, theirs) && !sameValue(ours, theirs);
}

function fileTrios({ base, ours, theirs }: MergeInput): Map<string, FileTrio> {
  const trios = new Map<string, FileTrio>();
  for (const { path } of [...base, ...ours, ...theirs])
    trios.set(path, { base: fileAt(base, path), ours: fileAt(ours, path), theirs: fileAt(theirs, path) });
  return trios;
}

function fileAt(files: readonly ConfigurationFile[], path: string): ConfigurationFile | null {
  return files.find((file) => file.path === path) ?? null;
}

function planOf(path: string, files: FileTrio, values: ValuesOfSides): FilePlan | null {
  if (!files.ours || !files.theirs) return null;
  const parsed = (side: MergeSide) => {
    const file = files[side];
    return file && parseFile(file);
  };
  const at = {
    base: byPlace(values.base, path),
    ours: byPlace(values.ours, path),
    theirs: byPlace(values.theirs, path),
  };
  const meanings = (side: MergeSide, place: ValuePlace) => at[side].get(place.start) ?? [];
  return planFile({
    path,
    files,
    documents: { base: parsed("base"), ours: parsed("ours"), theirs: parsed("theirs") },
    sameMeaning: ([one, there], [other, here]) => {
      const [left, right] = [meanings(one, there), meanings(other, here)];
      return left.length > 0 && diffParameters(left, right).length === 0;
    },
  });
}

/** The parameters of a file by the offset of their value: several axes may share one. */
function byPlace(values: Values, path: string): ReadonlyMap<number, ParameterValue[]> {
  const places = new Map<number, ParameterValue[]>();
  for (const value of values.values())
    if (value.source.path === path)
      places.set(value.source.start, [...(places.get(value.source.start) ?? []), value]);
  return places;
}

type Unsettled = Omit<MergePlan, "conflicts">;

/** Files first, then values of one place, then lines; a parameter that none of these holds is a conflict of its own. */
function findConflicts(plan: Unsettled): OpenConflict[] {
  const waiting = plan.parameters.filter(isConflict);
  const take = (fits: (trio: ParameterTrio) => boolean): ParameterTrio[] => {
    const taken = waiting.filter(fits);
    for (const trio of taken) waiting.splice(waiting.indexOf(trio), 1);
    return taken;
  };
  const found: OpenConflict[] = [];
  for (const [path, files] of plan.trios)
    if (isFileConflict(files))
      found.push(fileConflict(plan, { path, trios: take((trio) => isIn(trio, path)) }));
  for (const file of plan.files.values()) {
    for (const { trio: place, from } of file.decisions)
      if (from === "conflict")
        found.push(
          valueConflict(
            plan,
            place,
            take((trio) => isAt(trio, place)),
          ),
        );
    for (const region of file.regions)
      if (region.kind === "conflict")
        found.push(
          linesConflict(plan, { file, region, trios: take((trio) => touches(trio, { file, region })) }),
        );
  }
  return [...found, ...waiting.splice(0).map((trio) => parameterConflict(plan, trio))];
}

/** One side removed the file, the other changed it. */
function isFileConflict({ base, ours, theirs }: FileTrio): boolean {
  if (ours && theirs) return false;
  const left = ours ?? theirs;
  return left !== null && base !== null && left.text !== base.text;
}

function isIn(trio: ParameterTrio, path: string): boolean {
  return MERGE_SIDES.some((side) => trio[side]?.source.path === path);
}

function isAt(trio: ParameterTrio, place: PlaceTrio): boolean {
  return (["ours", "theirs"] as const).every((side) => {
    const source = trio[side]?.source;
    return source?.path === place[side].path && source.start === place[side].start;
  });
}

interface RegionPlace {
  readonly file: FilePlan;
  readonly region: MergeRegion;
}

/** Whether a side changed the line that holds a parameter, or added or removed it there. */
export function touches(trio: ParameterTrio, { file, region }: RegionPlace): boolean {
  return MERGE_SIDES.some((side) => {
    const source = trio[side]?.source;
    const line = source?.path === file.path ? source.line - 1 : -1;
    return line >= region[side].start && line < region[side].end;
  });
}

const ANY_SIDE: readonly MergeChoice[] = MERGE_SIDES;

/** A file that is taken whole from one text: what one side removed and the other changed, or what cannot be merged in parts. */
export function fileConflict(
  plan: Unsettled,
  { path, trios }: { readonly path: string; readonly trios: readonly ParameterTrio[] },
): OpenConflict {
  const files = plan.trios.get(path);
  const whole = (side: MergeSide) => {
    const file = files?.[side];
    return file ? { text: file.text, line: 1 } : null;
  };
  const lines = { base: whole("base"), ours: whole("ours"), theirs: whole("theirs") };
  return open(plan, { id: `file:${path}`, kind: "file", path, lines, options: ANY_SIDE }, trios);
}

const NO_LINES: MergeConflict["lines"] = { base: null, ours: null, theirs: null };

function valueConflict(plan: Unsettled, place: PlaceTrio, trios: readonly ParameterTrio[]): OpenConflict {
  const { path, key } = place.ours;
  const id = `value:${path}:${slotName(place)}`;
  const found = open(plan, { id, kind: "value", path, lines: NO_LINES, options: ANY_SIDE }, trios);
  if (trios.length > 0) return found;
  const side = (where: ValuePlace | null): MergedValue | null =>
    where && { value: null, unit: null, basis: null, raw: where.raw, path, line: where.line };
  const bare = { base: side(place.base), ours: side(place.ours), theirs: side(place.theirs) };
  return { trios, conflict: { ...found.conflict, places: [{ axis: null, parameter: null, key, ...bare }] } };
}

function linesConflict(
  plan: Unsettled,
  { file, region, trios }: RegionPlace & { readonly trios: readonly ParameterTrio[] },
): OpenConflict {
  const { path } = file;
  const id = `lines:${path}:${region.base.start}-${region.base.end}`;
  const of = (side: MergeSide) => ({
    text: file.lines[side].slice(region[side].start, region[side].end).join(""),
    line: region[side].start + 1,
  });
  const lines = { base: of("base"), ours: of("ours"), theirs: of("theirs") };
  const added = region.base.start === region.base.end && trios.length === 0;
  const options: readonly MergeChoice[] = added ? [...ANY_SIDE, "both"] : ANY_SIDE;
  return open(plan, { id, kind: "lines", path, lines, options }, trios);
}

function parameterConflict(plan: Unsettled, trio: ParameterTrio): OpenConflict {
  const path = (trio.theirs ?? trio.ours ?? trio.base)?.source.path ?? "";
  const head = { id: `parameter:${trio.key}`, kind: "parameter", path, lines: NO_LINES } as const;
  return open(plan, { ...head, options: ANY_SIDE }, [trio]);
}

type Head = Omit<MergeConflict, "places" | "choice">;

function open({ input }: Unsettled, head: Head, trios: readonly ParameterTrio[]): OpenConflict {
  const asked = input.choices?.get(head.id);
  const choice = asked !== undefined && head.options.includes(asked) ? asked : null;
  return { trios, conflict: { ...head, places: trios.map(placeOf), choice } };
}

function placeOf({ base, ours, theirs }: ParameterTrio): ConflictPlace {
  const any = theirs ?? ours ?? base;
  return {
    axis: any?.axis ?? null,
    parameter: any?.parameter ?? null,
    key: any?.source.key ?? null,
    base: mergedValue(base),
    ours: mergedValue(ours),
    theirs: mergedValue(theirs),
  };
}

function mergedValue(value: ParameterValue | undefined): MergedValue | null {
  if (!value) return null;
  const { raw, path, line } = value.source;
  return { value: value.value, unit: value.unit, basis: value.basis, raw, path, line };
}
