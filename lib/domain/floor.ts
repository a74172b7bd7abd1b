import { z } from "zod";
import type { Level } from "./levels";
import type { ParameterName } from "./parameters";

/** How a machine stands; rows sort in this order. A machine not read on some parameter is never `on_baseline`. */
export const STANDINGS = ["over", "near", "cannot", "within", "on_baseline", "out_of_service"] as const;
export const standingSchema = z.enum(STANDINGS);
export type Standing = z.infer<typeof standingSchema>;

export const STANDING_WORDS: Record<Standing, string> = {
  over: "over limit",
  near: "near limit",
  cannot: "cannot check or not read",
  within: "within limits",
  on_baseline: "on baseline",
  out_of_service: "out of service",
};

/** A parameter of an axis (or of the machine) as a column of the floor map. */
export interface FloorColumn {
  /** Unique; keys of `FloorRow.cells`. */
  readonly key: string;
  /** Axis name; null for a parameter of the machine. Columns of one axis stand together. */
  readonly axis: string | null;
  readonly parameter: ParameterName;
  /** Column head, at most nine characters. */
  readonly short: string;
  /** Words for the cell's sentence. */
  readonly label: string;
  /** Models that have this parameter; the cells of other models stay blank. Left out: every model. */
  readonly modelIds?: readonly string[] | undefined;
}

/** A cell that is not as required. A parameter that stands as required has no cell at all. */
export interface FloorCell {
  /** `absent`: neither required nor read. */
  readonly kind: "drift" | "deviation" | "not_read" | "absent";
  /** Signed relative difference, −1 to 1; only for drift. */
  readonly share?: number | undefined;
  /** Level of the consequence; only for drift. */
  readonly level?: Level | undefined;
  /** The cell in words with numbers and units, e.g. "0.80 A, required 1.20 A". */
  readonly title: string;
}

export interface FloorRow {
  readonly machineId: string;
  readonly serial: string;
  readonly modelId: string;
  readonly modelName: string;
  readonly siteName: string;
  readonly standing: Standing;
  /** The worst of it in a technician's words; "on baseline" where nothing is off. */
  readonly sentence: string;
  readonly cells: Readonly<Record<string, FloorCell>>;
}

/** Key of a parameter's column: the same for every machine whose axis has that name. */
export function columnKey(axis: string | null, parameter: ParameterName): string {
  return `${axis?.toLowerCase() ?? ""}.${parameter}`;
}
