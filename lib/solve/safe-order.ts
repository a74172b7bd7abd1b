import type { ParameterName } from "@/lib/domain/parameters";
import type { ParameterValue, SourcePlace } from "@/lib/domain/values";
import type { RuleInput } from "@/lib/rules/types";
import { placeKey, type CheckPlace } from "./types";
import { standings, type Standing } from "./verdicts";
import { placeOf, rescaled } from "./with-values";

export interface OrderInput extends Omit<RuleInput, "parameters"> {
  /** What the machine runs before. */
  readonly was: readonly ParameterValue[];
  /** What it is to run after. */
  readonly toBe: readonly ParameterValue[];
}

/** What one place of the text says: several parameters where axes share a key. */
export interface OrderStep {
  readonly parameters: readonly { readonly axis: string | null; readonly parameter: ParameterName }[];
  /** As typed; null where the text has no such value on that side. */
  readonly was: { readonly value: number; readonly unit: string | null } | null;
  readonly toBe: { readonly value: number; readonly unit: string | null } | null;
  /** In the text to be; in the old one for a value that is taken away. */
  readonly source: SourcePlace;
}

export type SafeOrder =
  /** Nothing, or one value only, changes: there is no state in between. */
  | { readonly kind: "needless" }
  | { readonly kind: "found"; readonly steps: readonly OrderStep[] }
  | {
      /** `none`: every order was tried. `not-found`: too many values for that, and `tried` states gave none. */
      readonly kind: "none" | "not-found";
      readonly steps: readonly OrderStep[];
      /** Checks that stand in the way, most frequent first. */
      readonly blocking: readonly CheckPlace[];
      readonly tried: number;
    };

/** Up to so many values every subset of them is looked at where need be. */
const ALL_UP_TO = 12;
const MOST_STATES = 2 ** ALL_UP_TO;

/**
 * An order of typing several new values, one after the other, in which every state in between passes the checks: none
 * is over limit that the start has within limits, none is graver than at both ends, and none that both ends allow to
 * be checked is past checking. Values of one key move together. Exact up to twelve places; beyond it as many states
 * are looked at and no more. Pure.
 */
export function safeOrder(input: OrderInput): SafeOrder {
  const steps = stepsOf(input);
  if (steps.length < 2) return { kind: "needless" };
  const search = searched(input, steps);
  const told = steps.map(({ step }) => step);
  if (search.order !== null)
    return { kind: "found", steps: search.order.flatMap((index) => told[index] ?? []) };
  return {
    kind: search.isWhole ? "none" : "not-found",
    steps: told,
    blocking: search.blocking,
    tried: search.tried,
  };
}

interface Side {
  readonly was: readonly ParameterValue[];
  readonly toBe: readonly ParameterValue[];
}

interface Bit extends Side {
  readonly step: OrderStep;
}

function keyOf({ axis, parameter }: ParameterValue): string {
  return `${axis?.toLowerCase() ?? ""}\u0000${parameter}`;
}

/** Whether two texts type the same: another line or notation of a value is no change. */
function isSame(one: ParameterValue, other: ParameterValue): boolean {
  return (
    one.typed.value === other.typed.value && one.typed.unit === other.typed.unit && one.basis === other.basis
  );
}

/** The places that change, in the order of the text to be; parameters of one place on either side are one step. */
function stepsOf({ was, toBe }: OrderInput): Bit[] {
  const before = new Map(was.map((value) => [keyOf(value), value]));
  const after = new Map(toBe.map((value) => [keyOf(value), value]));
  const keys = [...new Set([...after.keys(), ...before.keys()])];
  const groups = keys.reduce<Side[]>((found, key) => {
    const one = before.get(key);
    const other = after.get(key);
    const fresh: Side = { was: one ? [one] : [], toBe: other ? [other] : [] };
    const joined = found.filter((group) => sharesPlace(group, fresh));
    const merged = [...joined, fresh].reduce((all, side) => ({
      was: [...all.was, ...side.was],
      toBe: [...all.toBe, ...side.toBe],
    }));
    return [...found.filter((group) => !joined.includes(group)), merged];
  }, []);
  return groups.filter(isChanged).flatMap(bitOf);
}

function sharesPlace(one: Side, other: Side): boolean {
  const shares = (some: readonly ParameterValue[], more: readonly ParameterValue[]) =>
    some.some((value) => more.some((another) => placeOf(another) === placeOf(value)));
  return shares(one.was, other.was) || shares(one.toBe, other.toBe);
}

function isChanged({ was, toBe }: Side): boolean {
  if (was.length !== toBe.length) return true;
  return was.some((value) => {
    const other = toBe.find((one) => keyOf(one) === keyOf(value));
    return !other || !isSame(value, other);
  });
}

function bitOf({ was, toBe }: Side): Bit[] {
  const [told] = toBe.length > 0 ? toBe : was;
  if (!told) return [];
  const names = new Map([...toBe, ...was].map((value) => [keyOf(value), value]));
  const typedOf = (value: ParameterValue | undefined) =>
    value ? { value: value.typed.value, unit: value.typed.unit } : null;
  const step: OrderStep = {
    parameters: [...names.values()].map(({ axis, parameter }) => ({ axis, parameter })),
    was: typedOf(was.find((value) => keyOf(value) === keyOf(told))),
    toBe: typedOf(toBe[0]),
    source: told.source,
  };
  return [{ was, toBe, step }];
}

interface Search {
  readonly order: readonly number[] | null;
  readonly isWhole: boolean;
  readonly blocking: readonly CheckPlace[];
  readonly tried: number;
}

/** Depth first over the sets of values already typed; a set from which there is no way on is not entered again. */
function searched(input: OrderInput, bits: readonly Bit[]): Search {
  const all = bits.map((_, index) => index);
  const start = standingsAt(input, bits, new Set());
  const end = standingsAt(input, bits, new Set(all));
  const dead = new Set<string>();
  const blocking = new Map<string, { place: CheckPlace; count: number }>();
  let tried = 0;
  let isWhole = true;
  const passes = (done: ReadonlySet<number>): boolean => {
    tried++;
    const failing = failingAt(standingsAt(input, bits, done), start, end);
    for (const { ruleId, axis } of failing) {
      const key = placeKey({ ruleId, axis });
      blocking.set(key, { place: { ruleId, axis }, count: (blocking.get(key)?.count ?? 0) + 1 });
    }
    return failing.length === 0;
  };
  const walk = (order: readonly number[]): readonly number[] | null => {
    if (order.length === bits.length) return order;
    for (const next of all) {
      if (order.includes(next)) continue;
      const done = new Set([...order, next]);
      const key = [...done].sort((one, other) => one - other).join(" ");
      if (dead.has(key)) continue;
      if (tried >= MOST_STATES) {
        isWhole = false;
        return null;
      }
      const found = done.size === bits.length || passes(done) ? walk([...order, next]) : null;
      if (found) return found;
      dead.add(key);
    }
    return null;
  };
  const order = walk([]);
  const ranked = [...blocking.values()].sort((one, other) => other.count - one.count);
  return { order, isWhole, tried, blocking: ranked.map(({ place }) => place) };
}

/** What the checks say when some of the values are typed and the others still stand as before. */
function standingsAt(
  input: OrderInput,
  bits: readonly Bit[],
  done: ReadonlySet<number>,
): ReadonlyMap<string, Standing> {
  const old = bits.flatMap(({ was }, index) => (done.has(index) ? [] : was));
  const fresh = bits.flatMap(({ toBe }, index) => (done.has(index) ? toBe : []));
  const moved = new Set(bits.flatMap(({ was, toBe }) => [...was, ...toBe].map(keyOf)));
  const unmoved = input.was.filter((value) => !moved.has(keyOf(value)));
  const now = [...unmoved, ...old, ...fresh];
  const state = [...rescaled([...unmoved, ...old], input.was, now), ...rescaled(fresh, input.toBe, now)];
  return standings({ assembly: input.assembly, policy: input.policy, parameters: state }, state);
}

type Standings = ReadonlyMap<string, Standing>;

function failingAt(now: Standings, start: Standings, end: Standings): Standing[] {
  return [...now].flatMap(([key, standing]) =>
    isWorse(standing, start.get(key), end.get(key)) ? [standing] : [],
  );
}

function isWorse(now: Standing, start: Standing | undefined, end: Standing | undefined): boolean {
  if (now.over === null)
    return start !== undefined && start.over !== null && end !== undefined && end.over !== null;
  if (!now.over) return false;
  if (start?.over !== true) return true;
  if (now.margin === null) return false;
  const gravest = Math.min(start.margin ?? Infinity, end?.margin ?? Infinity);
  return Number.isFinite(gravest) && now.margin < gravest - 1e-9 * Math.max(1, Math.abs(gravest));
}
