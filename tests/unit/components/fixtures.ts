import type { Finding } from "@/lib/domain/findings";
import type { FloorColumn, FloorRow } from "@/lib/domain/floor";
import { parameterDefinition, type ParameterName } from "@/lib/domain/parameters";
import type { Effect } from "@/lib/review/types";

/** A mount that gets too hot; every test changes what it is about. */
export function aFinding(over: Partial<Finding> = {}): Finding {
  return {
    ruleId: "mount-temperature",
    level: "over",
    axis: "x",
    parameters: ["run_current"],
    sentence: "The motor case would reach 64 °C; the limit of its mount is 58 °C.",
    value: 64,
    limit: 58,
    nearLimit: 48,
    limitSense: "upper",
    margin: -6,
    unit: "°C",
    formula: "35 °C + 7 K/W · 4.14 W = 64 °C",
    source: "Data sheet of the motor",
    caution: null,
    spans: [
      {
        path: "axes.conf",
        line: 42,
        column: 12,
        start: 500,
        end: 504,
        raw: "1.05",
        key: "axis.x.amps",
      },
    ],
    clearingValue: null,
    needs: [],
    assumed: [],
    ...over,
  };
}

export function anEffect(over: Partial<Effect> = {}): Effect {
  return {
    axis: "x",
    quantity: "case_c",
    label: "Motor case",
    unit: "°C",
    was: 51,
    toBe: 64,
    limit: 58,
    limitSense: "upper",
    nearLimit: 48,
    levelWas: "near",
    levelToBe: "over",
    ruleId: "mount-temperature",
    letters: ["A"],
    missing: [],
    ...over,
  };
}

export function aColumn(axis: string | null, parameter: ParameterName, modelIds?: string[]): FloorColumn {
  const { short, label } = parameterDefinition(parameter);
  return { key: `${axis ?? ""}|${parameter}`, axis, parameter, short, label, modelIds };
}

export function aRow(number: number, over: Partial<FloorRow> = {}): FloorRow {
  return {
    machineId: `m-${number}`,
    serial: `SO-${number}`,
    modelId: "sorter",
    modelName: "Sorter 5",
    siteName: "East hall",
    standing: "on_baseline",
    sentence: "on baseline",
    cells: {},
    ...over,
  };
}
