import { keyRuleSchema, type KeyRule } from "@/lib/domain/key-table";
import { needsBasis, parameterDefinition, type ParameterName } from "@/lib/domain/parameters";
import { unitsOf } from "@/lib/domain/units";
import type { Suggestion } from "@/lib/keytable/types";
import { ruleTrouble } from "@/lib/schemas/key-tables";

/** A row of the key table as it stands in its entries; an empty text is "not said". */
export interface RuleRow {
  /** Tells rows apart while they are edited. */
  readonly id: number;
  readonly key: string;
  readonly parameter: ParameterName;
  readonly axis: string;
  readonly unit: string;
  readonly basis: string;
  readonly layer: string;
}

export function toRow(rule: KeyRule, id: number): RuleRow {
  const { key, parameter, axis, unit, basis, layer } = rule;
  return { id, key, parameter, axis: axis ?? "", unit: unit ?? "", basis: basis ?? "", layer: layer ?? "" };
}

/** What a row says, without what it leaves open. */
export function toRule({ id: _, ...row }: RuleRow): unknown {
  return Object.fromEntries(
    Object.entries({ ...row, key: row.key.trim() }).filter(([, value]) => value !== ""),
  );
}

export interface RowTrouble {
  readonly field: string;
  readonly sentence: string;
}

/** What keeps a row from being used; null for a good one. */
export function rowTrouble(row: RuleRow): RowTrouble | null {
  if (row.key.trim() === "") return { field: "key", sentence: "Type the key, or remove the row." };
  const read = keyRuleSchema.safeParse(toRule(row));
  if (!read.success)
    return { field: String(read.error.issues[0]?.path[0] ?? "key"), sentence: "This does not fit." };
  return ruleTrouble(read.data);
}

/** The rules of the rows that can be used as they stand; the others wait until they are put right. */
export function usableRules(rows: readonly RuleRow[]): KeyRule[] {
  return rows.filter((row) => rowTrouble(row) === null).map((row) => keyRuleSchema.parse(toRule(row)));
}

/** Units to choose from for a parameter, on both kinds of axis; a hold current may be a share of the run current. */
export function unitChoices(parameter: ParameterName): string[] {
  const { dimension } = parameterDefinition(parameter);
  const own = [...unitsOf(dimension, "linear"), ...unitsOf(dimension, "rotary")];
  return [...new Set(parameter === "hold_current" ? [...own, "%"] : own)];
}

/** A row with another parameter; what no longer fits is left open. */
export function withParameter(row: RuleRow, parameter: ParameterName): RuleRow {
  return {
    ...row,
    parameter,
    unit: unitChoices(parameter).includes(row.unit) ? row.unit : "",
    basis: needsBasis(parameter) ? row.basis : "",
    axis: parameterDefinition(parameter).scope === "machine" ? "" : row.axis,
  };
}

/** The row that a suggestion makes of an unmapped key. */
export function suggestedRow(key: string, suggestion: Suggestion, id: number): RuleRow {
  const { parameter, axis, unit, basis } = suggestion;
  return { id, key, parameter, axis: axis ?? "", unit: unit ?? "", basis: basis ?? "", layer: "" };
}
