import { levelRank, type Level } from "@/lib/domain/levels";
import type { Policy } from "@/lib/domain/policy";
import type { QuantityName } from "@/lib/domain/quantities";
import { checkConfiguration } from "./check";
import { effects } from "./effects";
import { mergeConfigurations } from "./merge";
import type { MergeChoice, MergeConflict, MergedParameter, MergeInput } from "./merge-types";
import { parameterChanges } from "./parameter-changes";
import type { CheckReport, ConfigurationFile, Effect, ParameterChange } from "./types";

export type Choices = Readonly<Record<string, MergeChoice>>;

/** What the page of a merge asks its worker after each choice. */
export interface MergeRequest {
  /** Counts up; an answer to an older request is dropped. */
  readonly id: number;
  readonly input: Omit<MergeInput, "choices">;
  readonly policy: Policy;
  readonly choices: Choices;
}

/** One quantity under each choice of a conflict. */
export interface ChoiceEffect {
  readonly axis: string | null;
  readonly quantity: QuantityName;
  readonly label: string;
  readonly unit: string;
  readonly by: readonly {
    readonly choice: MergeChoice;
    readonly value: number | null;
    readonly level: Level | null;
  }[];
}

export interface ConflictOutlook {
  readonly conflict: MergeConflict;
  /** The quantities that come out otherwise under one choice than under another, gravest first. */
  readonly effects: readonly ChoiceEffect[];
}

export interface MergeAnswer {
  readonly id: number;
  readonly conflicts: readonly ConflictOutlook[];
  readonly merged: readonly MergedParameter[];
  /** The merged texts; null as long as a conflict has no choice. */
  readonly files: readonly ConfigurationFile[] | null;
  /** What the merged texts change of the text in force. */
  readonly changes: readonly ParameterChange[];
  readonly effects: readonly Effect[];
}

/** The worker's whole work: merge as chosen so far, and check what each further choice would do. */
export function answerMerge({ id, input, policy, choices }: MergeRequest): MergeAnswer {
  const { files, conflicts, merged } = mergeConfigurations({ ...input, choices: mapOf(choices) });
  const check = (texts: readonly ConfigurationFile[]): CheckReport =>
    checkConfiguration({ files: texts, keyTable: input.keyTable, assembly: input.assembly, policy });
  const outlooks = conflicts.map((conflict) => ({
    conflict,
    effects: choiceEffects(
      conflict.options.map((choice) => ({
        choice,
        report: check(settled(input, { ...choices, [conflict.id]: choice })),
      })),
    ),
  }));
  if (!files) return { id, conflicts: outlooks, merged, files, changes: [], effects: [] };
  const [before, after] = [check(input.theirs), check(files)];
  const changes = parameterChanges(before, after);
  return { id, conflicts: outlooks, merged, files, changes, effects: effects({ before, after, changes }) };
}

function mapOf(choices: Choices): ReadonlyMap<string, MergeChoice> {
  return new Map(Object.entries(choices));
}

/** The texts as chosen so far; where nothing is chosen yet, those of `theirs`. */
function settled(input: MergeRequest["input"], choices: Choices): readonly ConfigurationFile[] {
  const result = mergeConfigurations({ ...input, choices: mapOf(choices) });
  if (result.files) return result.files;
  const open = result.conflicts.filter(({ choice }) => choice === null);
  const left = Object.fromEntries(open.map(({ id }) => [id, "theirs" as const]));
  return settled(input, { ...choices, ...left });
}

interface ChoiceReport {
  readonly choice: MergeChoice;
  readonly report: CheckReport;
}

function choiceEffects(reports: readonly ChoiceReport[]): ChoiceEffect[] {
  const [first, ...others] = reports;
  if (!first) return [];
  const pairs = others.map(({ choice, report }) => ({ choice, moved: movedFrom(first.report, report) }));
  const rows = new Map<string, Effect>();
  for (const { moved } of pairs) for (const [key, effect] of moved) rows.set(key, effect);
  const found = [...rows].map(([key, effect]) => {
    const { axis, quantity, label, unit } = effect;
    const was = { value: effect.was, level: effect.levelWas };
    const by = pairs.map(({ choice, moved }) => {
      const own = moved.get(key);
      return { choice, ...(own ? { value: own.toBe, level: own.levelToBe } : was) };
    });
    return { axis, quantity, label, unit, by: [{ choice: first.choice, ...was }, ...by] };
  });
  return found.sort((one, other) => gravity(one) - gravity(other));
}

/** The effects of going from one report to another where a number or a level moves. */
function movedFrom(before: CheckReport, after: CheckReport): Map<string, Effect> {
  const changes = parameterChanges(before, after);
  return new Map(
    effects({ before, after, changes })
      .filter(({ was, toBe, levelWas, levelToBe }) => was !== toBe || levelWas !== levelToBe)
      .map((effect) => [`${effect.axis ?? ""}|${effect.quantity}`, effect]),
  );
}

function gravity({ by }: ChoiceEffect): number {
  return Math.min(...by.map(({ level }) => (level === null ? Infinity : levelRank(level))));
}
