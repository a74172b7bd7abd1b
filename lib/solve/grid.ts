import { parameterDefinition } from "@/lib/domain/parameters";
import { unitFactor } from "@/lib/domain/units";
import type { ParameterValue } from "@/lib/domain/values";

/** The finest step that a value with decimals is given is this share of it at most. */
const FINEST = 0.01;
const MOST_DECIMALS = 9;

/**
 * How many decimals a value may be written with, as the text can hold it: a whole number stays whole, since the
 * firmware may read no other; one with a decimal point keeps its decimals, and gets more where a step of the last one
 * would be more than 1 % of it.
 */
export function decimalsOf({ typed, parameter, source }: ParameterValue): number {
  if (parameterDefinition(parameter).dimension === "count") return 0;
  const typedDecimals = writtenDecimals(source.raw, typed.value);
  if (typedDecimals === 0) return 0;
  let decimals = typedDecimals;
  while (typed.value !== 0 && decimals < MOST_DECIMALS && 10 ** -decimals > FINEST * Math.abs(typed.value))
    decimals++;
  return decimals;
}

const NUMBER = /[+-]?(\d+\.?\d*|\.\d+)(?:e([+-]?\d+))?/i;

/** Decimals of the number in a spelling; those of the value itself where the spelling says another number. */
function writtenDecimals(raw: string, value: number): number {
  const match = NUMBER.exec(raw);
  const spelt = match && Number(match[0]) === value ? match[0] : String(value);
  const [mantissa = "", exponent = "0"] = spelt.toLowerCase().split("e");
  const point = mantissa.indexOf(".");
  const decimals = point < 0 ? 0 : mantissa.length - point - 1;
  return Math.max(0, decimals - Number(exponent));
}

/** The typed number at a step of the grid, exactly as its decimals say it. */
export function typedAt(index: number, decimals: number): number {
  return Number(`${index}e-${decimals}`);
}

/** The step nearest to a typed number. */
export function indexOf(typed: number, decimals: number): number {
  return Math.round(Number(`${typed}e${decimals}`)) || Math.round(typed * 10 ** decimals);
}

/** SI of a typed number beside a value that the text has in the same unit. Twelve digits keep the arithmetic's last bits out. */
export function insideValue(stated: ParameterValue, typed: number): number {
  if (typed === stated.typed.value) return stated.value;
  return Number((typed * perTyped(stated)).toPrecision(12));
}

/** Inside unit for one typed unit. */
function perTyped({ typed, value, unit, parameter }: ParameterValue): number {
  if (typed.value !== 0 && value !== 0) return value / typed.value;
  if (typed.unit === null || typed.unit === unit) return 1;
  const factor = unitFactor(typed.unit, parameterDefinition(parameter).dimension, { kind: "linear" });
  return factor.ok ? factor.value : 1;
}

/** The typed number for an inside value, not rounded to the grid. */
export function typedValue(stated: ParameterValue, value: number): number {
  return Number((value / perTyped(stated)).toPrecision(12));
}
