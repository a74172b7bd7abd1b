import { RULES } from "@/lib/rules/table";
import type { Rule, RuleContext, RuleVerdict } from "@/lib/rules/types";
import { insideValue, typedAt } from "./grid";
import { indicesAt, type Knob } from "./knobs";
import { placeKey, type CheckPlace } from "./types";

/** A check on one axis or on the machine, and the knobs that can move its verdict. */
export interface Constraint extends CheckPlace {
  readonly rule: Rule;
  readonly key: string;
  /** Indices into the problem's knobs. */
  readonly knobs: readonly number[];
  /** Whether it is over limit as the text stands. */
  readonly over: boolean;
  /** Margin of one that nothing in the text can clear: it must at least not get graver. */
  readonly floor: number | null;
}

/** Step of each knob. */
export type Point = readonly number[];

export interface Problem {
  readonly knobs: readonly Knob[];
  /** One of the constraints that a point breaks; null where it breaks none. */
  readonly broken: (point: Point, among: readonly Constraint[]) => Constraint | null;
}

/** Every check that says something of the text as it stands. One without a verdict binds nobody. */
export function constraintsOf(context: RuleContext, knobs: readonly Knob[]): Constraint[] {
  return RULES.flatMap((rule) =>
    rule.judge(context).flatMap(({ axis, assessment }) => {
      if (!assessment.ok) return [];
      const key = placeKey({ ruleId: rule.id, axis });
      const own = knobs.flatMap((knob, index) => (touches(knob, rule, axis) ? [index] : []));
      const over = assessment.level === "over";
      return [{ rule, ruleId: rule.id, axis, key, knobs: own, over, floor: null }];
    }),
  );
}

function touches({ tracks }: Knob, { needs }: Rule, axis: string | null): boolean {
  return tracks.some(({ members }) =>
    members.some(
      ({ axis: own, parameter }) =>
        needs.includes(parameter) && (axis === null || own?.toLowerCase() === axis.toLowerCase()),
    ),
  );
}

/** The search space of some knobs, everything else as the context has it. */
export function problemOf(context: RuleContext, knobs: readonly Knob[]): Problem {
  const contextAt = contexts(context, knobs);
  const known = new Map<Constraint, Map<string, boolean>>();
  let last: Constraint | null = null;
  const breaks = (constraint: Constraint, point: Point): boolean => {
    const seen = known.get(constraint) ?? new Map<string, boolean>();
    known.set(constraint, seen);
    // Nothing but its own knobs moves a check.
    const own = constraint.knobs.map((index) => point[index]).join(" ");
    const found = seen.get(own) ?? isBroken(constraint, contextAt(point));
    seen.set(own, found);
    return found;
  };
  return {
    knobs,
    broken: (point, among) => {
      // What broke the point before is likely to break this one too.
      if (last && among.includes(last) && breaks(last, point)) return last;
      const found = among.find((constraint) => breaks(constraint, point)) ?? null;
      last = found ?? last;
      return found;
    },
  };
}

/** Whether a check is over limit, or past judging, at a point. */

function isBroken(constraint: Constraint, context: RuleContext): boolean {
  const found = verdict(constraint, context)?.assessment;
  if (!found) return false;
  // What could be judged before and cannot now is no answer.
  if (!found.ok) return true;
  if (constraint.floor !== null) return found.margin !== null && found.margin < constraint.floor;
  return found.level === "over";
}

function verdict({ rule, axis }: Constraint, context: RuleContext): RuleVerdict | undefined {
  if (axis === null) return rule.judge(context).find((one) => one.axis === null);
  const axes = context.axes.filter((view) => view.axis === axis);
  return rule.judge({ ...context, axes }).find((one) => one.axis === axis);
}

/** Contexts of points; what the knobs in front have in common with the point before is not computed again. */
function contexts(base: RuleContext, knobs: readonly Knob[]): (point: Point) => RuleContext {
  const chain: { readonly at: number; readonly context: RuleContext }[] = [];
  return (point) => {
    let same = 0;
    while (same < chain.length && chain[same]?.at === point[same]) same++;
    chain.length = same;
    let context = chain[same - 1]?.context ?? base;
    for (let index = same; index < knobs.length; index++) {
      const knob = knobs[index];
      const at = point[index];
      if (knob === undefined || at === undefined) break;
      context = turned(context, knob, at);
      chain.push({ at, context });
    }
    return context;
  };
}

function turned(context: RuleContext, knob: Knob, index: number): RuleContext {
  if (index === knob.tracks[0].present) return context;
  return indicesAt(knob, index).reduce((present, at, track) => {
    const own = knob.tracks[track];
    if (!own) return present;
    const typed = typedAt(at, own.decimals);
    return own.members.reduce(
      (inner, member) =>
        member.axis === null
          ? inner
          : inner.withValue(axisName(inner, member.axis), member.parameter, insideValue(member, typed)),
      present,
    );
  }, context);
}

/** The axis as the assembly spells it. */
function axisName({ axes }: RuleContext, axis: string): string {
  return axes.find((view) => view.axis.toLowerCase() === axis.toLowerCase())?.axis ?? axis;
}

/** Every knob where the text has it. */
export function presentPoint({ knobs }: Problem): number[] {
  return knobs.map(({ tracks }) => tracks[0].present);
}

/** The end of a knob that helps most: lowest for speeds, highest for hold currents. */
export function helpfulEnd({ kind, from, to }: Knob): number {
  return kind === "raise" ? to : from;
}
