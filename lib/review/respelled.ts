import { diffParameters } from "@/lib/diff/parameters";
import type { ParameterName } from "@/lib/domain/parameters";
import type { ParameterValue } from "@/lib/domain/values";
import { parameterKey } from "./axis-word";
import type { CheckReport } from "./types";

/** One side of a value that is written otherwise. */
export interface Spelling {
  readonly raw: string;
  /** As typed or as the key table has it; null: none. */
  readonly unit: string | null;
  readonly path: string;
  /** From 1. */
  readonly line: number;
}

/** A parameter that both texts state with the same value in another unit, basis or notation. */
export interface Respelled {
  readonly axis: string | null;
  readonly parameter: ParameterName;
  readonly was: Spelling;
  readonly toBe: Spelling;
}

/** What the texts write otherwise without saying anything else: no change, but a reader of the lines will ask. */
export function respelled(
  before: Pick<CheckReport, "parameters">,
  after: Pick<CheckReport, "parameters">,
): Respelled[] {
  const earlier = new Map(before.parameters.map((value) => [parameterKey(value), value]));
  return after.parameters.flatMap((toBe) => {
    const was = earlier.get(parameterKey(toBe));
    const differs = was && (was.source.raw !== toBe.source.raw || was.typed.unit !== toBe.typed.unit);
    if (!was || !differs || diffParameters([was], [toBe]).length > 0) return [];
    return [{ axis: toBe.axis, parameter: toBe.parameter, was: spelling(was), toBe: spelling(toBe) }];
  });
}

function spelling({ source: { raw, path, line }, typed }: ParameterValue): Spelling {
  return { raw, unit: typed.unit, path, line };
}
