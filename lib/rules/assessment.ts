import type { LimitSense } from "@/lib/domain/findings";
import type { Level } from "@/lib/domain/levels";
import { OUT_OF_RANGE } from "./data";
import type { Missing } from "./types";

/** What a check makes of one axis (or the machine), before it becomes a finding. */
export interface Judged {
  readonly ok: true;
  readonly level: Exclude<Level, "cannot">;
  readonly value: number | null;
  readonly limit: number | null;
  readonly nearLimit: number | null;
  readonly limitSense: LimitSense;
  readonly margin: number | null;
  readonly unit: string;
  readonly assumed: readonly string[];
  readonly sentence: () => string;
  readonly formula: () => string;
}

/** Null: the check has no meaning here, and there is nothing to say. */
export type Assessment = Judged | Missing | null;

type Verdict = Pick<Judged, "level" | "value" | "limit" | "nearLimit" | "limitSense" | "margin" | "unit">;

interface Grounds {
  readonly assumed: readonly string[];
  readonly sentence: () => string;
  readonly formula: () => string;
}

/** A verdict with its words, written out field by field: it is made anew for each value that a clearing value tries. */
export function judged(verdict: Verdict, grounds: Grounds): Judged | Missing {
  if (!isFiniteOrNull(verdict.value) || !isFiniteOrNull(verdict.limit) || !isFiniteOrNull(verdict.nearLimit))
    return OUT_OF_RANGE;
  return {
    ok: true,
    level: verdict.level,
    value: verdict.value,
    limit: verdict.limit,
    nearLimit: verdict.nearLimit,
    limitSense: verdict.limitSense,
    margin: verdict.margin,
    unit: verdict.unit,
    assumed: grounds.assumed,
    sentence: grounds.sentence,
    formula: grounds.formula,
  };
}

function isFiniteOrNull(value: number | null): boolean {
  return value === null || Number.isFinite(value);
}

interface Bounds {
  readonly value: number;
  /** Where `over` begins, and where `near` does; a value exactly there is still on the good side. */
  readonly limit: number;
  readonly near: number;
  readonly unit: string;
}

/** Two computed numbers that differ by less than this share are equal: the last bits are noise of the arithmetic. */
const NOISE = 1e-9;

export function exceeds(value: number, limit: number): boolean {
  return value > limit + NOISE * Math.abs(limit);
}

function upperLevel(value: number, limit: number, near: number): Judged["level"] {
  if (exceeds(value, limit)) return "over";
  return exceeds(value, near) ? "near" : "within";
}

function finite(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}

/** Judges against an upper limit; the margin is (limit − value)/value. */
export function judgeUpper({ value, limit, near, unit }: Bounds): Verdict {
  const level = upperLevel(value, limit, near);
  const margin = finite((limit - value) / value);
  return { level, value, limit, nearLimit: near, limitSense: "upper", margin, unit };
}

/** Judges a temperature, °C, against an upper limit; the margin is limit − value in K. */
export function judgeTemperature(bounds: Omit<Bounds, "unit">): Verdict {
  const { value, limit, near } = bounds;
  const level = upperLevel(value, limit, near);
  return {
    level,
    value,
    limit,
    nearLimit: near,
    limitSense: "upper",
    margin: finite(limit - value),
    unit: "°C",
  };
}

/** Judges against a lower limit; the margin is (value − limit)/limit. */
export function judgeLower({ value, limit, near, unit }: Bounds): Verdict {
  const level = exceeds(limit, value) ? "over" : exceeds(near, value) ? "near" : "within";
  const margin = finite((value - limit) / limit);
  return { level, value, limit, nearLimit: near, limitSense: "lower", margin, unit };
}

/** A check that hints and has no limit: `near` where the hint applies. */
export function hint(input: {
  readonly value: number | null;
  readonly applies: boolean;
  readonly nearLimit: number | null;
  readonly unit: string;
}): Verdict {
  const { value, applies, nearLimit, unit } = input;
  return {
    level: applies ? "near" : "within",
    value,
    limit: null,
    nearLimit,
    limitSense: null,
    margin: null,
    unit,
  };
}

/** Over the limit without a number: a temperature that never settles. */
export function unbounded(limit: number, near: number): Verdict {
  return {
    level: "over",
    value: null,
    limit,
    nearLimit: near,
    limitSense: "upper",
    margin: null,
    unit: "°C",
  };
}

/** "≤" or ">" as the verdict has it, for formulas. */
export function upperSign(verdict: Verdict): string {
  return verdict.level === "over" ? ">" : "≤";
}

export function lowerSign(verdict: Verdict): string {
  return verdict.level === "over" ? "<" : "≥";
}

/** Where a value stands beside its upper limit, for sentences. */
export const BESIDE = { within: "below", near: "close to", over: "above" } as const;
