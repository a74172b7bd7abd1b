import type { DiagnosticCode } from "@/lib/domain/diagnostic";
import { needsBasis, parameterDefinition } from "@/lib/domain/parameters";
import { canonicalUnit, insideUnit, unitFactor, type UnitContext } from "@/lib/domain/units";
import type { KeyRule } from "@/lib/domain/key-table";
import type { Basis } from "@/lib/domain/values";
import { readScalarText, type Scalar } from "@/lib/parsers/scalar";
import type { Format } from "@/lib/parsers/types";

/** A value in the inside unit of its parameter, with what it rests on. */
export interface Reading {
  readonly ok: true;
  /** SI (1/mm or 1/deg for the scale; per cent for a hold current in %). */
  readonly value: number;
  readonly unit: string;
  readonly basis: Basis | null;
  readonly typed: { readonly value: number; readonly unit: string | null };
  /** Inside value of one typed unit; the writer divides by it. */
  readonly factor: number;
}

export interface Unreadable {
  readonly ok: false;
  readonly code: DiagnosticCode;
  /** What is wrong with the value, as a clause after its key: "has no unit ...". */
  readonly reason: string;
}

export interface ValueInput {
  readonly value: Scalar;
  readonly raw: string;
  readonly format: Format;
  readonly rule: KeyRule;
  readonly context: UnitContext;
}

/** Reads a parsed value as the parameter that the rule makes of it. */
export function readParameter(input: ValueInput): Reading | Unreadable {
  const { dimension } = parameterDefinition(input.rule.parameter);
  if (dimension === "boolean") return readBoolean(input);
  const number = numberOf(input);
  if (!number) return notANumber(input);
  const { written, basis } = splitBasis(number.unit);
  if (dimension === "count") return readCount(number.value, written);
  const unit = written ?? tableUnit(input.rule) ?? defaultUnit(input);
  const typed = { value: number.value, unit };
  if (unit === null) return noUnit();
  if (input.rule.parameter === "hold_current" && unit === "%")
    return { ok: true, value: number.value, unit: "%", basis: null, typed, factor: 1 };
  const conversion = unitFactor(unit, dimension, input.context);
  if (!conversion.ok)
    return { ok: false, code: conversion.code, reason: unitReason(conversion, unit, written) };
  return {
    ok: true,
    value: number.value * conversion.value,
    unit: insideUnit(dimension, input.context.kind),
    basis: needsBasis(input.rule.parameter) ? (basis ?? input.rule.basis ?? null) : null,
    typed,
    factor: conversion.value,
  };
}

function notANumber({ raw }: ValueInput): Unreadable {
  const reason = raw === "" ? "has no value" : `has “${shorten(raw)}”, which is no number`;
  return { ok: false, code: "not-a-number", reason: `${reason}; write the number itself` };
}

const LONGEST_QUOTE = 40;

function shorten(raw: string): string {
  return raw.length > LONGEST_QUOTE ? `${raw.slice(0, LONGEST_QUOTE)}…` : raw;
}

function noUnit(): Unreadable {
  return { ok: false, code: "unknown-unit", reason: "has no unit; say in the key table which it is" };
}

function unitReason(
  { code, reason }: { code: string; reason: string },
  unit: string,
  written: string | null,
): string {
  const where = written === null ? "in the key table" : "in the text";
  if (code === "unknown-unit")
    return `has the unit “${unit}” (${where}), which is not known; write one that is`;
  const clause = reason.replace(/\.$/, "");
  return code === "wrong-unit"
    ? `cannot be read: ${clause} (${where})`
    : `cannot be converted: ${clause}; give them in the text, the key table or the hardware`;
}

interface TypedNumber {
  readonly value: number;
  readonly unit: string | null;
}

/** The number of a value; one in quotes counts, and so does the 16 of microsteps written 1/16 (common practice, no source). */
function numberOf({ value, rule }: ValueInput): TypedNumber | null {
  if (value.kind === "number") return value;
  if (value.kind !== "text") return null;
  const inner = readScalarText(value.value);
  if (inner.kind === "number") return inner;
  const divided =
    rule.parameter === "microsteps" ? /^1\s*\/\s*(\d+)$/.exec(value.value.trim())?.[1] : undefined;
  return divided === undefined ? null : { value: Number(divided), unit: null };
}

/** `mA rms`, `A_peak`, `mArms`: the unit of a current with its basis behind it. */
const WITH_BASIS = /^(.*?)[\s_]*(rms|peak|pk)$/i;

function splitBasis(unit: string | null): { written: string | null; basis: Basis | null } {
  const match = unit === null ? null : WITH_BASIS.exec(unit);
  const bare = match?.[1];
  if (!bare || canonicalUnit(bare) === null) return { written: unit, basis: null };
  return { written: bare, basis: match?.[2]?.toLowerCase() === "rms" ? "rms" : "peak" };
}

function readCount(value: number, unit: string | null): Reading | Unreadable {
  if (unit === null)
    return { ok: true, value, unit: "", basis: null, typed: { value, unit: null }, factor: 1 };
  const known = canonicalUnit(unit) !== null;
  return {
    ok: false,
    code: known ? "wrong-unit" : "unknown-unit",
    reason: `has the unit “${unit}”, but it is a plain count; write the number alone`,
  };
}

/** Words that a key table may have in the place of a unit where there is none. */
const NO_UNIT = ["", "-", "1", "none"];

function tableUnit(rule: KeyRule): string | null {
  const unit = rule.unit?.trim() ?? "";
  return NO_UNIT.includes(unit.toLowerCase()) ? null : unit;
}

/** Only the scale goes without a unit: steps per mm, or per degree on a rotary axis. */
function defaultUnit({ rule, context }: ValueInput): string | null {
  const { dimension } = parameterDefinition(rule.parameter);
  return dimension === "scale" ? insideUnit("scale", context.kind) : null;
}

/** Yes and no in any spelling, 1 and 0; in a header, a name defined without a value says yes. */
function readBoolean({ value, format }: ValueInput): Reading | Unreadable {
  const truth = truthOf(value, format);
  if (truth === null)
    return { ok: false, code: "not-a-number", reason: "says neither yes nor no; write true or false" };
  return { ok: true, value: truth, unit: "", basis: null, typed: { value: truth, unit: null }, factor: 1 };
}

function truthOf(value: Scalar, format: Format): 0 | 1 | null {
  if (value.kind === "boolean") return value.value ? 1 : 0;
  if (value.kind === "none") return format === "defines" ? 1 : null;
  if (value.kind === "text") {
    const inner = readScalarText(value.value);
    return inner.kind === "text" ? null : truthOf(inner, format);
  }
  return value.unit === null && (value.value === 0 || value.value === 1) ? value.value : null;
}
