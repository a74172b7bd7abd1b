import type { Finding } from "@/lib/domain/findings";
import type { Level } from "@/lib/domain/levels";
import type { ParameterName } from "@/lib/domain/parameters";
import type { Layer } from "@/lib/domain/readings";
import type { ParameterValue } from "@/lib/domain/values";

/** A check that came out worse on the machine than in its required configuration. */
export interface Consequence {
  /** On the required side; null where the check had nothing to judge there. */
  readonly was: Finding | null;
  readonly toBe: Finding;
}

/**
 * One parameter of a machine that is not known to be as required. `differs`: what counts is another value;
 * `not_read`: no layer has a value; `stale`: as required when last read, but that is too long ago.
 */
export interface DriftItem {
  readonly kind: "differs" | "not_read" | "stale";
  readonly axis: string | null;
  readonly parameter: ParameterName;
  /** Null where the required configuration does not state it, and the machine's own value has a consequence. */
  readonly required: ParameterValue | null;
  /** What counts on the machine; null where not read. */
  readonly actual: ParameterValue | null;
  readonly layer: Layer | null;
  readonly readingId: string | null;
  readonly readAt: Date | null;
  /** Whole days since the reading, where that is longer than the policy allows. */
  readonly staleDays: number | null;
  /** (actual − required)/|required| within −1 … 1; null where either is missing. */
  readonly share: number | null;
  readonly level: Level;
  /** Worse checks that this parameter brings about, gravest first. */
  readonly consequences: readonly Consequence[];
  readonly sentence: string;
}

/** Where a machine stands against its required configuration. */
export interface Drift {
  /** Gravest level of the items; null: on baseline. */
  readonly level: Level | null;
  /** By consequence, gravest first. */
  readonly items: readonly DriftItem[];
  readonly sentence: string;
  /** What the checks make of the values that count on the machine; required values stand in where it was not read. */
  readonly findings: readonly Finding[];
}
