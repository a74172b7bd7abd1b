import type { ParameterValue } from "@/lib/domain/values";
import { weightOf } from "./knobs";
import type { CheckPlace, CounterMove, SolveInput } from "./types";
import { overLimit } from "./verdicts";
import { placeOf, withTyped } from "./with-values";

/** What is typed anew, in the order of the parameters, each with the checks that ask for it. */
export function movesOf(
  input: SolveInput,
  typed: ReadonlyMap<string, number>,
): { readonly moves: CounterMove[]; readonly cost: number } {
  const changed = input.parameters.filter((value) => {
    const to = typed.get(placeOf(value));
    return to !== undefined && to !== value.typed.value;
  });
  const places = [...new Set(changed.map(placeOf))];
  const present = overKeys(input, typed);
  const moves = places.flatMap((place) => {
    const members = changed.filter((value) => placeOf(value) === place);
    const without = new Map([...typed].filter(([other]) => other !== place));
    const because = [...overKeys(input, without)].flatMap(([key, check]) =>
      present.has(key) ? [] : [check],
    );
    return moveOf({ input, members, toBe: typed.get(place) ?? 0, because });
  });
  return { moves, cost: moves.reduce((sum, { cost }) => sum + cost, 0) };
}

/** Checks over limit with some numbers typed anew. */
function overKeys(input: SolveInput, typed: ReadonlyMap<string, number>): ReadonlyMap<string, CheckPlace> {
  return overLimit(input, withTyped(input.parameters, typed));
}

interface Moved {
  readonly input: SolveInput;
  readonly members: readonly ParameterValue[];
  readonly toBe: number;
  readonly because: readonly CheckPlace[];
}

function moveOf({ input, members, toBe, because }: Moved): CounterMove[] {
  const [first, ...others] = members;
  if (!first) return [];
  const was = first.typed.value;
  const change = was === 0 ? null : (toBe - was) / Math.abs(was);
  const weight = Math.max(...members.map(({ parameter }) => weightOf(parameter, input.policy)));
  return [
    {
      axis: first.axis,
      parameter: first.parameter,
      also: others.map(({ axis, parameter }) => ({ axis, parameter })),
      was,
      toBe,
      unit: first.typed.unit,
      basis: first.basis,
      change,
      cost: weight * Math.abs(change ?? 1),
      because,
      source: first.source,
    },
  ];
}
