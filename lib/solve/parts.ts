import type { Policy } from "@/lib/domain/policy";
import type { RuleContext } from "@/lib/rules/types";
import { conflictAmong } from "./conflict";
import type { Knob } from "./knobs";
import { cheapestTogether } from "./leaves";
import { presentPoint, problemOf, type Constraint } from "./problem";
import { restoredSingly, solveProblem } from "./solve-problem";
import { placeKey, type Conflict } from "./types";

/** Knobs of one or more axes that have a key or a check in common, and the checks on them. */
export interface Part {
  readonly knobs: readonly Knob[];
  readonly constraints: readonly Constraint[];
}

export interface Solved {
  /** Step of each knob that has moved. */
  readonly steps: ReadonlyMap<Knob, number>;
  readonly conflicts: readonly Conflict[];
}

export interface Ground {
  readonly context: RuleContext;
  readonly policy: Policy;
}

/**
 * The parts of a machine that can be solved one after the other: axes with no key in common. Checks of the whole
 * machine belong to a part only where its knobs are all that move them; the others are `across`.
 */
export function separate(
  knobs: readonly Knob[],
  constraints: readonly Constraint[],
): { readonly parts: readonly Part[]; readonly across: readonly Constraint[] } {
  const sets = joinedSets(constraints.filter(({ axis }) => axis !== null));
  const home = (constraint: Constraint) =>
    sets.find((set) => constraint.knobs.length > 0 && constraint.knobs.every((knob) => set.has(knob)));
  const parts = sets.map((set) => {
    const own = constraints.filter((constraint) => home(constraint) === set);
    return renumbered(set, own, knobs);
  });
  const across = constraints.filter((constraint) => home(constraint) === undefined);
  return { parts, across };
}

function joinedSets(constraints: readonly Constraint[]): ReadonlySet<number>[] {
  return constraints.reduce<ReadonlySet<number>[]>((sets, { knobs }) => {
    if (knobs.length === 0) return sets;
    const touched = sets.filter((set) => knobs.some((knob) => set.has(knob)));
    const others = sets.filter((set) => !touched.includes(set));
    return [...others, new Set([...touched.flatMap((set) => [...set]), ...knobs])];
  }, []);
}

function renumbered(set: ReadonlySet<number>, own: readonly Constraint[], knobs: readonly Knob[]): Part {
  const kept = [...set].sort((one, other) => one - other);
  return {
    knobs: kept.flatMap((index) => knobs[index] ?? []),
    constraints: overFirst(
      own.map((constraint) => ({
        ...constraint,
        knobs: constraint.knobs.map((index) => kept.indexOf(index)),
      })),
    ),
  };
}

/** What is over limit now is the likeliest to break a point, and is looked at first. */
function overFirst(constraints: readonly Constraint[]): Constraint[] {
  return [...constraints].sort((one, other) => Number(other.over) - Number(one.over));
}

/**
 * Solves a part. Where checks contradict each other they are named; those of them that are over limit must then only
 * not get graver, and the rest is solved without them.
 */
export function solvePart({ context, policy }: Ground, { knobs, constraints }: Part): Solved {
  if (!constraints.some(({ over }) => over)) return { steps: new Map(), conflicts: [] };
  const problem = problemOf(context, knobs);
  const conflicts: Conflict[] = [];
  let bound = constraints;
  for (;;) {
    const found = solveProblem(problem, bound, { raises: policy.counter_raises_current });
    if (found) return { steps: stepsOf(knobs, found.point), conflicts };
    const core = conflictAmong(problem, bound);
    const given = core.filter(({ over, floor }) => over && floor === null);
    if (given.length === 0) return { steps: new Map(), conflicts };
    conflicts.push({ checks: core.map(placeOnly) });
    bound = bound.map((one) => (given.includes(one) ? relaxed(context, one) : one));
  }
}

function placeOnly({ ruleId, axis }: Constraint) {
  return { ruleId, axis };
}

function stepsOf(knobs: readonly Knob[], point: readonly number[]): Map<Knob, number> {
  return new Map(
    knobs.flatMap((knob, index): [Knob, number][] => {
      const at = point[index];
      return at === undefined || at === knob.tracks[0].present ? [] : [[knob, at]];
    }),
  );
}

/** A check that only must not get graver than it is, a hair's breadth for rounding aside. */
function relaxed(context: RuleContext, constraint: Constraint): Constraint {
  const { rule, axis } = constraint;
  const found = rule.judge(context).find((one) => one.axis === axis)?.assessment;
  const margin = found?.ok === true ? found.margin : null;
  const floor = margin === null ? -Infinity : margin - 1e-9 * Math.max(1, Math.abs(margin));
  return { ...constraint, floor };
}

interface Across {
  readonly knobs: readonly Knob[];
  readonly constraints: readonly Constraint[];
  readonly across: readonly Constraint[];
  /** What the parts gave, each by itself. */
  readonly apart: Solved;
}

/** Brings the checks of the whole machine within limits too, from where the parts by themselves have come to. */
export function solveAcross({ context }: Ground, { knobs, constraints, across, apart }: Across): Solved {
  const named = new Set(apart.conflicts.flatMap(({ checks }) => checks.map(placeKey)));
  const bound = overFirst(constraints.map((one) => (named.has(one.key) ? relaxed(context, one) : one)));
  const problem = problemOf(context, knobs);
  const point = presentPoint(problem).map((present, index) => {
    const knob = knobs[index];
    return (knob && apart.steps.get(knob)) ?? present;
  });
  const broken = bound.filter(
    (one) => across.some(({ key }) => key === one.key) && problem.broken(point, [one]),
  );
  if (broken.length === 0) return apart;
  const moving = [...new Set(broken.flatMap((one) => one.knobs))].sort((one, other) => one - other);
  const slower = moving.filter((index) => knobs[index]?.kind !== "current");
  for (const some of [slower, moving]) {
    const touched = bound.filter((one) => one.knobs.some((knob) => some.includes(knob)));
    const found = cheapestTogether({ problem, group: { knobs: some, constraints: touched } }, point);
    if (found && problem.broken(found.point, broken) === null) {
      const best = restoredSingly(problem, bound, found.point);
      return { steps: stepsOf(knobs, best.point), conflicts: apart.conflicts };
    }
  }
  return {
    ...apart,
    conflicts: [...apart.conflicts, ...broken.map((one) => ({ checks: [placeOnly(one)] }))],
  };
}
