import { mergeRegions, type LineRange, type MergeRegion } from "@/lib/diff/merge-lines";
import { splitLines, withoutLineEnd } from "@/lib/diff/text-lines";
import { parseFile } from "./check";
import {
  findPlaces,
  pairPlaces,
  splice,
  type DocumentTrio,
  type PlaceTrio,
  type Splice,
  type ValuePlace,
} from "./merge-places";
import type { MergeChoice, MergeSide } from "./merge-types";
import type { ConfigurationFile } from "./types";

/** One file of the three configurations; null: the text lacks it. */
export type FileTrio = { readonly [side in MergeSide]: ConfigurationFile | null };

/** Whether two places mean the same, though they are spelled otherwise. */
export type SameMeaning = (
  one: readonly [MergeSide, ValuePlace],
  other: readonly [MergeSide, ValuePlace],
) => boolean;

/** A place whose value somebody changed, and whose spelling it takes. */
export interface Decision {
  readonly trio: PlaceTrio;
  readonly from: MergeSide | "conflict";
}

/** How a file that both sides have is merged, whatever will be chosen: its values place by place, the rest by lines. */
export interface FilePlan {
  readonly path: string;
  readonly files: FileTrio;
  readonly decisions: readonly Decision[];
  readonly regions: readonly MergeRegion[];
  /** The texts with every value that has a place in all three spelled as in the base. */
  readonly lines: Readonly<Record<MergeSide, readonly string[]>>;
}

interface PlanInput {
  readonly path: string;
  readonly files: FileTrio;
  readonly documents: DocumentTrio;
  readonly sameMeaning: SameMeaning;
}

/** Values are set aside first, so that a changed value and a changed comment beside it are no conflict. */
export function planFile({ path, files, documents, sameMeaning }: PlanInput): FilePlan {
  const trios = pairPlaces(documents);
  const decisions = trios.flatMap((trio) => {
    const from = decide(trio, sameMeaning);
    return from === null ? [] : [{ trio, from }];
  });
  const neutral = {
    base: files.base?.text ?? "",
    ours: splice(
      files.ours?.text ?? "",
      decisions.flatMap((decision) => neutralised(decision, "ours")),
    ),
    theirs: splice(
      files.theirs?.text ?? "",
      decisions.flatMap((decision) => neutralised(decision, "theirs")),
    ),
  };
  const lines = withOneLineEnd(neutral);
  return { path, files, decisions, regions: mergeRegions(lines), lines };
}

/** Null where nothing changed, or where both sides added something else, which is left to the lines. */
function decide({ base, ours, theirs }: PlaceTrio, sameMeaning: SameMeaning): Decision["from"] | null {
  if (ours.raw === theirs.raw) return base === null || ours.raw === base.raw ? null : "ours";
  if (ours.raw === base?.raw) return "theirs";
  if (theirs.raw === base?.raw) return "ours";
  if (sameMeaning(["ours", ours], ["theirs", theirs])) return shorter(ours.raw, theirs.raw);
  if (base === null) return null;
  if (sameMeaning(["ours", ours], ["base", base])) return "theirs";
  return sameMeaning(["theirs", theirs], ["base", base]) ? "ours" : "conflict";
}

/** Of two spellings of one value the same one, whichever side it comes from. */
function shorter(ours: string, theirs: string): "ours" | "theirs" {
  const first = ours.length === theirs.length ? ours < theirs : ours.length < theirs.length;
  return first ? "ours" : "theirs";
}

function neutralised({ trio, from }: Decision, side: "ours" | "theirs"): Splice[] {
  const { start, end } = trio[side];
  const raw = trio.base?.raw ?? (from === "conflict" ? undefined : trio[from]?.raw);
  return raw === undefined ? [] : [{ start, end, raw }];
}

/**
 * The texts as lines. Where each text has line ends of one kind, all take those of the side that changed them, so that
 * other line ends are no conflict in every line.
 */
function withOneLineEnd(texts: Readonly<Record<MergeSide, string>>): Record<MergeSide, string[]> {
  const [base, ours, theirs] = [texts.base, texts.ours, texts.theirs].map(lineEndOf);
  const wanted = ours === theirs || theirs === base ? ours : ours === base ? theirs : "\n";
  const known = [base, ours, theirs].every((end) => end !== null);
  const lines = (text: string): string[] =>
    splitLines(text).map((line) =>
      known && wanted && /[\r\n]$/.test(line) ? withoutLineEnd(line) + wanted : line,
    );
  return { base: lines(texts.base), ours: lines(texts.ours), theirs: lines(texts.theirs) };
}

/** The one line end of a text; "" where it has none, null where it has several kinds. */
function lineEndOf(text: string): string | null {
  const ends = new Set(text.match(/\r\n|\r|\n/g));
  return ends.size > 1 ? null : ([...ends][0] ?? "");
}

export interface AssembleInput {
  readonly plan: FilePlan;
  /** What is taken of a region that somebody changed. */
  readonly regionChoice: (region: MergeRegion) => MergeChoice;
  readonly valueChoice: (decision: Decision) => MergeSide;
}

/** The merged file; null where a value no longer finds its place in the merged lines. */
export function assembleFile({ plan, regionChoice, valueChoice }: AssembleInput): ConfigurationFile | null {
  const origin = plan.files.ours ?? plan.files.theirs;
  if (!origin) return null;
  const lines = plan.regions.flatMap((region) => linesOf(plan, region, regionChoice(region)));
  const merged = { ...origin, text: closed(lines) };
  const wanted = plan.decisions.flatMap((decision) => {
    const raw = decision.trio[valueChoice(decision)]?.raw;
    return decision.trio.base === null || raw === undefined ? [] : [{ trio: decision.trio, raw }];
  });
  if (wanted.length === 0) return merged;
  const places = findPlaces(
    parseFile(merged),
    wanted.map(({ trio }) => trio),
  );
  if (!places) return null;
  const splices = wanted.flatMap(({ trio, raw }) => {
    const place = places.get(trio);
    return place ? [{ start: place.start, end: place.end, raw }] : [];
  });
  return { ...merged, text: splice(merged.text, splices) };
}

function linesOf({ lines }: FilePlan, region: MergeRegion, choice: MergeChoice): readonly string[] {
  const of = (side: MergeSide, { start, end }: LineRange) => lines[side].slice(start, end);
  if (choice === "both") return [...of("ours", region.ours), ...of("theirs", region.theirs)];
  return of(choice, region[choice]);
}

/** A line that is not the last one ends. */
function closed(lines: readonly string[]): string {
  const lineEnd = /\r\n|\r|\n/.exec(lines[0] ?? "")?.[0] ?? "\n";
  return lines
    .map((line, index) => (index < lines.length - 1 && !/[\r\n]$/.test(line) ? line + lineEnd : line))
    .join("");
}
