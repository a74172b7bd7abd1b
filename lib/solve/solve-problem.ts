import { knobCost, type Knob } from "./knobs";
import { cheapest, costOf, type Found, type Group } from "./leaves";
import { helpfulEnd, presentPoint, type Constraint, type Point, type Problem } from "./problem";
import { samples } from "./samples";

/** So many steps of a current are tried at first; where none of them passes, as many as `EVERY`. */
const SAMPLES = 48;
const CLOSER = 12;
const EVERY = 400;
const MOST_SWEEPS = 6;
const GAIN = 1e-9;

/** A problem taken apart: currents first, and what remains once they stand. */
interface Parts {
  readonly problem: Problem;
  readonly constraints: readonly Constraint[];
  readonly hubs: readonly number[];
  /** Checks that only currents move, and checks that nothing moves. */
  readonly bare: readonly Constraint[];
  readonly groups: readonly Group[];
  /** A current may be raised freely, or only where there is no other way. */
  readonly raises: boolean;
}

export interface SolveOptions {
  readonly raises: boolean;
}

/**
 * The cheapest point that breaks none of the constraints, by the policy's weights; null where there is none in reach.
 * A run current is raised only where no lower speed or acceleration will do, and then as little as will do, unless
 * `raises` lets it.
 */
export function solveProblem(
  problem: Problem,
  constraints: readonly Constraint[],
  options: SolveOptions,
): Found | null {
  const parts = takenApart(problem, constraints, options);
  const start = startOf(parts, SAMPLES) ?? startOf(parts, EVERY);
  if (start === null) return null;
  const found = parts.hubs.length === 0 ? leavesAt(parts, start.point, Infinity) : swept(parts, start);
  return found && restoredSingly(problem, constraints, found.point);
}

function takenApart(problem: Problem, constraints: readonly Constraint[], { raises }: SolveOptions): Parts {
  const hubs = problem.knobs.flatMap(({ kind }, index) => (kind === "current" ? [index] : []));
  const isLeaf = (knob: number) => !hubs.includes(knob);
  const bare = constraints.filter(({ knobs }) => !knobs.some(isLeaf));
  const groups = joined(
    constraints.filter(({ knobs }) => knobs.some(isLeaf)),
    isLeaf,
  );
  return { problem, constraints, hubs, bare, groups, raises };
}

/** Constraints that have a knob in common belong together. */
function joined(constraints: readonly Constraint[], isLeaf: (knob: number) => boolean): Group[] {
  return constraints.reduce<Group[]>((groups, constraint) => {
    const knobs = constraint.knobs.filter(isLeaf);
    const touched = groups.filter((group) => group.knobs.some((knob) => knobs.includes(knob)));
    const others = groups.filter((group) => !touched.includes(group));
    const all = [...touched.flatMap((group) => group.knobs), ...knobs];
    const merged = {
      knobs: [...new Set(all)].sort((one, other) => one - other),
      constraints: [...touched.flatMap((group) => group.constraints), constraint],
    };
    return [...others, merged];
  }, []);
}

interface Start {
  readonly point: number[];
  /** By hub: the steps among which it is moved. */
  readonly ranges: ReadonlyMap<number, readonly [number, number]>;
}

/** A point with the leaves at their helpful ends that breaks nothing, its currents as near to the present ones as they may be. */
function startOf(parts: Parts, count: number): Start | null {
  const { problem, hubs } = parts;
  let point: number[] = presentPoint(problem).map((present, index) =>
    hubs.includes(index) ? present : helpfulEnd(knobAt(problem, index)),
  );
  const ranges = new Map<number, readonly [number, number]>();
  for (const hub of hubs) {
    const found = hubStart(parts, point, { hub, count });
    if (found === null) return null;
    point = replaced(point, hub, found.to);
    ranges.set(hub, found.range);
  }
  return problem.broken(point, parts.constraints) === null ? { point, ranges } : null;
}

interface HubQuestion {
  readonly hub: number;
  readonly count: number;
}

/** Where one current may stand, the other currents left out of it: not raised if that will do. */
function hubStart(parts: Parts, point: Point, { hub, count }: HubQuestion) {
  const { problem, hubs, constraints, raises } = parts;
  const own = constraints.filter(
    ({ knobs }) => knobs.includes(hub) && !knobs.some((knob) => knob !== hub && hubs.includes(knob)),
  );
  const { from, to, tracks } = knobAt(problem, hub);
  const { present } = tracks[0];
  const clears = (step: number) => problem.broken(replaced(point, hub, step), own) === null;
  const down = firstClear({ from: present, to: from, count, clears });
  if (down !== null && !(raises && to > present)) return { to: down, range: [from, down] as const };
  const up = to > present ? firstClear({ from: present, to, count, clears }) : null;
  if (up === null) return down === null ? null : { to: down, range: [from, down] as const };
  return raises ? { to: down ?? up, range: [from, to] as const } : { to: up, range: [up, up] as const };
}

interface Walk {
  readonly from: number;
  readonly to: number;
  readonly count: number;
  readonly clears: (step: number) => boolean;
}

/** The first step on the way that clears, found among samples and then to the step; null where no sample does. */
function firstClear({ from, to, count, clears }: Walk): number | null {
  let broken: number | null = null;
  for (const step of samples(from, to, count)) {
    if (!clears(step)) {
      broken = step;
      continue;
    }
    if (broken === null) return step;
    return bisected({ clear: step, broken, clears });
  }
  return null;
}

function bisected({
  clear,
  broken,
  clears,
}: {
  clear: number;
  broken: number;
  clears: Walk["clears"];
}): number {
  let [inside, outside] = [clear, broken];
  while (Math.abs(inside - outside) > 1) {
    const middle = Math.trunc((inside + outside) / 2);
    if (clears(middle)) inside = middle;
    else outside = middle;
  }
  return inside;
}

function knobAt(problem: Problem, index: number): Knob {
  const knob = problem.knobs[index];
  if (!knob) throw new Error(`There is no knob ${index}.`);
  return knob;
}

function replaced(point: Point, index: number, to: number): number[] {
  return point.map((value, knob) => (knob === index ? to : value));
}

/** The cheapest leaves for the currents of a point; null where they do not pass or cost more than the budget. */
function leavesAt({ problem, bare, groups, hubs }: Parts, point: Point, budget: number): Found | null {
  let cost = costOf(problem, point, hubs);
  if (cost > budget || problem.broken(point, bare) !== null) return null;
  let best = [...point];
  for (const group of groups) {
    const found = cheapest({ problem, group }, best, budget - cost);
    if (found === null) return null;
    cost += found.cost;
    best = found.point;
  }
  const free = presentPoint(problem);
  const bound = new Set([...hubs, ...groups.flatMap(({ knobs }) => knobs)]);
  return { point: best.map((value, index) => (bound.has(index) ? value : (free[index] ?? value))), cost };
}

/** One current after the other over its range, the leaves at their cheapest, until nothing gets cheaper. */
function swept(parts: Parts, start: Start): Found | null {
  let best = leavesAt(parts, start.point, Infinity);
  for (let sweep = 0; sweep < MOST_SWEEPS; sweep++) {
    const before = best?.cost ?? Infinity;
    for (const hub of parts.hubs) {
      const range = start.ranges.get(hub);
      if (range) best = alongHub(parts, { hub, range, from: best, point: best?.point ?? start.point });
    }
    if (parts.hubs.length < 2 || (best?.cost ?? Infinity) >= before - GAIN) break;
  }
  return best;
}

interface Along {
  readonly hub: number;
  readonly range: readonly [number, number];
  readonly from: Found | null;
  readonly point: Point;
}

/** The best step of one current: samples over the whole range, then closer around the best one. */
function alongHub(parts: Parts, { hub, range, from, point }: Along): Found | null {
  let best = from;
  let [low, high] = range;
  const { present } = knobAt(parts.problem, hub).tracks[0];
  for (let count = SAMPLES; ; count = CLOSER) {
    const steps = samples(low, high, count).sort((a, b) => Math.abs(a - present) - Math.abs(b - present));
    for (const step of steps) {
      const found = leavesAt(parts, replaced(point, hub, step), best?.cost ?? Infinity);
      if (found && (!best || found.cost < best.cost - GAIN)) best = found;
    }
    const width = Math.ceil((high - low) / count);
    if (width <= 1 || !best) return best;
    const centre = best.point[hub] ?? low;
    [low, high] = [Math.max(range[0], centre - width), Math.min(range[1], centre + width)];
  }
}

/** Each changed knob is moved back as far as everything else lets it, so that none has moved in vain. */
export function restoredSingly(problem: Problem, constraints: readonly Constraint[], found: Point): Found {
  const clears = (point: Point) => problem.broken(point, constraints) === null;
  let point = [...found];
  for (const [index, was] of presentPoint(problem).entries()) {
    const now = point[index] ?? was;
    const stays = point;
    const clearsAt = (step: number) => clears(replaced(stays, index, step));
    if (now === was || !clears(stays)) continue;
    point = replaced(
      stays,
      index,
      clearsAt(was) ? was : bisected({ clear: now, broken: was, clears: clearsAt }),
    );
  }
  return { point, cost: point.reduce((sum, at, index) => sum + knobCost(knobAt(problem, index), at), 0) };
}
