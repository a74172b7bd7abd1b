import type { ParameterName } from "@/lib/domain/parameters";
import type { Basis, ParameterValue, SourcePlace } from "@/lib/domain/values";
import type { RuleInput } from "@/lib/rules/types";

/** What a counter-proposal starts from. */
export interface SolveInput extends RuleInput {
  /** Whether the text can take another value here; left out, every value can be changed. */
  readonly writable?: ((value: ParameterValue) => boolean) | undefined;
}

/** A check on one axis, or on the machine as a whole. */
export interface CheckPlace {
  readonly ruleId: string;
  readonly axis: string | null;
}

/** One value of the text that the counter-proposal changes, in the unit and basis in which the text has it. */
export interface CounterMove {
  readonly axis: string | null;
  readonly parameter: ParameterName;
  /** What else the same place of the text sets. */
  readonly also: readonly { readonly axis: string | null; readonly parameter: ParameterName }[];
  readonly was: number;
  readonly toBe: number;
  /** As typed; null for a plain number. */
  readonly unit: string | null;
  readonly basis: Basis | null;
  /** (toBe − was)/|was|; null where `was` is 0. */
  readonly change: number | null;
  /** Weight × relative change, the share of the cost. */
  readonly cost: number;
  /** Checks that would be over limit with the old value in its place. */
  readonly because: readonly CheckPlace[];
  readonly source: SourcePlace;
}

/** Checks that no values in reach can satisfy together; a single one is beyond what the text may say. */
export interface Conflict {
  readonly checks: readonly CheckPlace[];
}

export interface CounterProposal {
  /** Empty where nothing is over limit, or nothing can be cleared. */
  readonly moves: readonly CounterMove[];
  /** Sum of the moves' costs. */
  readonly cost: number;
  /** Findings over limit that the moves clear. */
  readonly cleared: readonly CheckPlace[];
  /** What stands against what; at least one of each is over limit and stays so. */
  readonly conflicts: readonly Conflict[];
  /** Findings over limit that the moves leave as they are; none of them gets graver. */
  readonly left: readonly CheckPlace[];
  /** Least share of its present value to which a value was allowed to go down. */
  readonly leastShare: number;
}

export function placeKey({ ruleId, axis }: CheckPlace): string {
  return `${ruleId}|${axis?.toLowerCase() ?? ""}`;
}
