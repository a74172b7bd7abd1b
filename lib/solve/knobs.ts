import { parameterDefinition, type ParameterName } from "@/lib/domain/parameters";
import type { Policy } from "@/lib/domain/policy";
import type { ParameterValue } from "@/lib/domain/values";
import { currentParameters, raiseCurrent } from "@/lib/rules/candidates";
import type { AxisView, RuleContext } from "@/lib/rules/types";
import { decimalsOf, indexOf, typedAt, typedValue } from "./grid";
import { placeOf } from "./with-values";

/**
 * `current`: a run current, which may go either way. `lower`: speeds and the like, which only ever help a check by
 * giving way. `raise`: a hold current, which only ever helps by growing.
 */
export type KnobKind = "current" | "lower" | "raise";

/** One place of the text that a knob moves, on the grid of its own decimals. */
export interface Track {
  readonly place: string;
  /** What the place sets; several where axes or parameters share it. */
  readonly members: readonly ParameterValue[];
  readonly decimals: number;
  /** Step of the grid at which the value stands now. */
  readonly present: number;
  readonly weight: number;
  /** Register steps count from 0: step 0 is a current of one share, so the share is of (step + 1). */
  readonly offset: 0 | 1;
}

/** A number that the search may move: one place of the text, or the two that state the same current. */
export interface Knob {
  readonly kind: KnobKind;
  readonly tracks: readonly [Track, ...Track[]];
  /** Range of the first track's steps, both ends included; the present step lies in it. */
  readonly from: number;
  readonly to: number;
}

const LOWERED: ReadonlySet<ParameterName> = new Set([
  "max_speed",
  "acceleration",
  "jerk",
  "corner_speed",
  "reference_run_speed",
]);

const CURRENTS = {
  run_current: ["run_current", "reference_voltage", "current_scale"],
  hold_current: ["hold_current", "hold_scale"],
} as const;

/** Parameters that the search moves; any other is at most set to the one value that a finding names. */
export const MOVED: ReadonlySet<ParameterName> = new Set([
  ...LOWERED,
  ...CURRENTS.run_current,
  ...CURRENTS.hold_current,
]);

/** Relative weight of a change by the policy. */
export function weightOf(parameter: ParameterName, policy: Policy): number {
  if (parameter === "max_speed") return policy.counter_weight_speed;
  if (parameter === "acceleration") return policy.counter_weight_acceleration;
  if (parameter === "corner_speed") return policy.counter_weight_corner_speed;
  const isCurrent = [...CURRENTS.run_current, ...CURRENTS.hold_current].some((name) => name === parameter);
  return isCurrent ? policy.counter_weight_current : 1;
}

export interface KnobInput {
  readonly context: RuleContext;
  readonly parameters: readonly ParameterValue[];
  readonly policy: Policy;
  readonly writable: (value: ParameterValue) => boolean;
}

/** Every number of the text that the search may move, in the order of the parameters. */
export function knobsOf(input: KnobInput): Knob[] {
  const byPlace = grouped(input.parameters);
  const taken = new Set<string>();
  return input.parameters.flatMap((value) => {
    const members = byPlace.get(placeOf(value));
    if (!members || taken.has(placeOf(value)) || !isMovable(members, input)) return [];
    const tracks = [members, ...partners(value, byPlace, input)].map((all) => trackOf(all, input));
    for (const { place } of tracks) taken.add(place);
    const knob = knobOf(tracks, input);
    return knob ? [knob] : [];
  });
}

function grouped(parameters: readonly ParameterValue[]): ReadonlyMap<string, readonly ParameterValue[]> {
  const byPlace = new Map<string, ParameterValue[]>();
  for (const value of parameters) {
    const members = byPlace.get(placeOf(value));
    if (members) members.push(value);
    else byPlace.set(placeOf(value), [value]);
  }
  return byPlace;
}

/** A place is moved only where the search may move all that it sets, and its number has a sign that makes sense. */
function isMovable(members: readonly ParameterValue[], { writable }: KnobInput): boolean {
  return members.every(
    (one) =>
      one.axis !== null &&
      MOVED.has(one.parameter) &&
      writable(one) &&
      one.value >= 0 &&
      (one.value > 0 || one.parameter === "hold_current"),
  );
}

/** The other place that states the same current: a current in amperes beside its reference voltage or register step. */
function partners(
  value: ParameterValue,
  byPlace: ReadonlyMap<string, readonly ParameterValue[]>,
  input: KnobInput,
): (readonly ParameterValue[])[] {
  const view = viewOf(value, input.context);
  const current = value.parameter === "run_current" || value.parameter === "hold_current";
  if (!view || !current) return [];
  return currentParameters(view, value.parameter === "run_current" ? "run_current" : "hold_current").flatMap(
    (name) => {
      const stated = name === value.parameter ? undefined : view.parameter(name);
      const members = stated && byPlace.get(placeOf(stated));
      return members && isMovable(members, input) ? [members] : [];
    },
  );
}

function viewOf({ axis }: ParameterValue, { axes }: RuleContext): AxisView | undefined {
  return axes.find((view) => view.axis.toLowerCase() === axis?.toLowerCase());
}

function trackOf(members: readonly ParameterValue[], { policy }: KnobInput): Track {
  const decimals = Math.max(...members.map(decimalsOf));
  const [first] = members;
  const isStep = members.some(({ parameter }) => parameterDefinition(parameter).dimension === "count");
  return {
    place: first ? placeOf(first) : "",
    members,
    decimals,
    present: first ? indexOf(first.typed.value, decimals) : 0,
    weight: Math.max(...members.map(({ parameter }) => weightOf(parameter, policy))),
    offset: isStep ? 1 : 0,
  };
}

function kindOf(members: readonly ParameterValue[]): KnobKind {
  const names = members.map(({ parameter }) => parameter);
  if (names.some((name) => CURRENTS.run_current.some((one) => one === name))) return "current";
  return names.some((name) => CURRENTS.hold_current.some((one) => one === name)) ? "raise" : "lower";
}

function knobOf(tracks: readonly Track[], input: KnobInput): Knob | null {
  const [first, ...others] = tracks;
  if (!first) return null;
  const kind = kindOf(first.members);
  const least = Math.min(
    first.present,
    Math.max(first.present === 0 ? 0 : 1, Math.ceil(input.policy.counter_least_share * first.present)),
  );
  const most = kind === "lower" ? first.present : Math.max(first.present, highest(first, kind, input));
  return { kind, tracks: [first, ...others], from: kind === "raise" ? first.present : least, to: most };
}

/** The highest step to which a current may be raised: the ratings of motor and driver, 100 %, the last register step. */
function highest(track: Track, kind: KnobKind, { context }: KnobInput): number {
  const reaches = track.members.map((member) => {
    const view = viewOf(member, context);
    const name = kind === "current" ? "run_current" : "hold_current";
    const found = view && raiseCurrent(view, name).find(({ parameter }) => parameter === member.parameter);
    if (!found || found.aim.kind !== "raise") return track.present;
    return Math.floor(Number(`${typedValue(member, found.aim.most)}e${track.decimals}`) + 1e-9);
  });
  return Math.min(...reaches.map((reach) => (Number.isFinite(reach) ? reach : track.present)));
}

/** The step of each track when the first one stands at `index`: the others give way in the same proportion. */
export function indicesAt({ tracks }: Knob, index: number): number[] {
  const [first] = tracks;
  const share = (index + first.offset) / (first.present + first.offset || 1);
  return tracks.map((track) =>
    track === first
      ? index
      : index === first.present
        ? track.present
        : Math.max(0, Math.round((track.present + track.offset) * share - track.offset)),
  );
}

/** Weighted relative change of a track; from 0 the change is reckoned against the whole range. */
export function trackCost(track: Track, index: number, to: number): number {
  const base = track.present === 0 ? Math.max(1, to) : track.present;
  return (track.weight * Math.abs(index - track.present)) / base;
}

/** Cost of a knob at a step. */
export function knobCost(knob: Knob, index: number): number {
  return indicesAt(knob, index).reduce((sum, at, track) => {
    const own = knob.tracks[track];
    return own ? sum + trackCost(own, at, knob.to) : sum;
  }, 0);
}

/** The farthest step at or before `cost` on the way from the present one towards an end. */
export function indexWithin(knob: Knob, towards: number, cost: number): number {
  const [first] = knob.tracks;
  const full = knobCost(knob, towards);
  if (full <= cost) return towards;
  let index = first.present + Math.trunc(((towards - first.present) * cost) / full);
  while (index !== first.present && knobCost(knob, index) > cost) index += index > first.present ? -1 : 1;
  return index;
}

/** Typed numbers by place, the knob standing at `index`. */
export function typedOf(knob: Knob, index: number): [string, number][] {
  return indicesAt(knob, index).flatMap((at, track): [string, number][] => {
    const own = knob.tracks[track];
    return own ? [[own.place, typedAt(at, own.decimals)]] : [];
  });
}
