import { helpfulEnd, presentPoint, type Constraint, type Point, type Problem } from "./problem";
import { samples } from "./samples";

const SAMPLES = 48;

/**
 * Checks that cannot be satisfied together: none of them can be left out without the rest becoming possible. Those
 * within limits are left out first, so that what is named is over limit wherever that says enough. Empty where the
 * constraints do not contradict each other over one current.
 */
export function conflictAmong(problem: Problem, constraints: readonly Constraint[]): Constraint[] {
  const helped = presentPoint(problem).map((present, index) => {
    const knob = problem.knobs[index];
    return knob === undefined || knob.kind === "current" ? present : helpfulEnd(knob);
  });
  const currents = problem.knobs.flatMap(({ kind }, index) => (kind === "current" ? [index] : []));
  const fixed = constraints.filter(({ knobs }) => !knobs.some((knob) => currents.includes(knob)));
  const alone = problem.broken(helped, fixed);
  if (alone) return [alone];
  for (const current of currents) {
    const core = overOneCurrent({ problem, constraints, helped, current });
    if (core.length > 0) return core;
  }
  return [];
}

interface Question {
  readonly problem: Problem;
  readonly constraints: readonly Constraint[];
  readonly helped: Point;
  readonly current: number;
}

/** The steps of one current that each check allows, where they have none in common: the checks that leave none. */
function overOneCurrent({ problem, constraints, helped, current }: Question): Constraint[] {
  const knob = problem.knobs[current];
  if (!knob) return [];
  const points = samples(knob.from, knob.to, SAMPLES).map((step) =>
    helped.map((value, index) => (index === current ? step : value)),
  );
  const own = constraints
    .filter(({ knobs }) => knobs.includes(current))
    .sort((one, other) => Number(one.over) - Number(other.over));
  const allowed = new Map(
    own.map((one) => [one, points.map((point) => problem.broken(point, [one]) === null)] as const),
  );
  const contradict = (some: readonly Constraint[]) =>
    !points.some((_, at) => some.every((one) => allowed.get(one)?.[at] === true));
  if (!contradict(own)) return [];
  return own.reduce<Constraint[]>((core, one) => {
    const without = core.filter((other) => other !== one);
    return contradict(without) ? without : core;
  }, own);
}
