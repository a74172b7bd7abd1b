import { parameterDefinition, type ParameterName } from "@/lib/domain/parameters";
import { showText } from "@/lib/domain/units";
import type { Basis } from "@/lib/domain/values";

/** A parameter's value as a technician reads it: "0.85 A rms", "300 mm/s", "yes". `value` in the inside unit. */
export function showValue(
  parameter: ParameterName,
  { value, unit, basis }: { readonly value: number; readonly unit: string; readonly basis: Basis | null },
  digits = 6,
): string {
  if (parameterDefinition(parameter).dimension === "boolean") return value === 0 ? "no" : "yes";
  const text = showText(value, unit, digits);
  return basis === null ? text : `${text} ${basis}`;
}
