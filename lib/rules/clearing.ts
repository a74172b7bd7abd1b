import type { ClearingValue } from "@/lib/domain/findings";
import type { Level } from "@/lib/domain/levels";
import { parameterDefinition } from "@/lib/domain/parameters";
import type { ParameterName } from "@/lib/domain/parameters";
import { unitFactor } from "@/lib/domain/units";
import type { ParameterValue } from "@/lib/domain/values";
import type { AxisView } from "./types";

/** A parameter whose change alone may end `over`, and which way it has to go. */
export interface Candidate {
  readonly view: AxisView;
  readonly parameter: ParameterName;
  readonly aim:
    | { readonly kind: "lower" }
    /** At most to `most`, SI: beyond it the change gains nothing or breaks something else. */
    | { readonly kind: "raise"; readonly most: number }
    | { readonly kind: "set"; readonly to: number };
}

/** Level of the check with another value (SI) of the candidate's parameter. */
export type Probe = (candidate: Candidate, value: number) => Level;

interface Solution {
  readonly candidate: Candidate;
  readonly stated: ParameterValue;
  readonly value: number;
}

/**
 * The first candidate that ends `over`, with its value rounded to the safe side in the text's own unit; null for none.
 * Among neighbours that are all lowered it is the one that has to give way least.
 */
export function clearingValue(candidates: readonly Candidate[], probe: Probe): ClearingValue | null {
  let best: Solution | null = null;
  for (const candidate of candidates) {
    if (best && candidate.aim.kind !== "lower") break;
    const found = solution(candidate, probe);
    if (found && (!best || remaining(found) > remaining(best))) best = found;
    if (best && best.candidate.aim.kind !== "lower") break;
  }
  if (!best) return null;
  const { candidate, stated, value } = best;
  return { axis: candidate.view.axis, parameter: candidate.parameter, value, unit: stated.unit };
}

function solution(candidate: Candidate, probe: Probe): Solution | null {
  const stated = candidate.view.parameter(candidate.parameter);
  if (!stated) return null;
  const value = solved(candidate, stated, (tried) => probe(candidate, tried));
  return value === null ? null : { candidate, stated, value };
}

/** Share of the present value that is left. */
function remaining({ value, stated }: Solution): number {
  return stated.value === 0 ? 0 : value / stated.value;
}

function solved(
  { view, aim }: Candidate,
  stated: ParameterValue,
  probe: (value: number) => Level,
): number | null {
  const scale = scaleOf(stated, view);
  const value =
    aim.kind === "set"
      ? scale.inside(Number((aim.to / scale.perTyped).toPrecision(7)))
      : searched({ aim, stated, scale, probe });
  if (value === null) return null;
  const level = probe(value);
  return level === "over" || level === "cannot" ? null : value;
}

interface Scale {
  /** Inside unit for one typed unit. */
  readonly perTyped: number;
  readonly inside: (typed: number) => number;
}

/** From the unit that the text has the value in to SI. Twelve digits keep the arithmetic's last bits out of the answer. */
function scaleOf(stated: ParameterValue, view: AxisView): Scale {
  const perTyped = perTypedUnit(stated, view);
  return { perTyped, inside: (typed) => Number((typed * perTyped).toPrecision(12)) };
}

function perTypedUnit({ typed, value, unit, parameter }: ParameterValue, view: AxisView): number {
  if (typed.value !== 0 && value !== 0) return value / typed.value;
  if (typed.unit === null || typed.unit === unit) return 1;
  const factor = unitFactor(typed.unit, parameterDefinition(parameter).dimension, { kind: view.kind });
  return factor.ok ? factor.value : 1;
}

/** Register steps and counts are whole numbers. */
function isWhole(parameter: ParameterName): boolean {
  return parameterDefinition(parameter).dimension === "count";
}

/** How far below its present value, or below the most it may be, a value is looked for: seven decades. */
const DECADES = 7;

interface Search {
  readonly aim: Exclude<Candidate["aim"], { kind: "set" }>;
  readonly stated: ParameterValue;
  readonly scale: Scale;
  readonly probe: (value: number) => Level;
}

/** The rounded value nearest to the present one that is not over; null where none in reach is. */
function searched({ aim, stated, scale, probe }: Search): number | null {
  const grid = isWhole(stated.parameter) ? WHOLE : DIGITS;
  const clears = (index: number) => probe(scale.inside(grid.value(index))) !== "over";
  const present = Math.abs(stated.value / scale.perTyped);
  const start = grid.least(present, aim.kind === "raise" ? Math.abs(aim.most / scale.perTyped) : present);
  const index =
    aim.kind === "lower"
      ? lastClearing({ from: start, to: grid.floor(present), clears })
      : firstClearing({
          from: present === 0 ? start : grid.floor(present),
          to: grid.floor(Math.abs(aim.most / scale.perTyped)),
          clears,
        });
  return index === null ? null : scale.inside(grid.value(index));
}

interface Range {
  readonly from: number;
  readonly to: number;
  readonly clears: (index: number) => boolean;
}

/** The largest index that clears, given that smaller ones clear rather than larger ones. */
function lastClearing({ from, to, clears }: Range): number | null {
  if (to < from || !clears(from)) return null;
  let clear = from;
  let over = to + 1;
  while (over - clear > 1) {
    const middle = Math.floor((clear + over) / 2);
    if (clears(middle)) clear = middle;
    else over = middle;
  }
  return clear;
}

/** The smallest index that clears, given that larger ones clear rather than smaller ones. */
function firstClearing({ from, to, clears }: Range): number | null {
  if (to < from || !clears(to)) return null;
  let over = from - 1;
  let clear = to;
  while (clear - over > 1) {
    const middle = Math.floor((clear + over) / 2);
    if (clears(middle)) clear = middle;
    else over = middle;
  }
  return clear;
}

/** Numbers that a person would type, in ascending order; `floor` gives the index of the largest one not above x. */
interface Grid {
  readonly value: (index: number) => number;
  readonly floor: (x: number) => number;
  readonly least: (present: number, most: number) => number;
}

const WHOLE: Grid = { value: (index) => index, floor: Math.floor, least: () => 0 };

/** Steps in one decade: 1.000 to 1.999 by 0.001, then 2.00 to 9.99 by 0.01. */
const FINE = 1000;
const STEPS = FINE + 800;

/** Three significant digits, four after a leading 1: steps of 0.05 to 0.5 %. */
const DIGITS: Grid = {
  value: (index) => {
    const decade = Math.floor(index / STEPS);
    const step = index - decade * STEPS;
    const digits = step < FINE ? `${FINE + step}e${decade - 3}` : `${step - FINE + 200}e${decade - 2}`;
    return Number(digits);
  },
  floor: digitsFloor,
  least: (present, most) => digitsFloor(Math.max(present, most)) - DECADES * STEPS,
};

function digitsFloor(x: number): number {
  if (!(x > 0)) return 0;
  const decade = Math.floor(Math.log10(x));
  const mantissa = x / 10 ** decade;
  // A mantissa a hair below a grid number is that number.
  const step =
    mantissa < 2
      ? Math.floor((mantissa - 1) * FINE + 1e-6)
      : FINE + Math.min(799, Math.floor(mantissa * 100 + 1e-6) - 200);
  return decade * STEPS + step;
}
