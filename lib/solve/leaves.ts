import { indexWithin, knobCost } from "./knobs";
import { helpfulEnd, type Constraint, type Point, type Problem } from "./problem";
import { samples } from "./samples";

/** Knobs that share checks once the run currents stand, and those checks. */
export interface Group {
  readonly knobs: readonly number[];
  readonly constraints: readonly Constraint[];
}

export interface Found {
  readonly point: number[];
  readonly cost: number;
}

interface Place {
  readonly problem: Problem;
  readonly group: Group;
}

/** So many values of one knob are looked at between its present step and the end, before the best ones are looked at closer. */
const SAMPLES = 32;
const CLOSER = 12;
/** The best few samples are looked at closer, since the way of the cost along a knob may have several dips. */
const DIPS = 3;
const MOST_ROUNDS = 8;
/** Among three knobs and more, so many rounds of exchanges between two. */
const EXCHANGES = 3;
const GAIN = 1e-9;

function at(problem: Problem, index: number) {
  const knob = problem.knobs[index];
  if (!knob) throw new Error(`There is no knob ${index}.`);
  return knob;
}

function presentOf(problem: Problem, index: number): number {
  return at(problem, index).tracks[0].present;
}

export function costOf(problem: Problem, point: Point, knobs: readonly number[]): number {
  return knobs.reduce((sum, index) => sum + knobCost(at(problem, index), point[index] ?? 0), 0);
}

function passes({ problem, group }: Place, point: Point): boolean {
  return problem.broken(point, group.constraints) === null;
}

function moved(point: Point, index: number, to: number): number[] {
  return point.map((value, knob) => (knob === index ? to : value));
}

/**
 * The cheapest steps of a group's knobs, the rest of the point as it stands, within `budget`; null where there are
 * none. Rests on what the knobs' kinds say: on the way to its helpful end a knob never breaks a check of its group.
 */
export function cheapest(place: Place, point: Point, budget: number): Found | null {
  const { problem, group } = place;
  const { knobs } = group;
  const present = point.map((value, index) => (knobs.includes(index) ? presentOf(problem, index) : value));
  if (passes(place, present)) return { point: present, cost: 0 };
  const helped = withEnds(problem, present, knobs);
  if (!passes(place, helped)) return null;
  const [one, other, ...more] = knobs;
  if (one === undefined) return null;
  const best =
    other === undefined
      ? restored(place, helped, [one])
      : more.length === 0
        ? bestOfPair(place, present, { one, other, budget, count: SAMPLES })
        : bestOfMany(place, helped, budget);
  return best && best.cost <= budget + GAIN ? best : null;
}

function withEnds(problem: Problem, point: Point, knobs: readonly number[]): number[] {
  return point.map((value, index) => (knobs.includes(index) ? helpfulEnd(at(problem, index)) : value));
}

/** The knobs moved back towards their present steps one after the other, each as far as the checks let it. */
function restored(place: Place, helped: Point, order: readonly number[]): Found {
  const point = order.reduce<number[]>((present, index) => backwards(place, present, index), [...helped]);
  return { point, cost: costOf(place.problem, point, place.group.knobs) };
}

/** One knob moved back towards its present step as far as the checks let it; the point itself passes. */
function backwards(place: Place, point: Point, index: number): number[] {
  let clear = point[index] ?? 0;
  let broken = presentOf(place.problem, index);
  if (passes(place, moved(point, index, broken))) return moved(point, index, broken);
  while (Math.abs(broken - clear) > 1) {
    const middle = Math.trunc((clear + broken) / 2);
    if (passes(place, moved(point, index, middle))) clear = middle;
    else broken = middle;
  }
  return moved(point, index, clear);
}

interface Pair {
  /** So many values of the first knob are looked at before the best ones are looked at closer. */
  readonly count: number;
  readonly one: number;
  readonly other: number;
  readonly budget: number;
}

/** The cheapest steps of two knobs, everything else as the point has it. */
function bestOfPair(place: Place, point: Point, pair: Pair): Found | null {
  const { problem } = place;
  const { one, other } = pair;
  const end = helpfulEnd(at(problem, one));
  let best = answered(place, point, { ...pair, to: presentOf(problem, one) });
  const better = (found: Found | null) => {
    if (found && (!best || found.cost < best.cost)) best = found;
  };
  const alone = answered(place, point, {
    one: other,
    other: one,
    budget: pair.budget,
    to: presentOf(problem, other),
  });
  better(alone);
  let spans = [[presentOf(problem, one), end] as const];
  for (let round = 0; spans.length > 0 && round < MOST_ROUNDS; round++) {
    const tried = spans.flatMap((span) =>
      samples(...span, round === 0 ? pair.count : CLOSER).map((to) => {
        const budget = best ? Math.min(best.cost * NEARLY, pair.budget) : pair.budget;
        return { to, span, found: answered(place, point, { one, other, budget, to }) };
      }),
    );
    for (const { found } of tried) better(found);
    spans = closer(tried, round === 0 ? pair.count : CLOSER);
  }
  return best;
}

/** Samples a little dearer than the best so far are kept: beside one of them may lie a better one. */
const NEARLY = 1.15;

type Span = readonly [number, number];

interface Tried {
  readonly to: number;
  readonly span: Span;
  readonly found: Found | null;
}

/** The neighbourhoods of the best samples, as long as there is anything between them. */
function closer(tried: readonly Tried[], count: number): Span[] {
  return tried
    .filter(({ found }) => found !== null)
    .sort((one, other) => (one.found?.cost ?? 0) - (other.found?.cost ?? 0))
    .slice(0, DIPS)
    .flatMap(({ to, span: [from, end] }): Span[] => {
      const width = Math.ceil(Math.abs(end - from) / count);
      if (width <= 1) return [];
      const low = Math.max(Math.min(from, end), to - width);
      const high = Math.min(Math.max(from, end), to + width);
      return [[low, high]];
    });
}

/** With one knob at a step, the other moved as little as the checks ask for; null where the budget does not reach. */
function answered(
  place: Place,
  point: Point,
  { one, other, budget, to }: Omit<Pair, "count"> & { to: number },
): Found | null {
  const { problem } = place;
  const left = budget - knobCost(at(problem, one), to);
  if (left < 0) return null;
  const farthest = indexWithin(at(problem, other), helpfulEnd(at(problem, other)), left);
  const start = moved(moved(point, one, to), other, farthest);
  if (!passes(place, start)) return null;
  const found = backwards(place, start, other);
  return { point: found, cost: costOf(problem, found, place.group.knobs) };
}

/**
 * The cheapest steps of any knobs, currents too, as if each of them helped by giving way; the rest stays as the point
 * has it. Null where they do not pass even at their ends.
 */
export function cheapestTogether(place: Place, point: Point): Found | null {
  const helped = withEnds(place.problem, point, place.group.knobs);
  return passes(place, helped) ? bestOfMany(place, helped, Infinity) : null;
}

/** Three knobs and more: several ways back from the helpful ends, then exchanges between two at a time. */
function bestOfMany(place: Place, helped: Point, budget: number): Found | null {
  const { knobs } = place.group;
  const starts = orders(knobs).map((order) => restored(place, helped, order));
  const even = restored(place, evenly(place, helped), knobs);
  let best = [...starts, even].reduce((one, other) => (other.cost < one.cost ? other : one));
  for (let round = 0; round < EXCHANGES; round++) {
    const before = best.cost;
    for (const one of knobs)
      for (const other of knobs) {
        if (one >= other) continue;
        const found = bestOfPair(place, best.point, { one, other, budget: Infinity, count: CLOSER });
        if (found && found.cost < best.cost - GAIN) best = found;
      }
    if (best.cost >= before - GAIN) break;
  }
  return best.cost <= budget + GAIN ? best : null;
}

/** All knobs by the same share of their way, as little as passes. */
function evenly(place: Place, helped: Point): number[] {
  const { problem, group } = place;
  const atShare = (share: number) =>
    helped.map((end, index) => {
      if (!group.knobs.includes(index)) return end;
      const present = presentOf(problem, index);
      return present + Math.round((end - present) * share);
    });
  let clear = 1;
  let broken = 0;
  while (clear - broken > 1e-3) {
    const middle = (clear + broken) / 2;
    if (passes(place, atShare(middle))) clear = middle;
    else broken = middle;
  }
  return atShare(clear);
}

/** Orders of a few knobs; of many, each one first once. */
function orders(knobs: readonly number[]): (readonly number[])[] {
  if (knobs.length > 3) return knobs.map((_, index) => [...knobs.slice(index), ...knobs.slice(0, index)]);
  return permutations(knobs);
}

function permutations(knobs: readonly number[]): (readonly number[])[] {
  if (knobs.length < 2) return [knobs];
  return knobs.flatMap((first) =>
    permutations(knobs.filter((other) => other !== first)).map((rest) => [first, ...rest]),
  );
}
