import type { Assembly } from "@/lib/domain/assembly";
import type { KeyTable } from "@/lib/domain/key-table";
import type { ParameterName } from "@/lib/domain/parameters";
import type { Basis } from "@/lib/domain/values";
import type { ConfigurationFile } from "./types";

/** The text that both sides started from, and the two that were made of it. */
export const MERGE_SIDES = ["base", "ours", "theirs"] as const;
export type MergeSide = (typeof MERGE_SIDES)[number];

/** What is taken where the sides conflict; `both`: lines that both added, ours first. */
export const MERGE_CHOICES = [...MERGE_SIDES, "both"] as const;
export type MergeChoice = (typeof MERGE_CHOICES)[number];

type Files = readonly ConfigurationFile[];

export interface MergeInput {
  readonly base: Files;
  readonly ours: Files;
  readonly theirs: Files;
  readonly keyTable: KeyTable;
  /** Gives the axes; one without axes: those that the texts speak of. */
  readonly assembly: Assembly;
  /** By id of a conflict. */
  readonly choices?: ReadonlyMap<string, MergeChoice> | undefined;
}

/** What one text says at a place of a conflict. */
export interface MergedValue {
  /** SI as everywhere; null where no parameter is read there. */
  readonly value: number | null;
  readonly unit: string | null;
  readonly basis: Basis | null;
  readonly raw: string;
  readonly path: string;
  /** From 1. */
  readonly line: number;
}

export interface ConflictPlace {
  readonly axis: string | null;
  /** Null for a key that the key table does not know. */
  readonly parameter: ParameterName | null;
  readonly key: string | null;
  /** Null: not in that text. */
  readonly base: MergedValue | null;
  readonly ours: MergedValue | null;
  readonly theirs: MergedValue | null;
}

/**
 * Where both sides made something else of the same: the value of one place, a parameter that stands at different
 * places, some lines, or a whole file. One choice settles it.
 */
export interface MergeConflict {
  readonly id: string;
  readonly kind: "value" | "parameter" | "lines" | "file";
  readonly path: string;
  readonly places: readonly ConflictPlace[];
  /** The lines of each side; null where the conflict is one of values, or the side lacks the file. */
  readonly lines: Readonly<Record<MergeSide, { readonly text: string; readonly line: number } | null>>;
  readonly options: readonly MergeChoice[];
  readonly choice: MergeChoice | null;
}

/** A parameter that one side alone changed, or both in the same way. */
export interface MergedParameter {
  readonly axis: string | null;
  readonly parameter: ParameterName;
  readonly from: "ours" | "theirs" | "both";
}

export interface MergeResult {
  /** Null as long as a conflict has no choice. */
  readonly files: Files | null;
  readonly conflicts: readonly MergeConflict[];
  readonly merged: readonly MergedParameter[];
}
